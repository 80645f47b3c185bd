import type { Database } from '../database/database';
import type { ColumnFacts, RecordFacts } from './check-specification';

export interface RevisionFacts extends RecordFacts {
  readonly number: number;
  readonly recordSetName: string;
  readonly erasedAt: string | null;
}

/** What a revision's columns hold, as far as checking a specification needs it. */
export class RevisionFactsStore {
  constructor(private readonly database: Database) {}

  async find(revisionId: string): Promise<RevisionFacts | null> {
    const revision = (await this.database
      .connection('recordRevisions')
      .join('recordSets', 'recordSets.id', 'recordRevisions.recordSetId')
      .where({ 'recordRevisions.id': revisionId })
      .select('recordRevisions.rowCount', 'recordRevisions.number', 'recordRevisions.erasedAt')
      .first('recordSets.name as recordSetName')) as Omit<RevisionFacts, 'columns'> | undefined;
    if (!revision) return null;
    const columns = (await this.database
      .connection('recordColumns')
      .where({ revisionId })
      .orderBy('position')
      .select('name', 'kind', 'missingCount', 'minimum')) as ColumnFacts[];
    return { ...revision, columns };
  }
}
