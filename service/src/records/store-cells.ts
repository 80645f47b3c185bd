import type { FinishedColumn } from './reading/finished-column';
import { SpillFile } from './reading/spill-file';
import type { RecordsStore } from './records-store';

export interface SpilledTable {
  readonly columns: readonly FinishedColumn[];
  /** Rows of each block, the same for every column. */
  readonly blockRowCounts: readonly number[];
}

/** Stores a revision's columns, their cells block by block out of the spill file. Called inside a unit of work. */
export async function storeCells(
  records: RecordsStore,
  revisionId: string,
  { columns, blockRowCounts }: SpilledTable,
  spillPath: string,
): Promise<void> {
  const spill = new SpillFile(spillPath, 'r');
  try {
    for (const column of columns) {
      await records.insertColumn(revisionId, column);
      for (const [block, place] of column.blocks.entries()) {
        const { position } = column;
        await records.insertBlock({
          revisionId,
          position,
          block,
          rowCount: blockRowCounts[block],
          cells: spill.read(place),
        });
      }
    }
  } finally {
    spill.close();
  }
}
