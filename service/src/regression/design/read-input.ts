import { RegressionError } from '../errors';
import type { CategoryRecordColumn, RecordColumn, RecordTable } from '../records';
import type { InputKind } from '../specification';
import type { ResolvedInput } from './resolve-specification';

/** Readings of one input for the records in use (missing: NaN or code −1). */
export interface InputReadings {
  readonly input: ResolvedInput;
  readonly kind: InputKind;
  readonly unit: string | null;
  /** Transformed (for a spline: as recorded); empty for a category. */
  readonly values: Float64Array;
  /** As recorded; empty for a category. */
  readonly recorded: Float64Array;
  /** Empty for numbers and days. */
  readonly codes: Int32Array;
  readonly levels: readonly string[];
  readonly missingCount: number;
}

export function findColumn(records: RecordTable, name: string): RecordColumn {
  const column = records.columns.find((candidate) => candidate.name === name);
  if (column === undefined) throw new RegressionError('column-not-found', `The records have no column ${name}.`, name);
  return column;
}

export function readInput(records: RecordTable, input: ResolvedInput, rows: Int32Array): InputReadings {
  const column = findColumn(records, input.column);
  const kind = input.kind ?? (column.kind === 'text' ? null : column.kind);
  if (kind === null || (kind !== 'category' && column.kind === 'category')) {
    throw new RegressionError(
      'column-kind-unsuitable',
      `${column.name} is a ${column.kind} column; it cannot be read as ${kind ?? 'an input'}.`,
      column.name,
    );
  }
  return kind === 'category' ? readCategory(column, input, rows) : readNumbers(column, kind, input, rows);
}

function readNumbers(column: RecordColumn, kind: InputKind, input: ResolvedInput, rows: Int32Array): InputReadings {
  const all = numbersOf(column, 'input');
  // Rows stand in their order, so as many as there are means all: no copy, which costs more than the reading itself.
  const recorded = rows.length === all.length ? all : pick(all, rows);
  let missingCount = 0;
  for (let at = 0; at < recorded.length; at += 1) {
    const value = recorded[at];
    // Finite less itself is 0; NaN and infinity are not.
    if (value - value === 0) continue;
    if (!Number.isNaN(value)) throw notFinite(input.column, rows[at]);
    missingCount += 1;
    refuseMissing(input, rows[at]);
  }
  if (missingCount === recorded.length) {
    throw new RegressionError('no-usable-input', `${input.column} is missing in every record.`, input.column);
  }
  const plain = input.transform === 'none' || input.transform === 'spline';
  if (!plain) recorded.forEach((value, at) => refuseTransform(input, value, rows[at]));
  const values = plain ? recorded : recorded.map(transformOf(input.transform));
  return { input, kind, unit: unitOf(column), values, recorded, codes: new Int32Array(0), levels: [], missingCount };
}

function refuseMissing(input: ResolvedInput, row: number): void {
  if (input.missing === 'typical') return;
  throw new RegressionError(
    'missing-value',
    `${input.column} is missing in row ${row + 1}. Fill it, filter the record out, or choose the rule "typical" for this input.`,
    input.column,
  );
}

function refuseTransform(input: ResolvedInput, value: number, row: number): void {
  const possible = input.transform === 'log' ? value > 0 : value >= 0;
  if (possible || Number.isNaN(value)) return;
  throw new RegressionError(
    'transform-not-possible',
    `${input.column} is ${value} in row ${row + 1}: no ${input.transform} of it exists.`,
    input.column,
  );
}

/** The transform as a function of one reading; a spline's basis is made from the reading itself. */
export function transformOf(transform: ResolvedInput['transform']): (value: number) => number {
  if (transform === 'log') return Math.log;
  if (transform === 'square-root') return Math.sqrt;
  return (value) => value;
}

function readCategory(column: RecordColumn, input: ResolvedInput, rows: Int32Array): InputReadings {
  if (input.transform !== 'none' || input.sign !== 'any') {
    throw new RegressionError(
      'bad-specification',
      `${input.column} is a category: it takes no transform and no limit on the sign.`,
      input.column,
    );
  }
  const category = asCategory(column);
  const codes = Int32Array.from(rows, (row) => category.codes[row]);
  const missingAt = codes.indexOf(-1);
  if (missingAt >= 0) refuseMissing(input, rows[missingAt]);
  const used = usedLevels(codes, category.levels);
  const none = new Float64Array(0);
  const missingCount = codes.reduce((count, code) => count + (code < 0 ? 1 : 0), 0);
  return { input, kind: 'category', unit: null, values: none, recorded: none, ...used, missingCount };
}

/** Levels that no record in use holds are dropped; their order stays. */
function usedLevels(codes: Int32Array, levels: readonly string[]): { codes: Int32Array; levels: readonly string[] } {
  const seen = new Uint8Array(levels.length);
  codes.forEach((code) => {
    if (code >= 0) seen[code] = 1;
  });
  const position = new Int32Array(levels.length).fill(-1);
  const kept = levels.filter((_, code) => seen[code] === 1);
  let next = 0;
  levels.forEach((_, code) => {
    if (seen[code] === 1) position[code] = next++;
  });
  return { codes: codes.map((code) => (code < 0 ? -1 : position[code])), levels: kept };
}

function asCategory(column: RecordColumn): CategoryRecordColumn {
  if (column.kind === 'category') return column;
  if (column.kind === 'numeric') return numbersAsCategory(column.name, column.values);
  throw new RegressionError(
    'column-kind-unsuitable',
    `${column.name} is a ${column.kind} column and cannot be read as a category.`,
    column.name,
  );
}

function numbersAsCategory(name: string, values: Float64Array): CategoryRecordColumn {
  const distinct = [...new Set(values)].filter((value) => !Number.isNaN(value)).sort((first, second) => first - second);
  const position = new Map(distinct.map((value, index) => [value, index]));
  const codes = Int32Array.from(values, (value) => position.get(value) ?? -1);
  return { name, kind: 'category', codes, levels: distinct.map(String) };
}

export function numbersOf(column: RecordColumn, use: string): Float64Array {
  if (column.kind === 'numeric' || (column.kind === 'date' && use === 'input')) return column.values;
  throw new RegressionError(
    'column-kind-unsuitable',
    `${column.name} is a ${column.kind} column and cannot be the ${use}.`,
    column.name,
  );
}

export function unitOf(column: RecordColumn): string | null {
  return column.kind === 'numeric' ? (column.unit ?? null) : null;
}

export function notFinite(column: string, row: number): RegressionError {
  return new RegressionError('value-not-finite', `${column} is not a finite number in row ${row + 1}.`, column);
}

export function pick(values: Float64Array, rows: Int32Array): Float64Array {
  const picked = new Float64Array(rows.length);
  for (let at = 0; at < rows.length; at += 1) picked[at] = values[rows[at]];
  return picked;
}
