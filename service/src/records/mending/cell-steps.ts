import type { RecordColumn, RecordTable } from '../../regression/records';
import { rowsText } from '../findings/finding';
import { chosenRows, choiceText, countOf, requireChoice } from './chosen-rows';
import { withLevels } from './level-steps';
import { columnOf, numericOf, Refusal, replaceColumn, type Change, type StepOf } from './step-change';

function withoutCells(column: RecordColumn, chosen: Uint8Array): RecordColumn {
  if (column.kind === 'category') {
    const codes = column.codes.map((code, row) => (chosen[row] ? -1 : code));
    return withLevels(column, column.levels, codes);
  }
  if (column.kind === 'text')
    return { ...column, values: column.values.map((text, row) => (chosen[row] ? null : text)) };
  return { ...column, values: column.values.map((value, row) => (chosen[row] ? NaN : value)) };
}

export function setMissing(table: RecordTable, step: StepOf<'set-missing'>): Change {
  requireChoice(step);
  const column = columnOf(table, step.column);
  const chosen = chosenRows(table, step);
  const rowsConcerned = countOf(chosen);
  const told = `Set ${step.column} to missing in ${rowsText(rowsConcerned)}${choiceText(step)}.`;
  return { table: replaceColumn(table, step.column, withoutCells(column, chosen)), told, rowsConcerned };
}

export function convertUnit(table: RecordTable, step: StepOf<'convert-unit'>): Change {
  const column = numericOf(table, step.column);
  const { factor } = step;
  if (factor === 0) throw new Refusal('The factor must not be 0: every reading would become 0.');
  const chosen = chosenRows(table, step);
  const values = column.values.map((value, row) => (chosen[row] ? value * factor : value));
  if (values.some((value) => value === Infinity || value === -Infinity))
    throw new Refusal(`${step.column} times ${factor} is beyond what a number can hold.`);
  const unit = step.unit === undefined ? column.unit : (step.unit ?? undefined);
  const rowsConcerned = countOf(chosen);
  const told = `Multiplied ${step.column} by ${factor} in ${rowsText(rowsConcerned)}${choiceText(step)}${step.unit ? `; its unit is ${step.unit}` : ''}.`;
  return { table: replaceColumn(table, step.column, { ...column, values, unit }), told, rowsConcerned };
}
