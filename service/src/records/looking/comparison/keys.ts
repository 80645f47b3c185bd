import type { RecordColumn } from '../../../regression/records';
import { comparableCells, sharedNames, type Cells, type ComparedTable } from './compared-table';
import type { RowMatching } from './row-matching';

function everyDifferent(cells: Cells, rowCount: number): boolean {
  const seen = new Set<number | string>();
  for (let row = 0; row < rowCount; row++) {
    const value = cells(row);
    if (value === null || seen.has(value)) return false;
    seen.add(value);
  }
  return true;
}

/** By the column's figures; only where its different values were too many to count is the column read. */
function namesRows(table: ComparedTable, name: string): boolean {
  const column = table.columns.find((one) => one.name === name);
  if (!column || column.missingCount > 0 || table.rowCount === 0) return false;
  if (column.distinctCount !== null) return column.distinctCount === table.rowCount;
  const read = table.read(name);
  return everyDifferent(comparableCells(read, read)[0], table.rowCount);
}

/** Columns that could be the key: in both, never missing, never repeated. */
export const possibleKeys = (from: ComparedTable, to: ComparedTable): string[] =>
  sharedNames(from, to).filter((name) => namesRows(from, name) && namesRows(to, name));

/** Rows with the same value in the key. Cost: one pass over each side, with a table of the values of one. */
export function matchByKey(from: ComparedTable, to: ComparedTable, key: string): RowMatching {
  const [before, after] = comparableCells(from.read(key), to.read(key));
  const rows = new Map<number | string | null, number>();
  for (let row = 0; row < from.rowCount; row++) rows.set(before(row), row);
  return Int32Array.from({ length: to.rowCount }, (_, row) => rows.get(after(row)) ?? -1);
}

/** Words, days and whole numbers name cases; a number with decimals is a measure that happens not to repeat. */
function canBeName(column: RecordColumn): boolean {
  return column.kind !== 'numeric' || column.values.every((value) => Number.isInteger(value));
}

/** Of the smaller side: a column that links fewer rows names different things in the two. */
const fewestLinked = 0.5;

/** The earliest of the possible keys that names cases and links the two sides. */
export function findKey(
  from: ComparedTable,
  to: ComparedTable,
  keys: readonly string[],
): { readonly key: string; readonly matching: RowMatching } | null {
  for (const key of keys) {
    if (!canBeName(to.read(key))) continue;
    const matching = matchByKey(from, to, key);
    let linked = 0;
    for (const row of matching) if (row >= 0) linked++;
    if (linked >= fewestLinked * Math.min(from.rowCount, to.rowCount)) return { key, matching };
  }
  return null;
}
