import type { EntityManager } from 'typeorm'
import type * as z from 'zod'
import type { CurrentUser } from '../../shared/api/people.ts'
import type { RouteName, routes } from '../../shared/api/routes.ts'
import type { Services } from '../services.ts'
import type { Download } from './download.ts'

type Routes = typeof routes

type Read<K extends RouteName, Field extends string> =
  Routes[K] extends Readonly<Record<Field, infer S extends z.ZodType>> ? z.output<S> : undefined

export type Body<K extends RouteName> = Read<K, 'body'>
export type Params<K extends RouteName> = Read<K, 'params'>
export type Query<K extends RouteName> = Read<K, 'query'>

/** What a handler returns: the value of the answer's schema, a file, or nothing. */
export type Answer<K extends RouteName> = Routes[K] extends { readonly answer: infer A }
  ? A extends z.ZodType
    ? z.output<A>
    : Download
  : void

export interface UploadedFile {
  readonly name: string
  readonly bytes: Buffer
}

/** What a session can do for the handlers that sign people in and out. */
export interface SessionControl {
  /** Handle of the current session; null when signed out. */
  readonly handle: string | null
  readonly signIn: (email: string, password: string) => Promise<CurrentUser | null>
  readonly signOut: () => Promise<void>
}

/** A request, read and validated. */
export interface Call<K extends RouteName> {
  readonly services: Services
  /** Null only on routes that anyone may call. */
  readonly visitor: CurrentUser | null
  /** The signed-in person; the policy has seen to it. */
  readonly user: CurrentUser
  readonly params: Params<K>
  readonly query: Query<K>
  readonly body: Body<K>
  /** From If-Match; 0 on routes that take none. */
  readonly version: number
  readonly file: UploadedFile | undefined
  readonly address: string
  readonly session: SessionControl
  /** Runs a change in one audited transaction; its result is the answer, also when the request is repeated. */
  readonly write: <T>(work: (manager: EntityManager) => Promise<T>) => Promise<T>
}

export type Handler<K extends RouteName> = (call: Call<K>) => Promise<Answer<K>>
export type Handlers = { readonly [K in RouteName]: Handler<K> }

/** The handlers of one resource. */
export type HandlersOf<K extends RouteName> = Pick<Handlers, K>
