import type { components } from '../../../../openapi/types/desk';
import { timeText, type Clock } from '../../clock';
import { translateUnique } from '../../database/constraint-errors';
import type { Database } from '../../database/database';
import { DeskError, notFound } from '../../errors';
import type { Journal } from '../../journal/journal';
import type { JournalStore } from '../../journal/journal-store';
import type { RecordSetRecord, RecordsStore } from '../records-store';
import type { KeepingStore } from './keeping-store';
import { requireNotPast } from './retention-date';

type Change = components['schemas']['RecordSetChange'];

export interface SetChangesParts {
  readonly database: Database;
  readonly records: Pick<RecordsStore, 'findSet'>;
  readonly keeping: Pick<KeepingStore, 'changeSet'>;
  readonly entries: Pick<JournalStore, 'list'>;
  readonly journal: Journal;
  readonly clock: Clock;
}

/** Changes a record set's words and how long its rows are kept, never past a colleague's change. */
export class SetChanges {
  constructor(private readonly parts: SetChangesParts) {}

  async change(personId: string, id: string, change: Change): Promise<void> {
    await this.parts.database.unitOfWork(async () => {
      const set = await this.parts.records.findSet(id);
      if (!set) throw notFound('record set');
      if (change.changedAt !== undefined && change.changedAt !== set.changedAt)
        throw await this.overtaken(set, change.changedAt);
      await this.apply(personId, set, change);
    });
  }

  private async apply(personId: string, set: RecordSetRecord, change: Change): Promise<void> {
    const { keeping, journal, clock } = this.parts;
    const name = change.name?.trim() ?? set.name;
    const description = change.description?.trim() ?? set.description;
    const retainUntil = change.retainUntil === undefined ? set.retainUntil : change.retainUntil;
    const told = changesOf(set, { name, description, retainUntil });
    if (told.length === 0) return;
    const changedAt = timeText(clock);
    if (retainUntil !== null && retainUntil !== set.retainUntil)
      requireNotPast(retainUntil, changedAt.slice(0, 10), '#/retainUntil');
    await translateUnique(
      () => keeping.changeSet(set.id, { name, description, retainUntil, changedAt }),
      'record_sets.name_key',
      () => nameTaken(name),
    );
    await journal.write({
      actorId: personId,
      action: 'record-set-changed',
      subjectKind: 'record-set',
      subjectId: set.id,
      summary: `The record set ${set.name}: ${told.join('; ')}`,
    });
  }

  /** The journal is asked who it was; it tells of every change of a set in the same unit of work. */
  private async overtaken(set: RecordSetRecord, read: string): Promise<DeskError> {
    const about = { subjectKind: 'record-set', subjectId: set.id, from: read };
    const [newest] = await this.parts.entries.list(about, { limit: 1, offset: 0 });
    const what = newest
      ? `${newest.actorName ?? 'The service'} changed it on ${momentText(newest.at)} (${newest.summary}).`
      : `It was changed on ${momentText(set.changedAt)}.`;
    return new DeskError(
      'record-set-changed',
      `Somebody changed the record set ${set.name} after you had read it. ${what} Read it again, look at what changed, and make your change once more if it is still wanted.`,
    );
  }
}

/** 2026-11-03T09:00:00.000Z as 2026-11-03 at 09:00 UTC. */
const momentText = (time: string): string => `${time.slice(0, 10)} at ${time.slice(11, 16)} UTC`;

type Words = Pick<RecordSetRecord, 'name' | 'description' | 'retainUntil'>;

function changesOf(before: Words, after: Words): string[] {
  const told: string[] = [];
  if (after.name !== before.name) told.push(`it is called ${after.name} now`);
  if (after.description !== before.description) told.push('its description was changed');
  if (after.retainUntil !== before.retainUntil)
    told.push(
      after.retainUntil === null ? 'its rows are kept for good' : `its rows are kept until ${after.retainUntil}`,
    );
  return told;
}

const nameTaken = (name: string): DeskError =>
  new DeskError('name-taken', `Another record set is called ${name} already. Choose another name.`, {
    errors: [{ pointer: '#/name', detail: 'is in use' }],
  });
