import type { components } from '../../../openapi/types/desk';
import { timeText, type Clock } from '../clock';
import type { Database } from '../database/database';
import { DeskError, notFound } from '../errors';
import type { Journal } from '../journal/journal';
import type { Page } from '../http/page';
import type { InvitationsStore } from './invitations-store';
import type { PeopleStore } from './people-store';
import { toPerson } from './person-answer';
import type { PersonRecord, PersonState, SignedInPerson } from './person';
import { requireRolesFit } from './role-rules';

type Person = components['schemas']['Person'];
type PersonList = components['schemas']['PersonList'];
type PersonChange = components['schemas']['PersonChange'];

export interface PeopleServiceParts {
  readonly database: Database;
  readonly people: PeopleStore;
  readonly invitations: InvitationsStore;
  readonly journal: Journal;
  readonly clock: Clock;
}

export class PeopleService {
  constructor(private readonly parts: PeopleServiceParts) {}

  async list(page: Page): Promise<PersonList> {
    const people = await this.parts.people.list(page.limit, page.offset);
    return { items: people.map(toPerson), total: await this.parts.people.count() };
  }

  async change(id: string, change: PersonChange, actor: SignedInPerson): Promise<Person> {
    return this.parts.database.unitOfWork(async () => {
      const before = await this.parts.people.findById(id);
      if (!before) throw notFound('person');
      await this.changeRoles(before, change.roles);
      await this.changeEntry(before, change);
      await this.requireAdministratorLeft(before);
      const after = (await this.parts.people.findById(id)) as PersonRecord;
      await this.note(before, after, actor);
      return toPerson(after);
    });
  }

  private async changeRoles(before: PersonRecord, roles: PersonChange['roles']): Promise<void> {
    if (roles === undefined) return;
    requireRolesFit(roles, before.partnerId);
    await this.parts.people.replaceRoles(before.id, roles);
  }

  /** Closing ends open sessions by itself: every call reads the person anew. It also ends an open invitation. */
  private async changeEntry(before: PersonRecord, change: PersonChange): Promise<void> {
    const { people, invitations, clock } = this.parts;
    const state = stateAfter(before, change.closed);
    await people.update(before.id, { name: change.name?.trim() ?? before.name, state });
    if (state === 'closed') await invitations.spendAllOf(before.id, timeText(clock));
  }

  /** Checked after the change and inside its transaction, so that two administrators cannot remove each other. */
  private async requireAdministratorLeft(before: PersonRecord): Promise<void> {
    const was = before.state === 'active' && before.roles.includes('administrator');
    if (!was || (await this.parts.people.countActiveWithRole('administrator')) > 0) return;
    throw new DeskError('last-administrator', 'Make someone else an administrator first.');
  }

  private async note(before: PersonRecord, after: PersonRecord, actor: SignedInPerson): Promise<void> {
    const closing = before.state !== after.state;
    const action = closing ? (after.state === 'closed' ? 'person-closed' : 'person-reopened') : 'person-changed';
    const parts = [
      before.name === after.name ? null : `renamed from ${before.name}`,
      before.roles.join() === after.roles.join()
        ? null
        : `roles ${before.roles.join(', ')} → ${after.roles.join(', ')}`,
      closing ? after.state : null,
    ].filter((part) => part !== null);
    const summary = `${after.name}: ${parts.join('; ') || 'nothing changed'}`;
    await this.parts.journal.write({ actorId: actor.id, action, subjectKind: 'person', subjectId: after.id, summary });
  }
}

/** Opened again, someone who never set a password is back among the invited. */
function stateAfter(before: PersonRecord, closed: boolean | undefined): PersonState {
  if (closed === true) return 'closed';
  if (closed === false && before.state === 'closed') return before.passwordHash === null ? 'invited' : 'active';
  return before.state;
}
