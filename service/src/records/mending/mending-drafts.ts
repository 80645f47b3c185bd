import type { components } from '../../../../openapi/types/desk';
import { timeText, type Clock } from '../../clock';
import type { Database } from '../../database/database';
import type { RecordsStore } from '../records-store';
import { revisionWithRows } from '../required-rows';
import type { MendingDraftsStore } from './mending-drafts-store';
import type { MendStep } from './step-change';

type Draft = components['schemas']['MendingDraft'];

export interface MendingDraftsParts {
  readonly database: Database;
  readonly records: Pick<RecordsStore, 'findRevision'>;
  readonly drafts: MendingDraftsStore;
  readonly clock: Clock;
}

/** Keeps the steps that a person is working on, so that they outlast the page; each person has their own. */
export class MendingDrafts {
  constructor(private readonly parts: MendingDraftsParts) {}

  async read(personId: string, revisionId: string): Promise<Draft> {
    await revisionWithRows(this.parts.records, revisionId);
    const draft = await this.parts.drafts.find(revisionId, personId);
    return draft ? { steps: [...draft.steps], changedAt: draft.changedAt } : { steps: [], changedAt: null };
  }

  /** With no steps there is no draft any more. No journal: it is a person's own scratch paper. */
  async keep(personId: string, revisionId: string, steps: readonly MendStep[]): Promise<Draft> {
    const { database, records, drafts, clock } = this.parts;
    await database.unitOfWork(async () => {
      await revisionWithRows(records, revisionId);
      if (steps.length === 0) await drafts.remove(revisionId, personId);
      else await drafts.keep(revisionId, personId, { steps, changedAt: timeText(clock) });
    });
    return this.read(personId, revisionId);
  }
}
