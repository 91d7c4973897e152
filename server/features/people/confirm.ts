import { User } from '../../db/entities/user.ts'
import { Refusal } from '../../http/refusal.ts'
import type { Services } from '../../services.ts'
import { throttled } from './throttle.ts'

/** Asks a signed-in person for the password again; wrong ones are throttled. */
export async function confirmPassword(
  { dataSource, passwords }: Services,
  { id }: { readonly id: string },
  password: string,
): Promise<void> {
  const right = await throttled(dataSource, [{ kind: 'confirmation', value: id }], async () => {
    const { passwordHash } = await dataSource.getRepository(User).findOneByOrFail({ id })
    return (await passwords.matches(passwordHash, password)) ? true : null
  })
  if (!right) throw new Refusal('wrong-password', 'The password is not right. Nothing was changed.')
}
