import type { EntityManager } from 'typeorm'
import type { CurrentUser } from '../../shared/api/people.ts'
import { mayCall } from '../../shared/api/policy.ts'
import type { Route } from '../../shared/api/route.ts'
import { routes, type RouteName } from '../../shared/api/routes.ts'
import type { Services } from '../services.ts'
import { writeOnce } from './act.ts'
import type { Answer, Handler, SessionControl, UploadedFile } from './call.ts'
import { handlers } from './handlers.ts'
import { read } from './read-request.ts'
import { Refusal } from './refusal.ts'

interface Inputs {
  readonly params?: unknown
  readonly body?: unknown
  readonly version?: number
  readonly file?: UploadedFile
}

const noSession: SessionControl = {
  handle: null,
  signIn: () => Promise.reject(new Error('There is no session here')),
  signOut: () => Promise.reject(new Error('There is no session here')),
}

/** Calls a route's handler without a request, as this person: the same policy, schemas and transaction. */
export async function perform<K extends RouteName>(
  services: Services,
  user: CurrentUser,
  name: K,
  inputs: Inputs,
): Promise<Answer<K>> {
  if (!mayCall(user.role, name)) throw new Refusal('forbidden', `${user.role} may not ${name}`)
  const route: Route = routes[name]
  const handler = handlers[name] as Handler<RouteName>
  const answer = await handler({
    services,
    visitor: user,
    user,
    params: route.params ? read(route.params, inputs.params, 'path') : undefined,
    query: {},
    body: route.body ? read(route.body, inputs.body, 'body') : undefined,
    version: inputs.version ?? 0,
    file: inputs.file,
    address: '',
    session: noSession,
    write: <T>(work: (manager: EntityManager) => Promise<T>) => writeOnce(services, user, null, work),
  } as never)
  return answer as Answer<K>
}
