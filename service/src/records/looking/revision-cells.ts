import type { Database } from 'better-sqlite3';
import { cellsToNumbers, type ColumnKind } from '../cell-blocks';
import { RecordsMissingError, rowCountOf } from '../record-table-reader';
import { cellsAsShown, type CellValue } from '../revision-rows';

export interface StoredColumn {
  readonly position: number;
  readonly name: string;
  readonly kind: ColumnKind;
  readonly levels: readonly { readonly value: string }[];
}

/** A revision's cells, block by block, so that no more than a few blocks are in memory. For worker threads. */
export class RevisionCells {
  readonly columns: readonly StoredColumn[];
  /** Rows of each block, the same for every column. */
  readonly blockRowCounts: readonly number[];

  constructor(
    private readonly connection: Database,
    private readonly revisionId: string,
  ) {
    const columns = connection
      .prepare('SELECT position, name, kind, levels FROM record_columns WHERE revision_id = ? ORDER BY position')
      .all(revisionId) as (Omit<StoredColumn, 'levels'> & { readonly levels: string })[];
    this.columns = columns.map((column) => ({
      ...column,
      levels: JSON.parse(column.levels) as StoredColumn['levels'],
    }));
    this.blockRowCounts = connection
      .prepare('SELECT row_count FROM record_blocks WHERE revision_id = ? AND position = 0 ORDER BY block')
      .pluck()
      .all(revisionId) as number[];
    // Asked last: the levels go with the rows.
    rowCountOf(connection, revisionId);
  }

  column(name: string): StoredColumn {
    const found = this.columns.find((column) => column.name === name);
    if (!found) throw new RecordsMissingError(`The column ${name}`);
    return found;
  }

  /** One block of a numeric or date column; NaN is missing. */
  numbers({ position }: StoredColumn, block: number): Float64Array {
    return cellsToNumbers(this.cells(position, block));
  }

  /**
   * The rows at these positions (from 0, rising), all columns or those named. Cost: the blocks in which the rows
   * lie, one column after another.
   */
  rowsAt(positions: ArrayLike<number>, names?: readonly string[]): CellValue[][] {
    const columns = names ? names.map((name) => this.column(name)) : this.columns;
    const rows = Array.from(positions, (): CellValue[] => []);
    const parts = this.partsOf(positions);
    for (const column of columns) {
      for (const { block, begin, first, last } of parts) {
        const shown = cellsAsShown(column.kind, column.levels, this.cells(column.position, block));
        for (let at = first; at < last; at++) rows[at].push(shown(positions[at] - begin));
      }
    }
    return rows;
  }

  /** The blocks that the positions take, with the first and past-the-last of the positions in each. */
  private partsOf(
    positions: ArrayLike<number>,
  ): { readonly block: number; readonly begin: number; readonly first: number; readonly last: number }[] {
    let begin = 0;
    let at = 0;
    return this.blockRowCounts.flatMap((rowCount, block) => {
      const part = { block, begin, first: at };
      begin += rowCount;
      while (at < positions.length && positions[at] < begin) at++;
      return at > part.first ? [{ ...part, last: at }] : [];
    });
  }

  private cells(position: number, block: number): Buffer {
    const cells = this.connection
      .prepare('SELECT cells FROM record_blocks WHERE revision_id = ? AND position = ? AND block = ?')
      .pluck()
      .get(this.revisionId, position, block) as Buffer | undefined;
    if (!cells) throw new RecordsMissingError('A block of cells');
    return cells;
  }
}
