import type { FinishedColumn } from './reading/finished-column';
import type { RecordsStore } from './records-store';

/** Cells that were stored out of the spill file while it was still being written. */
export interface StoredBlock {
  readonly position: number;
  readonly block: number;
  /** In the spill file. */
  readonly offset: number;
}

export interface SpilledTable {
  readonly columns: readonly FinishedColumn[];
  /** Rows of each block, the same for every column. */
  readonly blockRowCounts: readonly number[];
  /** What is stored already, whether or not it is what the table holds in the end. */
  readonly stored?: readonly StoredBlock[];
}

/**
 * Stores what is known of a revision's columns, once their cells are there (`CellStorage.storeAhead`). Called inside
 * the unit of work that inserts the revision's row: that all the cells are there is checked here, since no foreign
 * key could.
 */
export async function storeColumns(
  records: RecordsStore,
  revisionId: string,
  { columns, blockRowCounts }: SpilledTable,
): Promise<void> {
  for (const column of columns) await records.insertColumn(revisionId, column);
  const stored = await records.countBlocks(revisionId);
  const expected = columns.length * blockRowCounts.length;
  if (stored !== expected) throw new Error(`${stored} of ${expected} blocks of revision ${revisionId} are stored.`);
}
