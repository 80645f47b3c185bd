import type { NumericRecordColumn, RecordColumn, RecordTable } from '../../regression/records';
import { rowsText } from '../findings/finding';
import { maximumLevelLength, maximumLevels } from '../reading/limits';
import { bindNumber } from './formula-evaluation';
import { changeKind } from './set-kind';
import { columnOf, numericOf, Refusal, replaceColumn, requireNewName, type Change, type StepOf } from './step-change';

export function rename(table: RecordTable, step: StepOf<'rename'>): Change {
  const column = columnOf(table, step.column);
  const name = requireNewName(table, step.to);
  const told = `Renamed ${step.column} to ${name}.`;
  return { table: replaceColumn(table, step.column, { ...column, name }), told, rowsConcerned: null };
}

export function setAside(table: RecordTable, { column: name }: StepOf<'set-aside'>): Change {
  columnOf(table, name);
  if (table.columns.length === 1) throw new Refusal('No column would be left.');
  const columns = table.columns.filter((column) => column.name !== name);
  return { table: { ...table, columns }, told: `Set the column ${name} aside.`, rowsConcerned: null };
}

export function setUnit(table: RecordTable, step: StepOf<'set-unit'>): Change {
  const column = numericOf(table, step.column);
  const { unit } = step;
  const told = unit === null ? `Took the unit of ${step.column} away.` : `Set the unit of ${step.column} to ${unit}.`;
  const changed = { ...column, unit: unit ?? undefined };
  return { table: replaceColumn(table, step.column, changed), told, rowsConcerned: null };
}

const kindWords: Readonly<Record<RecordColumn['kind'], string>> = {
  numeric: 'a number',
  category: 'a category',
  date: 'a date',
  text: 'text',
};

const holdsSomething = (column: RecordColumn): boolean =>
  column.kind === 'numeric' || column.kind === 'date' ? column.values.some((value) => value === value) : true;

function requireFewLevels(column: RecordColumn): void {
  if (column.kind !== 'category') return;
  if (column.levels.length > maximumLevels)
    throw new Refusal(
      `${column.name} has ${column.levels.length.toLocaleString('en-GB')} different values; a category has at most ${maximumLevels.toLocaleString('en-GB')} levels.`,
    );
  if (column.levels.some((level) => level.length > maximumLevelLength))
    throw new Refusal(`${column.name} has a text of more than ${maximumLevelLength} characters, too long for a level.`);
}

export function setKind(table: RecordTable, step: StepOf<'set-kind'>): Change {
  const before = columnOf(table, step.column);
  const { column, unreadable } = changeKind(before, step.to, step.dateOrder);
  if (unreadable > 0 && !holdsSomething(column))
    throw new Refusal(`Nothing in ${step.column} can be read as ${kindWords[step.to]}.`);
  requireFewLevels(column);
  const lost = unreadable === 0 ? '' : `; ${rowsText(unreadable)} could not be read so and became missing`;
  const told = `Made ${step.column} ${kindWords[step.to]}${lost}.`;
  return { table: replaceColumn(table, step.column, column), told, rowsConcerned: null };
}

export function derive(table: RecordTable, step: StepOf<'derive'>): Change {
  const name = requireNewName(table, step.name);
  const of = bindNumber(step.formula, table);
  const values = new Float64Array(table.rowCount);
  for (let row = 0; row < values.length; row++) values[row] = of(row);
  const column: NumericRecordColumn = { name, kind: 'numeric', values, unit: step.unit ?? undefined };
  const missing = values.reduce((count, value) => (value === value ? count : count + 1), 0);
  const lacking = missing === 0 ? '' : `; ${rowsText(missing)} ${missing === 1 ? 'has' : 'have'} no value`;
  const told = `Added ${name} = ${step.formula}${lacking}.`;
  return { table: { ...table, columns: [...table.columns, column] }, told, rowsConcerned: null };
}
