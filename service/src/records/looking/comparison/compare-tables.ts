import type { CellValue } from '../../revision-rows';
import { shapeOf, type ColumnShape } from './column-shape';
import { comparableCells, sharedNames, shownCells, type ComparedColumn, type ComparedTable } from './compared-table';
import { findKey, matchByKey, possibleKeys } from './keys';
import { OrderMatcher } from './match-by-order';
import { addedRows, removedRows, type RowMatching } from './row-matching';
import { nameRows } from './row-names';

export interface CellChange {
  readonly column: string;
  readonly from: CellValue;
  readonly to: CellValue;
}

export interface RowChange {
  readonly fromRow: number;
  readonly toRow: number;
  readonly cells: readonly CellChange[];
}

export interface ComparedNames {
  readonly name: string;
  readonly state: 'same' | 'changed' | 'added' | 'removed';
  readonly changedCount: number | null;
  readonly shape: ColumnShape | null;
}

export interface TableComparison {
  readonly key: string | null;
  readonly keys: readonly string[];
  readonly rows: {
    readonly added: number;
    readonly removed: number;
    readonly changed: number;
    readonly unchanged: number;
  };
  readonly changes: readonly RowChange[];
  readonly added: readonly number[];
  readonly removed: readonly number[];
  readonly columns: readonly ComparedNames[];
}

/** A key was named that does not name the rows of both. */
export interface KeyProblem {
  readonly keys: readonly string[];
}

/** Rows that an answer lists of each sort. */
const listedRows = 100;

/** Changes of single cells, told a column at a time. */
class ChangedCells {
  /** 1 for every row of `to` that changed. */
  readonly rows: Uint8Array;
  /**
   * The first changes of each column. A row among the first hundred that changed has fewer than a hundred changed
   * rows before it in any column, so no cell of it is missing here.
   */
  private readonly cells = new Map<number, CellChange[]>();

  constructor(private readonly matching: RowMatching) {
    this.rows = new Uint8Array(matching.length);
  }

  /** Compares one column in all matched rows; the number of rows in which it changed. */
  add(name: string, from: ReturnType<ComparedTable['read']>, to: ReturnType<ComparedTable['read']>): number {
    const [before, after] = comparableCells(from, to);
    const [shownBefore, shownAfter] = [shownCells(from), shownCells(to)];
    let count = 0;
    for (let row = 0; row < this.matching.length; row++) {
      const twin = this.matching[row];
      if (twin < 0 || before(twin) === after(row)) continue;
      this.rows[row] = 1;
      if (++count <= listedRows) this.keep(row, { column: name, from: shownBefore(twin), to: shownAfter(row) });
    }
    return count;
  }

  first(): RowChange[] {
    return [...this.cells.keys()]
      .sort((a, b) => a - b)
      .slice(0, listedRows)
      .map((row) => ({ fromRow: this.matching[row] + 1, toRow: row + 1, cells: this.cells.get(row) ?? [] }));
  }

  private keep(row: number, change: CellChange): void {
    const known = this.cells.get(row);
    if (known) known.push(change);
    else this.cells.set(row, [change]);
  }
}

function match(
  from: ComparedTable,
  to: ComparedTable,
  keys: readonly string[],
  asked: string | null,
): { readonly key: string | null; readonly matching: RowMatching } {
  if (asked !== null && asked !== '') return { key: asked, matching: matchByKey(from, to, asked) };
  const found = asked === null ? findKey(from, to, keys) : null;
  return found ?? { key: null, matching: new OrderMatcher(nameRows(from, to)).match() };
}

function compareColumn(from: ComparedTable, to: ComparedTable, name: string, changed: ChangedCells): ComparedNames {
  const [before, after] = [from.read(name), to.read(name)];
  const changedCount = changed.add(name, before, after);
  const facts = ({ columns }: ComparedTable): ComparedColumn | undefined => columns.find((one) => one.name === name);
  const [old, now] = [facts(from), facts(to)];
  const same = changedCount === 0 && old?.kind === now?.kind && old?.unit === now?.unit;
  return { name, state: same ? 'same' : 'changed', changedCount, shape: shapeOf(before, after) };
}

/** The columns of `to` in their order, then those that only `from` has. */
function compareColumns(from: ComparedTable, to: ComparedTable, changed: ChangedCells): ComparedNames[] {
  const shared = new Set(sharedNames(from, to));
  const alone = (name: string, state: 'added' | 'removed'): ComparedNames => ({
    ...{ name, state, changedCount: null, shape: null },
  });
  return [
    ...to.columns.map(({ name }) => (shared.has(name) ? compareColumn(from, to, name, changed) : alone(name, 'added'))),
    ...from.columns.filter(({ name }) => !shared.has(name)).map(({ name }) => alone(name, 'removed')),
  ];
}

const numbersOf = (positions: Uint32Array): number[] =>
  Array.from(positions.subarray(0, listedRows), (position) => position + 1);

/**
 * What became of the rows of `from` in `to`. Rows are matched by the key asked for, by one that is found (null), or
 * by their order (an empty key); a matched row has changed when a cell of a column that both have has. Cost: a few
 * passes over the columns, one of each side in memory at a time, and up to 150 bytes a row.
 */
export function compareTables(
  from: ComparedTable,
  to: ComparedTable,
  asked: string | null,
): TableComparison | KeyProblem {
  const keys = possibleKeys(from, to);
  if (asked !== null && asked !== '' && !keys.includes(asked)) return { keys };
  const { key, matching } = match(from, to, keys, asked);
  const changed = new ChangedCells(matching);
  const columns = compareColumns(from, to, changed);
  const [added, removed] = [addedRows(matching), removedRows(matching, from.rowCount)];
  const changedCount = changed.rows.reduce((total, one) => total + one, 0);
  const unchanged = to.rowCount - added.length - changedCount;
  return {
    ...{ key, keys, columns },
    rows: { added: added.length, removed: removed.length, changed: changedCount, unchanged },
    changes: changed.first(),
    added: numbersOf(added),
    removed: numbersOf(removed),
  };
}
