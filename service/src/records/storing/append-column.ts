import type { CategoryRecordColumn, RecordColumn } from '../../regression/records';
import { decodeWords } from '../reading/cell-stores';
import { maximumLevelLength, maximumLevels } from '../reading/limits';

type Words = Extract<RecordColumn, { kind: 'category' | 'text' }>;

const textsOf = (column: Words): readonly (string | null)[] =>
  column.kind === 'text' ? column.values : decodeWords(column.codes, column.levels);

const mayBeLevels = (levels: readonly string[]): boolean =>
  levels.length <= maximumLevels && levels.every((level) => level.length <= maximumLevelLength);

function joinedNumbers(base: Float64Array, added: Float64Array): Float64Array {
  const values = new Float64Array(base.length + added.length);
  values.set(base);
  values.set(added, base.length);
  return values;
}

/** The base's levels keep their codes; new ones get the next codes in the order in which they first come. */
function mergedLevels(base: CategoryRecordColumn, added: readonly (string | null)[]): CategoryRecordColumn {
  const known = new Map(base.levels.map((level, code) => [level, code]));
  const codes = new Int32Array(base.codes.length + added.length);
  codes.set(base.codes);
  added.forEach((level, row) => {
    let code = level === null ? -1 : known.get(level);
    if (level !== null && code === undefined) known.set(level, (code = known.size));
    codes[base.codes.length + row] = code ?? -1;
  });
  return { name: base.name, kind: 'category', codes, levels: [...known.keys()] };
}

function appendWords(base: Words, added: Words): RecordColumn {
  if (base.kind === 'category') {
    const merged = mergedLevels(base, textsOf(added));
    if (mayBeLevels(merged.levels)) return merged;
  }
  return { name: base.name, kind: 'text', values: textsOf(base).concat(textsOf(added)) };
}

const isMissingThroughout = (column: RecordColumn): boolean =>
  column.kind === 'text'
    ? column.values.every((text) => text === null)
    : column.kind === 'category'
      ? column.codes.every((code) => code < 0)
      : column.values.every((value) => value !== value);

const lengthOf = (column: RecordColumn): number =>
  column.kind === 'category' ? column.codes.length : column.values.length;

/** A column without any reading is of whatever kind it is wanted to be. */
function missingAs(kind: RecordColumn['kind'], name: string, rowCount: number): RecordColumn {
  if (kind === 'text') return { name, kind, values: new Array<null>(rowCount).fill(null) };
  if (kind === 'category') return { name, kind, codes: new Int32Array(rowCount).fill(-1), levels: [] };
  return { name, kind, values: new Float64Array(rowCount).fill(NaN) };
}

/**
 * The base's readings and then the added ones, under the base's name, kind and unit. A category that gets more or
 * longer levels than a category may have becomes text; text stays text. Throws when the kinds do not go together,
 * for a file that is appended must have been read in the base's kinds.
 */
export function appendColumn(base: RecordColumn, given: RecordColumn): RecordColumn {
  const added = isMissingThroughout(given) ? missingAs(base.kind, base.name, lengthOf(given)) : given;
  if (base.kind === 'category' || base.kind === 'text') {
    if (added.kind === 'category' || added.kind === 'text') return appendWords(base, added);
  } else if (added.kind === base.kind) {
    return { ...base, values: joinedNumbers(base.values, added.values) };
  }
  throw new Error(`A column that was read as ${added.kind} cannot be appended to one that is ${base.kind}.`);
}
