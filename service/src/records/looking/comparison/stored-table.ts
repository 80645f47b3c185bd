import type { Database } from 'better-sqlite3';
import { readRecordTableWith } from '../../record-table-reader';
import type { ComparedColumn, ComparedTable } from './compared-table';

/** A stored revision as one side of a comparison. Every reading of a column goes to the database. */
export function storedTable(connection: Database, revisionId: string): ComparedTable {
  const columns = connection
    .prepare(
      `SELECT name, kind, unit, missing_count AS missingCount, distinct_count AS distinctCount
       FROM record_columns WHERE revision_id = ? ORDER BY position`,
    )
    .all(revisionId) as ComparedColumn[];
  return {
    rowCount: readRecordTableWith(connection, revisionId, []).rowCount,
    columns,
    read: (name) => readRecordTableWith(connection, revisionId, [name]).columns[0],
  };
}
