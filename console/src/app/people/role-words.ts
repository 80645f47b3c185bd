import type { Person, Role } from '../api/contract';
import { ROLE_NAMES } from '../api/roles';
import type { Stamp } from '../ui/status-stamp';

/** In the order in which the forms offer them. */
export const ROLES: readonly Role[] = ['administrator', 'analyst', 'reviewer', 'viewer', 'partner-developer'];

/** What a role lets a person do, in one line. */
export const ROLE_MEANINGS: Readonly<Record<Role, string>> = {
  administrator: 'Keeps people, partners, keys and settings, and reads the journal.',
  analyst: 'Brings in records, makes fits and draws up editions.',
  reviewer: 'Puts an edition in force or sends it back; never one they drew up or submitted themselves.',
  viewer: 'Reads everything at the desk and changes nothing.',
  'partner-developer': 'Belongs to one partner and sees nothing else: keeps that partner’s sites and keys.',
};

export const PERSON_STAMPS: Readonly<Record<Person['state'], Stamp>> = {
  invited: { word: 'Invited', tone: 'waiting' },
  active: { word: 'Active', tone: 'good' },
  closed: { word: 'Closed', tone: 'past' },
};

export function rolesWords(roles: readonly Role[]): string {
  return ROLES.filter((role) => roles.includes(role))
    .map((role) => ROLE_NAMES[role])
    .join(', ');
}
