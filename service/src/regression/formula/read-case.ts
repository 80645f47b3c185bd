import { splineColumns } from '../design/spline';
import { transformOf } from '../design/read-input';
import { RegressionError } from '../errors';
import type { CaseInputs, EvaluationFlag } from './evaluate';
import type { Formula, FormulaInput, InputCoding } from './formula';

/** A reading as the coding wants it: a number (days for a date), a position among the levels, or missing. */
export type Reading =
  | { readonly form: 'number'; readonly value: number }
  | { readonly form: 'level'; readonly position: number }
  | { readonly form: 'missing' };

const UNSEEN = -1;
const DAY_MS = 86_400_000;

/** Reads every input of the formula from a case, and notes what is unusual about it. */
export function readCase(formula: Formula, inputs: CaseInputs, flags: EvaluationFlag[]): Reading[] {
  return formula.inputs.map((input) => {
    const given = Object.hasOwn(inputs, input.name) ? inputs[input.name] : null;
    if (given === null || given === undefined || given === '') return readMissing(input, flags);
    return input.kind === 'category' ? readLevel(input, given, flags) : readNumber(input, given, flags);
  });
}

function readMissing(input: FormulaInput, flags: EvaluationFlag[]): Reading {
  if (input.missing === 'refuse')
    throw new RegressionError('input-missing', `${input.name} is needed and was not given.`, input.name);
  flags.push({
    code: 'missing-filled',
    input: input.name,
    message: `${input.name} was not given; the estimate stands for a case with ${input.name} unknown.`,
  });
  return { form: 'missing' };
}

function readLevel(input: FormulaInput, given: number | string, flags: EvaluationFlag[]): Reading {
  const position = (input.levels ?? []).findIndex((level) => level.level === String(given));
  if (position >= 0) return { form: 'level', position };
  const message = `The records hold no case with ${input.name} ${String(given)}.`;
  if (input.unseenLevel === 'refuse') throw new RegressionError('unknown-level', message, input.name);
  flags.push({ code: 'unknown-level', input: input.name, message });
  return { form: 'level', position: UNSEEN };
}

function readNumber(input: FormulaInput, given: number | string, flags: EvaluationFlag[]): Reading {
  const value = input.kind === 'date' ? daysOf(input, given) : given;
  if (typeof value !== 'number' || !Number.isFinite(value))
    throw unsuitable(input, `${input.name} must be a finite number.`);
  if (input.transform === 'log' && value <= 0) throw unsuitable(input, `${input.name} must be above 0.`);
  if (input.transform === 'square-root' && value < 0) throw unsuitable(input, `${input.name} must not be below 0.`);
  if (input.range !== null && (value < input.range.min || value > input.range.max)) {
    flags.push({ code: 'outside-range', input: input.name, message: rangeMessage(input, input.range) });
  }
  return { form: 'number', value };
}

function rangeMessage(input: FormulaInput, range: { readonly min: number; readonly max: number }): string {
  const show = (value: number): string =>
    input.kind === 'date' ? isoDay(value) : `${value}${input.unit === null ? '' : ` ${input.unit}`}`;
  return `${input.name} is outside what the records cover (${show(range.min)} to ${show(range.max)}).`;
}

function isoDay(days: number): string {
  return new Date(Math.floor(days) * DAY_MS).toISOString().slice(0, 10);
}

function daysOf(input: FormulaInput, given: number | string): number {
  if (typeof given === 'number') return given;
  const time = /^\d{4}-\d{2}-\d{2}$/.test(given) ? Date.parse(`${given}T00:00:00Z`) : NaN;
  if (Number.isNaN(time) || isoDay(time / DAY_MS) !== given)
    throw unsuitable(input, `${input.name} must be a day such as 2026-03-31.`);
  return time / DAY_MS;
}

function unsuitable(input: FormulaInput, message: string): RegressionError {
  return new RegressionError('input-not-suitable', message, input.name);
}

/** Standardised columns of one input, (x − centre)/scale; 0 where a column is left out. */
export function codeReading(coding: InputCoding, reading: Reading): Float64Array {
  const { centres, scales, missingIndicator } = coding;
  const columns = Float64Array.from(centres, () => NaN);
  const width = centres.length - (missingIndicator ? 1 : 0);
  if (reading.form === 'level')
    for (let level = 0; level < width; level += 1) columns[level] = level === reading.position ? 1 : 0;
  else if (reading.form === 'missing') columns.fill(coding.form === 'levels' && missingIndicator ? 0 : NaN);
  else if (coding.form === 'spline') columns.set(splineColumns(reading.value, coding.knots));
  else columns[0] = transformOf(coding.transform)(reading.value);
  if (missingIndicator) columns[width] = reading.form === 'missing' ? 1 : 0;
  return columns.map((value, at) => (Number.isNaN(value) || scales[at] === 0 ? 0 : (value - centres[at]) / scales[at]));
}
