import type { Database } from '../database/database';
import type { ColumnFacts, RecordFacts } from './check-specification';

/** What a revision's columns hold, as far as checking a specification needs it. */
export class RevisionFactsStore {
  constructor(private readonly database: Database) {}

  async find(revisionId: string): Promise<RecordFacts | null> {
    const revision = (await this.database.connection('recordRevisions').where({ id: revisionId }).first('rowCount')) as
      { rowCount: number } | undefined;
    if (!revision) return null;
    const columns = (await this.database
      .connection('recordColumns')
      .where({ revisionId })
      .orderBy('position')
      .select('name', 'kind', 'missingCount', 'minimum')) as ColumnFacts[];
    return { rowCount: revision.rowCount, columns };
  }
}
