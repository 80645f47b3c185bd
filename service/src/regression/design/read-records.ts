import { RegressionError } from '../errors';
import type { CategoryRecordColumn, RecordColumn, RecordTable } from '../records';
import type { InputKind } from '../specification';
import type { ResolvedInput, ResolvedSpecification } from './resolve-specification';
import { keptRows } from './row-filter';

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

/** The records in use: those that pass the filter, have a target, and weigh more than 0. */
export interface ReadRecords {
  readonly count: number;
  /** Row of the table that each record came from. */
  readonly rows: Int32Array;
  readonly inputs: readonly InputReadings[];
  /** On the additive scale. */
  readonly target: Float64Array;
  readonly targetRecorded: Float64Array;
  readonly targetUnit: string | null;
  /** Scaled to sum to `count`. */
  readonly weights: Float64Array;
  readonly weightSum: number;
  readonly warnings: readonly string[];
}

export function findColumn(records: RecordTable, name: string): RecordColumn {
  const column = records.columns.find((candidate) => candidate.name === name);
  if (column === undefined) throw new RegressionError('column-not-found', `The records have no column ${name}.`, name);
  return column;
}

/** Reads and checks everything that the specification names. Throws RegressionError with the column's name. */
export function readRecords(records: RecordTable, specification: ResolvedSpecification): ReadRecords {
  const filtered = keptRows(records, specification.rowFilter);
  const target = numbersOf(findColumn(records, specification.target.column), 'target');
  const weights = specification.weightColumn === null ? null : numbersOf(findColumn(records, specification.weightColumn), 'weight');
  const withTarget = filtered.filter((row) => !Number.isNaN(target[row]));
  const rows = withTarget.filter((row) => weights === null || usableWeight(weights[row], specification.weightColumn, row) > 0);
  if (rows.length < 2) {
    throw new RegressionError('too-few-records', `Only ${rows.length} record(s) have a target and a weight above 0; a fit needs at least 2.`);
  }
  const targetRecorded = pick(target, rows);
  const scaled = scaledWeights(weights, rows);
  return {
    count: rows.length,
    rows,
    inputs: specification.inputs.map((input) => readInput(records, input, rows)),
    target: additiveTarget(targetRecorded, specification, rows),
    targetRecorded,
    targetUnit: unitOf(findColumn(records, specification.target.column)),
    ...scaled,
    warnings: droppedWarnings(filtered.length, withTarget.length, rows.length),
  };
}

function droppedWarnings(filtered: number, withTarget: number, used: number): readonly string[] {
  const warnings: string[] = [];
  if (withTarget < filtered) warnings.push(`${filtered - withTarget} record(s) without a target were left out.`);
  if (used < withTarget) warnings.push(`${withTarget - used} record(s) with weight 0 were left out.`);
  return warnings;
}

function numbersOf(column: RecordColumn, use: string): Float64Array {
  if (column.kind === 'numeric' || (column.kind === 'date' && use === 'input')) return column.values;
  throw new RegressionError('column-kind-unsuitable', `${column.name} is a ${column.kind} column and cannot be the ${use}.`, column.name);
}

function unitOf(column: RecordColumn): string | null {
  return column.kind === 'numeric' ? (column.unit ?? null) : null;
}

function usableWeight(weight: number, column: string | null, row: number): number {
  if (Number.isFinite(weight) && weight >= 0) return weight;
  throw new RegressionError('weights-not-usable', `Weights must be 0 or more; ${column} is not in row ${row + 1}.`, column);
}

function scaledWeights(weights: Float64Array | null, rows: Int32Array): { weights: Float64Array; weightSum: number } {
  if (weights === null) return { weights: new Float64Array(rows.length).fill(1), weightSum: rows.length };
  const picked = pick(weights, rows);
  const largest = picked.reduce((most, weight) => Math.max(most, weight), 0);
  const relative = picked.map((weight) => weight / largest);
  const sum = relative.reduce((total, weight) => total + weight, 0);
  return { weights: relative.map((weight) => (weight / sum) * rows.length), weightSum: sum * largest };
}

function additiveTarget(recorded: Float64Array, specification: ResolvedSpecification, rows: Int32Array): Float64Array {
  const { column, transform } = specification.target;
  recorded.forEach((value, index) => {
    if (!Number.isFinite(value)) throw notFinite(column, rows[index]);
    if (transform === 'log' && value <= 0) {
      throw new RegressionError('target-not-positive', `The logarithm needs values above 0; ${column} is ${value} in row ${rows[index] + 1}.`, column);
    }
  });
  return transform === 'log' ? recorded.map(Math.log) : recorded;
}

function notFinite(column: string, row: number): RegressionError {
  return new RegressionError('value-not-finite', `${column} is not a finite number in row ${row + 1}.`, column);
}

function readInput(records: RecordTable, input: ResolvedInput, rows: Int32Array): InputReadings {
  const column = findColumn(records, input.column);
  const kind = input.kind ?? (column.kind === 'text' ? null : column.kind);
  if (kind === null || (kind !== 'category' && column.kind === 'category')) {
    throw new RegressionError('column-kind-unsuitable', `${column.name} is a ${column.kind} column; it cannot be read as ${kind ?? 'an input'}.`, column.name);
  }
  return kind === 'category' ? readCategory(column, input, rows) : readNumbers(column, kind, input, rows);
}

function readNumbers(column: RecordColumn, kind: InputKind, input: ResolvedInput, rows: Int32Array): InputReadings {
  const recorded = pick(numbersOf(column, 'input'), rows);
  let missingCount = 0;
  for (let at = 0; at < recorded.length; at += 1) {
    const value = recorded[at];
    if (Number.isNaN(value)) {
      missingCount += 1;
      refuseMissing(input, rows[at]);
    } else if (!Number.isFinite(value)) throw notFinite(input.column, rows[at]);
    else refuseTransform(input, value, rows[at]);
  }
  if (missingCount === recorded.length) {
    throw new RegressionError('no-usable-input', `${input.column} is missing in every record.`, input.column);
  }
  const plain = input.transform === 'none' || input.transform === 'spline';
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
  const possible = input.transform === 'log' ? value > 0 : input.transform === 'square-root' ? value >= 0 : true;
  if (possible) return;
  throw new RegressionError('transform-not-possible', `${input.column} is ${value} in row ${row + 1}: no ${input.transform} of it exists.`, input.column);
}

/** The transform as a function of one reading; a spline's basis is made from the reading itself. */
export function transformOf(transform: ResolvedInput['transform']): (value: number) => number {
  if (transform === 'log') return Math.log;
  if (transform === 'square-root') return Math.sqrt;
  return (value) => value;
}

function readCategory(column: RecordColumn, input: ResolvedInput, rows: Int32Array): InputReadings {
  if (input.transform !== 'none' || input.sign !== 'any') {
    throw new RegressionError('bad-specification', `${input.column} is a category: it takes no transform and no limit on the sign.`, input.column);
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
  throw new RegressionError('column-kind-unsuitable', `${column.name} is a ${column.kind} column and cannot be read as a category.`, column.name);
}

function numbersAsCategory(name: string, values: Float64Array): CategoryRecordColumn {
  const distinct = [...new Set(values)].filter((value) => !Number.isNaN(value)).sort((first, second) => first - second);
  const position = new Map(distinct.map((value, index) => [value, index]));
  const codes = Int32Array.from(values, (value) => position.get(value) ?? -1);
  return { name, kind: 'category', codes, levels: distinct.map(String) };
}

function pick(values: Float64Array, rows: Int32Array): Float64Array {
  const picked = new Float64Array(rows.length);
  for (let at = 0; at < rows.length; at += 1) picked[at] = values[rows[at]];
  return picked;
}
