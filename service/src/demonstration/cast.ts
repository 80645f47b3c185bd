import { newId } from '../database/new-id';
import type { Journal } from '../journal/journal';
import type { PeopleStore } from '../people/people-store';
import type { Role, SignedInPerson } from '../people/person';
import type { Clock } from '../clock';

/** Published with the demonstration, so it protects nothing: never set where real people sign in. */
export const demonstrationPassword = 'calm tide over the bay';

export const castNames = ['administrator', 'firstAnalyst', 'secondAnalyst', 'reviewer', 'viewer'] as const;
export type DeskPart = (typeof castNames)[number];

interface Entry {
  readonly name: string;
  readonly email: string;
  readonly role: Role;
}

const deskPeople: Readonly<Record<DeskPart, Entry>> = {
  administrator: { name: 'Maren Tolley', email: 'maren.tolley@marlbay.example', role: 'administrator' },
  firstAnalyst: { name: 'Ines Caldwell', email: 'ines.caldwell@marlbay.example', role: 'analyst' },
  secondAnalyst: { name: 'Tomas Reede', email: 'tomas.reede@marlbay.example', role: 'analyst' },
  reviewer: { name: 'Hedda Quill', email: 'hedda.quill@marlbay.example', role: 'reviewer' },
  viewer: { name: 'Jonas Abara', email: 'jonas.abara@marlbay.example', role: 'viewer' },
};

export type Cast = Readonly<Record<DeskPart, SignedInPerson>>;

export interface CastParts {
  readonly people: PeopleStore;
  readonly journal: Journal;
  readonly clock: Clock;
  /** One hash for all: they share the published password, and a hash takes half a second. */
  readonly passwordHash: string;
}

export async function enterPerson(
  parts: CastParts,
  { name, email, role }: Entry,
  partnerId: string | null,
): Promise<SignedInPerson> {
  const person = { id: newId(), name, email, roles: [role], partnerId };
  await parts.people.insert({
    ...person,
    state: 'active',
    passwordHash: parts.passwordHash,
    createdAt: parts.clock.now().toISOString(),
  });
  await parts.journal.write({
    actorId: null,
    action: 'person-entered',
    subjectKind: 'person',
    subjectId: person.id,
    summary: `${name} entered as ${role} with the demonstration`,
  });
  return person;
}

export async function enterCast(parts: CastParts): Promise<Cast> {
  const entered: Partial<Record<DeskPart, SignedInPerson>> = {};
  for (const part of castNames) entered[part] = await enterPerson(parts, deskPeople[part], null);
  return entered as Cast;
}
