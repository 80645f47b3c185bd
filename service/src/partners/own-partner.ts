import { notFound } from '../errors';
import type { SignedInPerson } from '../people/person';

/** A partner developer sees their own partner only; of any other they do not learn that it exists. */
export function requireOwnPartner(person: SignedInPerson, partnerId: string): void {
  if (person.roles.includes('partner-developer') && person.partnerId !== partnerId) throw notFound('partner');
}
