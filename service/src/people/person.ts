import type { components } from '../../../openapi/types/desk';

export type Role = components['schemas']['Role'];
export type PersonState = components['schemas']['Person']['state'];

/** The signed-in person, read anew for every call so that a changed role counts at once. */
export interface SignedInPerson {
  readonly id: string;
  readonly name: string;
  readonly email: string;
  readonly roles: readonly Role[];
  readonly partnerId: string | null;
}

export interface PersonRecord extends SignedInPerson {
  readonly state: PersonState;
  readonly passwordHash: string | null;
  readonly createdAt: string;
  readonly lastSignInAt: string | null;
}
