import type { User } from '../../../shared/api/people.ts'
import type { Body } from '../../api/client.ts'

type Values = Required<Body<'updateUser'>>

/** The fields that differ from what the person was; an empty password keeps the old one. */
export function changesOf(person: User, values: Values): Body<'updateUser'> {
  return {
    ...(values.name === person.name ? {} : { name: values.name }),
    ...(values.role === person.role ? {} : { role: values.role }),
    ...(values.disabled === person.disabled ? {} : { disabled: values.disabled }),
    ...(values.password === '' ? {} : { password: values.password }),
  }
}
