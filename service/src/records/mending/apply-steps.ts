import type { components } from '../../../../openapi/types/desk';
import type { CategoryRecordColumn, NumericRecordColumn, RecordColumn, RecordTable } from '../../regression/records';
import { repeatedRows } from '../findings/repeated-rows';
import { rowsText } from '../findings/finding';
import { bindCondition, bindNumber } from './formula-evaluation';
import { FormulaError } from './formula-tokens';
import { changeKind } from './set-kind';

export type MendStep = components['schemas']['MendStep'];
type StepOf<Kind extends MendStep['kind']> = Extract<MendStep, { kind: Kind }>;

/** A step that cannot be done on the table as it then stands. */
export class StepProblem extends Error {
  constructor(
    readonly step: number,
    message: string,
  ) {
    super(message);
    this.name = 'StepProblem';
  }
}

class Refusal extends Error {}

export interface MendedTable {
  readonly table: RecordTable;
  /** What each step did, in a sentence. */
  readonly changes: readonly string[];
}

interface Change {
  readonly table: RecordTable;
  readonly told: string;
}

function columnOf(table: RecordTable, name: string): RecordColumn {
  const found = table.columns.find((column) => column.name === name);
  if (!found) throw new Refusal(`There is no column ${name} at this step.`);
  return found;
}

function numericOf(table: RecordTable, name: string): NumericRecordColumn {
  const column = columnOf(table, name);
  if (column.kind !== 'numeric')
    throw new Refusal(`${name} is a column of kind ${column.kind}; this step takes a numeric one.`);
  return column;
}

function categoryOf(table: RecordTable, name: string): CategoryRecordColumn {
  const column = columnOf(table, name);
  if (column.kind !== 'category')
    throw new Refusal(`${name} is a column of kind ${column.kind}; this step takes a category.`);
  return column;
}

function requireNewName(table: RecordTable, name: string): string {
  const trimmed = name.trim();
  if (trimmed === '' || table.columns.some((column) => column.name === trimmed))
    throw new Refusal(`A column is called ${name} already.`);
  return trimmed;
}

const replaceColumn = (table: RecordTable, name: string, column: RecordColumn): RecordTable => ({
  ...table,
  columns: table.columns.map((old) => (old.name === name ? column : old)),
});

interface RowChoice {
  readonly where?: string;
  readonly rows?: readonly number[];
}

/** The rows that a step is about: 1 where it applies. Both a condition and numbers must hold when both are given. */
function chosenRows(table: RecordTable, { where, rows }: RowChoice): Uint8Array {
  const beyond = rows?.find((row) => row > table.rowCount);
  if (beyond !== undefined)
    throw new Refusal(`There is no row ${beyond} at this step; the table has ${table.rowCount}.`);
  const listed = rows && new Set(rows);
  const holds = where === undefined ? () => true : bindCondition(where, table);
  return Uint8Array.from({ length: table.rowCount }, (_, row) =>
    (!listed || listed.has(row + 1)) && holds(row) ? 1 : 0,
  );
}

function requireChoice(step: RowChoice): void {
  if (step.where === undefined && step.rows === undefined)
    throw new Refusal('Say which rows, by “where” or by “rows”.');
}

const countOf = (chosen: Uint8Array): number => chosen.reduce((total, one) => total + one, 0);
const choiceText = ({ where, rows }: RowChoice): string =>
  where === undefined ? (rows ? ' (listed by number)' : '') : ` where ${where}`;

function keepRows(table: RecordTable, keep: Uint8Array): RecordTable {
  const rowCount = countOf(keep);
  if (rowCount === 0) throw new Refusal('No row would be left.');
  const kept = (column: RecordColumn): RecordColumn => {
    if (column.kind === 'category') return { ...column, codes: column.codes.filter((_, row) => keep[row] === 1) };
    if (column.kind === 'text') return { ...column, values: column.values.filter((_, row) => keep[row] === 1) };
    return { ...column, values: column.values.filter((_, row) => keep[row] === 1) };
  };
  return { rowCount, columns: table.columns.map(kept) };
}

function dropRows(table: RecordTable, step: StepOf<'drop-rows'>): Change {
  requireChoice(step);
  const chosen = chosenRows(table, step);
  const told = `Dropped ${rowsText(countOf(chosen))}${choiceText(step)}.`;
  return {
    table: keepRows(
      table,
      chosen.map((one) => 1 - one),
    ),
    told,
  };
}

function dropRepeated(table: RecordTable): Change {
  const rows = new Set(repeatedRows(table));
  const keep = Uint8Array.from({ length: table.rowCount }, (_, row) => (rows.has(row) ? 0 : 1));
  return {
    table: keepRows(table, keep),
    told: `Dropped ${rowsText(rows.size)} that repeated an earlier one in every column.`,
  };
}

function setMissing(table: RecordTable, step: StepOf<'set-missing'>): Change {
  requireChoice(step);
  const column = columnOf(table, step.column);
  const chosen = chosenRows(table, step);
  const told = `Set ${step.column} to missing in ${rowsText(countOf(chosen))}${choiceText(step)}.`;
  const emptied = (): RecordColumn => {
    if (column.kind === 'category')
      return withLevels(
        column,
        column.levels,
        column.codes.map((code, row) => (chosen[row] ? -1 : code)),
      );
    if (column.kind === 'text')
      return { ...column, values: column.values.map((text, row) => (chosen[row] ? null : text)) };
    return { ...column, values: column.values.map((value, row) => (chosen[row] ? NaN : value)) };
  };
  return { table: replaceColumn(table, step.column, emptied()), told };
}

function convertUnit(table: RecordTable, step: StepOf<'convert-unit'>): Change {
  const column = numericOf(table, step.column);
  const chosen = chosenRows(table, step);
  const values = column.values.map((value, row) => (chosen[row] ? value * step.factor : value));
  const unit = step.unit === undefined ? column.unit : (step.unit ?? undefined);
  const told = `Multiplied ${step.column} by ${step.factor} in ${rowsText(countOf(chosen))}${choiceText(step)}${step.unit ? `; its unit is ${step.unit}` : ''}.`;
  return { table: replaceColumn(table, step.column, { ...column, values, unit }), told };
}

/** Levels that are equal become one, and those that no row has any more are left out. */
function withLevels(column: CategoryRecordColumn, names: readonly string[], codes: Int32Array): CategoryRecordColumn {
  const levels: string[] = [];
  const newCodes = new Map<string, number>();
  const recoded = codes.map((code) => {
    if (code < 0) return -1;
    const name = names[code];
    const known = newCodes.get(name);
    if (known !== undefined) return known;
    newCodes.set(name, levels.push(name) - 1);
    return levels.length - 1;
  });
  return { ...column, levels, codes: recoded };
}

function mapLevels(table: RecordTable, step: StepOf<'map-levels'>): Change {
  const column = categoryOf(table, step.column);
  const map = new Map(Object.entries(step.levels));
  const unknown = [...map.keys()].find((level) => !column.levels.includes(level));
  if (unknown !== undefined) throw new Refusal(`${step.column} has no level “${unknown}” at this step.`);
  const names = column.levels.map((level) => map.get(level) ?? level);
  const changed = column.codes.filter((code) => code >= 0 && names[code] !== column.levels[code]).length;
  const told = `Mapped levels of ${step.column} (${[...map].map(([from, to]) => `“${from}” to “${to}”`).join(', ')}) in ${rowsText(changed)}.`;
  return { table: replaceColumn(table, step.column, withLevels(column, names, column.codes)), told };
}

function joinRare(table: RecordTable, step: StepOf<'join-rare-levels'>): Change {
  const column = categoryOf(table, step.column);
  const counts = new Array<number>(column.levels.length).fill(0);
  for (const code of column.codes) if (code >= 0) counts[code]++;
  const names = column.levels.map((level, code) => (counts[code] < step.fewerThan ? step.into : level));
  const joined = column.levels.filter((level, code) => names[code] !== level).length;
  const told = `Joined ${joined} levels of ${step.column} with fewer than ${step.fewerThan} rows into “${step.into}”.`;
  return { table: replaceColumn(table, step.column, withLevels(column, names, column.codes)), told };
}

function derive(table: RecordTable, step: StepOf<'derive'>): Change {
  const name = requireNewName(table, step.name);
  const of = bindNumber(step.formula, table);
  const values = Float64Array.from({ length: table.rowCount }, (_, row) => of(row));
  const column: NumericRecordColumn = { name, kind: 'numeric', values, unit: step.unit ?? undefined };
  return { table: { ...table, columns: [...table.columns, column] }, told: `Added ${name} = ${step.formula}.` };
}

const kindWords: Readonly<Record<RecordColumn['kind'], string>> = {
  numeric: 'a number',
  category: 'a category',
  date: 'a date',
  text: 'text',
};

function setKind(table: RecordTable, step: StepOf<'set-kind'>): Change {
  const { column, unreadable } = changeKind(columnOf(table, step.column), step.to, step.dateOrder);
  const lost = unreadable === 0 ? '' : `; ${rowsText(unreadable)} could not be read so and became missing`;
  return {
    table: replaceColumn(table, step.column, column),
    told: `Made ${step.column} ${kindWords[step.to]}${lost}.`,
  };
}

function setAside(table: RecordTable, name: string): Change {
  columnOf(table, name);
  if (table.columns.length === 1) throw new Refusal('No column would be left.');
  return {
    table: { ...table, columns: table.columns.filter((column) => column.name !== name) },
    told: `Set the column ${name} aside.`,
  };
}

function apply(table: RecordTable, step: MendStep): Change {
  switch (step.kind) {
    case 'rename': {
      const column = columnOf(table, step.column);
      const name = requireNewName(table, step.to);
      return {
        table: replaceColumn(table, step.column, { ...column, name }),
        told: `Renamed ${step.column} to ${name}.`,
      };
    }
    case 'set-unit': {
      const column = numericOf(table, step.column);
      const told =
        step.unit === null
          ? `Took the unit of ${step.column} away.`
          : `Set the unit of ${step.column} to ${step.unit}.`;
      return { table: replaceColumn(table, step.column, { ...column, unit: step.unit ?? undefined }), told };
    }
    case 'set-kind':
      return setKind(table, step);
    case 'set-aside':
      return setAside(table, step.column);
    case 'convert-unit':
      return convertUnit(table, step);
    case 'map-levels':
      return mapLevels(table, step);
    case 'set-missing':
      return setMissing(table, step);
    case 'drop-rows':
      return dropRows(table, step);
    case 'drop-repeated-rows':
      return dropRepeated(table);
    case 'join-rare-levels':
      return joinRare(table, step);
    case 'derive':
      return derive(table, step);
  }
}

/** Applies the steps one after another to a table, which itself stays as it is. Pure. */
export function applySteps(table: RecordTable, steps: readonly MendStep[]): MendedTable {
  const changes: string[] = [];
  let mended = table;
  steps.forEach((step, at) => {
    try {
      const change = apply(mended, step);
      mended = change.table;
      changes.push(change.told);
    } catch (error) {
      if (error instanceof Refusal || error instanceof FormulaError) throw new StepProblem(at, error.message);
      throw error;
    }
  });
  return { table: mended, changes };
}
