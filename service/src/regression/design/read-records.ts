import { RegressionError } from '../errors';
import type { RecordTable } from '../records';
import type { ResolvedSpecification } from './resolve-specification';
import { findColumn, notFinite, numbersOf, pick, readInput, unitOf, type InputReadings } from './read-input';
import { keptRows } from './row-filter';

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

/** Reads and checks everything that the specification names. Throws RegressionError with the column's name. */
export function readRecords(records: RecordTable, specification: ResolvedSpecification): ReadRecords {
  const filtered = keptRows(records, specification.rowFilter);
  const target = numbersOf(findColumn(records, specification.target.column), 'target');
  const weights =
    specification.weightColumn === null ? null : numbersOf(findColumn(records, specification.weightColumn), 'weight');
  const withTarget = filtered.filter((row) => !Number.isNaN(target[row]));
  const rows = withTarget.filter(
    (row) => weights === null || usableWeight(weights[row], specification.weightColumn, row) > 0,
  );
  if (rows.length < 2) {
    throw new RegressionError(
      'too-few-records',
      `Only ${rows.length} record(s) have a target and a weight above 0; a fit needs at least 2.`,
    );
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

function usableWeight(weight: number, column: string | null, row: number): number {
  if (Number.isFinite(weight) && weight >= 0) return weight;
  throw new RegressionError(
    'weights-not-usable',
    `Weights must be 0 or more; ${column} is not in row ${row + 1}.`,
    column,
  );
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
      throw new RegressionError(
        'target-not-positive',
        `The logarithm needs values above 0; ${column} is ${value} in row ${rows[index] + 1}.`,
        column,
      );
    }
  });
  return transform === 'log' ? recorded.map(Math.log) : recorded;
}
