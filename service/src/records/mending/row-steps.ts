import type { RecordColumn, RecordTable } from '../../regression/records';
import { rowsText } from '../findings/finding';
import { repeatedRows } from '../findings/repeated-rows';
import { chosenRows, choiceText, countOf, requireChoice } from './chosen-rows';
import { Refusal, type Change, type StepOf } from './step-change';

/** The rows with a 0 only. */
function withoutRows(table: RecordTable, dropped: Uint8Array): RecordTable {
  const rowCount = table.rowCount - countOf(dropped);
  if (rowCount === 0) throw new Refusal('No row would be left.');
  if (rowCount === table.rowCount) return table;
  const stays = (_: unknown, row: number): boolean => dropped[row] === 0;
  const kept = (column: RecordColumn): RecordColumn => {
    if (column.kind === 'category') return { ...column, codes: column.codes.filter(stays) };
    if (column.kind === 'text') return { ...column, values: column.values.filter(stays) };
    return { ...column, values: column.values.filter(stays) };
  };
  return { rowCount, columns: table.columns.map(kept) };
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
