import { readFileSync } from 'node:fs';
import { join } from 'node:path';
import type { RecordColumn, RecordTable } from '../../service/src/regression/records';

/** A stored set of outside values; each file names its source. */
export function readFixture<Shape>(name: string): Shape {
  return JSON.parse(readFileSync(join(__dirname, '..', 'fixtures', 'numerics', name), 'utf8')) as Shape;
}

export function numeric(name: string, values: readonly number[]): RecordColumn {
  return { name, kind: 'numeric', values: Float64Array.from(values) };
}

export function category(name: string, words: readonly string[]): RecordColumn {
  const levels = [...new Set(words)].sort();
  return { name, kind: 'category', levels, codes: Int32Array.from(words, (word) => levels.indexOf(word)) };
}

export function table(columns: readonly RecordColumn[]): RecordTable {
  const [first] = columns;
  return { rowCount: first.kind === 'category' ? first.codes.length : first.values.length, columns };
}

/** Largest difference beside the largest reference value. */
export function relativeDifference(found: readonly number[], expected: readonly number[]): number {
  const scale = expected.reduce((most, value) => Math.max(most, Math.abs(value)), 0) || 1;
  return expected.reduce((most, value, at) => Math.max(most, Math.abs(found[at] - value)), 0) / scale;
}

/** Log relative error: the number of digits that agree (McCullough 1998); 16 when all do. */
export function agreeingDigits(found: number, certified: number): number {
  if (found === certified) return 16;
  const error = certified === 0 ? Math.abs(found) : Math.abs(found - certified) / Math.abs(certified);
  return -Math.log10(error);
}
