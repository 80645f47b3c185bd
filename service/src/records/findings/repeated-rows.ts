import type { RecordTable } from '../../regression/records';
import { ChanceOfEquals } from './chance-of-equals';
import { listRows, rowsText, type Finding } from './finding';
import { RowHashes } from './row-hashes';

/** With fewer columns equal rows are to be expected. */
const fewestColumns = 4;
/** Above this share equal rows are how the table is, not a slip. */
const largestShare = 0.1;
/**
 * Equal rows are told when chance would bring about no more than this share of them; nearly equal ones when still
 * less, since columns that go together agree more often than the reckoning says (both limits ours).
 */
const largestChance = { whole: 0.5, nearly: 0.01 };

/** Rows that repeat an earlier one in every column; positions counted from 0. */
export const repeatedRows = (table: RecordTable): number[] => new RowHashes(table).repeats(table.columns);

/** Rows that repeat an earlier row in everything, or in everything but one column. Cost: rows × columns. */
export function findRepeatedRows(table: RecordTable): Finding[] {
  if (table.columns.length < fewestColumns) return [];
  const hashes = new RowHashes(table);
  const chance = new ChanceOfEquals(table);
  const whole = hashes.repeats(table.columns);
  // Where whole rows come back so often, as in matched samples, nearly equal ones are how the table is as well.
  if (whole.length > largestShare * table.rowCount) return wholly(whole, chance);
  const known = new Set(whole);
  return [
    ...wholly(whole, chance),
    ...table.columns.flatMap((_, position) => nearly({ table, hashes, chance, known }, position)),
  ];
}

function wholly(rows: readonly number[], chance: ChanceOfEquals): Finding[] {
  if (rows.length === 0 || chance.expectedPairs() > largestChance.whole * rows.length) return [];
  return [
    {
      kind: 'repeated-rows',
      columns: [],
      message: `${rowsText(rows.length)} repeat${rows.length === 1 ? 's' : ''} an earlier row in every column.`,
      remedy: 'Drop them, unless the same case truly came up again.',
      ...listRows(rows),
      steps: [{ kind: 'drop-repeated-rows' }],
    },
  ];
}

interface Searched {
  readonly table: RecordTable;
  readonly hashes: RowHashes;
  readonly chance: ChanceOfEquals;
  readonly known: ReadonlySet<number>;
}

function nearly({ table, hashes, chance, known }: Searched, position: number): Finding[] {
  hashes.addColumn(position, -1);
  const others = table.columns.filter((_, other) => other !== position);
  const rows = hashes.repeats(others).filter((row) => !known.has(row));
  hashes.addColumn(position, 1);
  if (rows.length === 0 || rows.length > largestShare * table.rowCount) return [];
  if (chance.expectedPairs(position) > largestChance.nearly * rows.length) return [];
  const { name } = table.columns[position];
  return [
    {
      kind: 'nearly-repeated-rows',
      columns: [name],
      message: `${rowsText(rows.length)} repeat${rows.length === 1 ? 's' : ''} an earlier row in every column but ${name}.`,
      remedy: `Look at ${name} in these rows: one of the two may be a correction of the other. Drop the one that is wrong.`,
      ...listRows(rows),
    },
  ];
}
