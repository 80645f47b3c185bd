import type { Database } from '../../database/database';
import { nameKeyOf } from '../records-store';

export interface SetWords {
  readonly name: string;
  readonly description: string;
  readonly retainUntil: string | null;
  readonly changedAt: string;
}

export interface RestingEdition {
  readonly id: string;
  readonly number: number;
  readonly estimatorSlug: string;
  readonly estimatorName: string;
}

export interface RestingFit {
  readonly id: string;
  readonly state: string;
  readonly estimatorSlug: string;
  readonly estimatorName: string;
}

export interface DueSet {
  readonly id: string;
  readonly name: string;
  readonly retainUntil: string;
}

/** What rests on revisions, and the changes that let revisions or their rows go. Cells are cleared by `CellStorage`. */
export class KeepingStore {
  constructor(private readonly database: Database) {}

  async changeSet(id: string, words: SetWords): Promise<void> {
    await this.database
      .connection('recordSets')
      .where({ id })
      .update({ ...words, nameKey: nameKeyOf(words.name) });
  }

  /** Of any state, through the fits that they were made from. */
  async editionsOn(revisionId: string): Promise<RestingEdition[]> {
    return (await this.database
      .connection('editions')
      .join('fits', 'fits.id', 'editions.fitId')
      .join('estimators', 'estimators.id', 'editions.estimatorId')
      .where({ 'fits.revisionId': revisionId })
      .orderBy(['estimators.slug', 'editions.number'])
      .select('editions.id', 'editions.number')
      .select('estimators.slug as estimatorSlug', 'estimators.name as estimatorName')) as RestingEdition[];
  }

  async fitsOn(revisionId: string): Promise<RestingFit[]> {
    return (await this.database
      .connection('fits')
      .join('estimators', 'estimators.id', 'fits.estimatorId')
      .where({ 'fits.revisionId': revisionId })
      .orderBy(['fits.createdAt', 'fits.id'])
      .select('fits.id', 'fits.state')
      .select('estimators.slug as estimatorSlug', 'estimators.name as estimatorName')) as RestingFit[];
  }

  /** Numbers of the revisions mended from it or appended to it. */
  async numbersBasedOn(revisionId: string): Promise<number[]> {
    const rows = (await this.database
      .connection('recordRevisions')
      .where({ mendedFrom: revisionId })
      .orWhere({ appendedTo: revisionId })
      .orderBy('number')
      .select('number')) as { number: number }[];
    return rows.map((row) => row.number);
  }

  /** Whether a revision other than this one has the same original file. */
  async originalIsShared(originalPath: string, revisionId: string): Promise<boolean> {
    const other = await this.database
      .connection('recordRevisions')
      .where({ originalPath })
      .whereNot({ id: revisionId })
      .first('id');
    return other !== undefined;
  }

  /** The revision with its fits, drafts and columns. */
  async removeRevision(revisionId: string): Promise<void> {
    const { connection } = this.database;
    for (const table of ['fits', 'mendingDrafts', 'recordColumns'])
      await connection(table).where({ revisionId }).delete();
    await connection('recordRevisions').where({ id: revisionId }).delete();
  }

  async removeSet(id: string): Promise<void> {
    await this.database.connection('recordSets').where({ id }).delete();
  }

  /** Sets to be kept no longer than a day before `today`, that still have rows. */
  async setsDue(today: string): Promise<DueSet[]> {
    const { connection } = this.database;
    return (await connection('recordSets')
      .where('retainUntil', '<', today)
      .whereExists(
        connection('recordRevisions')
          .whereRaw('record_revisions.record_set_id = record_sets.id')
          .whereNull('erasedAt')
          .select('id'),
      )
      .orderBy('id')
      .select('id', 'name', 'retainUntil')) as DueSet[];
  }

  /** Takes away all that tells of single rows: figures, levels, steps and drafts of mending. Names and kinds stay. */
  async erase(revisionId: string, erasedAt: string): Promise<void> {
    const { connection } = this.database;
    const figures = ['distinctCount', 'minimum', 'maximum', 'mean', 'standardDeviation', 'quantiles', 'outlying'];
    const nothing = Object.fromEntries([...figures, 'histogram'].map((figure) => [figure, null]));
    await connection('recordColumns')
      .where({ revisionId })
      .update({ ...nothing, levels: '[]' });
    await connection('mendingDrafts').where({ revisionId }).delete();
    await connection('recordRevisions').where({ id: revisionId }).update({ erasedAt });
    // Steps name levels and values, so they go too; that there was a mending stays.
    const mending = JSON.stringify({ steps: [], changes: ['The steps were erased with the rows.'] });
    await connection('recordRevisions').where({ id: revisionId }).whereNotNull('mending').update({ mending });
  }

  /** Erased revisions whose cells are there still, because a process was killed before they were cleared. */
  async erasedWithCells(): Promise<string[]> {
    const { connection } = this.database;
    const erased = connection('recordRevisions').whereNotNull('erasedAt').select('id');
    const rows = (await connection('recordBlocks').whereIn('revisionId', erased).distinct('revisionId')) as {
      revisionId: string;
    }[];
    return rows.map((row) => row.revisionId);
  }

  /** Names of the original files that belong to erased revisions alone. */
  async erasedOriginals(): Promise<string[]> {
    const { connection } = this.database;
    const kept = connection('recordRevisions').whereNull('erasedAt').select('originalPath');
    const rows = (await connection('recordRevisions')
      .whereNotNull('erasedAt')
      .whereNotIn('originalPath', kept)
      .distinct('originalPath')) as { originalPath: string }[];
    return rows.map((row) => row.originalPath);
  }
}
