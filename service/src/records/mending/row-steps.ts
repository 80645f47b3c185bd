import type { RecordColumn, RecordTable } from '../../regression/records';
import { rowsText } from '../findings/finding';
import { repeatedRows } from '../findings/repeated-rows';
import { chosenRows, choiceText, countOf, requireChoice } from './chosen-rows';
import { Refusal, type Change, type StepOf } from './step-change';

function numbersAt(values: Float64Array, rows: Uint32Array): Float64Array {
  const kept = new Float64Array(rows.length);
  for (let at = 0; at < rows.length; at++) kept[at] = values[rows[at]];
  return kept;
}

function codesAt(codes: Int32Array, rows: Uint32Array): Int32Array {
  const kept = new Int32Array(rows.length);
  for (let at = 0; at < rows.length; at++) kept[at] = codes[rows[at]];
  return kept;
}

function textsAt(values: readonly (string | null)[], rows: Uint32Array): (string | null)[] {
  const kept: (string | null)[] = [];
  for (let at = 0; at < rows.length; at++) kept.push(values[rows[at]]);
  return kept;
}

/** Plain loops, one for each kind of array: `filter` takes ten times as long on a million rows. */
function columnAt(column: RecordColumn, rows: Uint32Array): RecordColumn {
  if (column.kind === 'category') return { ...column, codes: codesAt(column.codes, rows) };
  if (column.kind === 'text') return { ...column, values: textsAt(column.values, rows) };
  return { ...column, values: numbersAt(column.values, rows) };
}

/** The rows with a 0 only. */
function withoutRows(table: RecordTable, dropped: Uint8Array): RecordTable {
  const rowCount = table.rowCount - countOf(dropped);
  if (rowCount === 0) throw new Refusal('No row would be left.');
  if (rowCount === table.rowCount) return table;
  const kept = new Uint32Array(rowCount);
  let at = 0;
  for (let row = 0; row < dropped.length; row++) if (dropped[row] === 0) kept[at++] = row;
  return { rowCount, columns: table.columns.map((column) => columnAt(column, kept)) };
}

export function dropRows(table: RecordTable, step: StepOf<'drop-rows'>): Change {
  requireChoice(step);
  const chosen = chosenRows(table, step);
  const rowsConcerned = countOf(chosen);
  const told = `Dropped ${rowsText(rowsConcerned)}${choiceText(step)}.`;
  return { table: withoutRows(table, chosen), told, rowsConcerned };
}

export function dropRepeatedRows(table: RecordTable): Change {
  const rows = repeatedRows(table);
  const repeated = new Uint8Array(table.rowCount);
  for (const row of rows) repeated[row] = 1;
  const rowsConcerned = countOf(repeated);
  const told = `Dropped ${rowsText(rowsConcerned)} that repeated an earlier one in every column.`;
  return { table: withoutRows(table, repeated), told, rowsConcerned };
}
