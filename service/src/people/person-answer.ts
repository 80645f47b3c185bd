import type { components } from '../../../openapi/types/desk';
import type { PersonRecord } from './person';

/** What is told of a person: everything but the password's hash. */
export function toPerson(person: PersonRecord): components['schemas']['Person'] {
  const { id, name, email, roles, partnerId, state, createdAt, lastSignInAt } = person;
  return { id, name, email, roles: [...roles], partnerId, state, createdAt, lastSignInAt };
}
