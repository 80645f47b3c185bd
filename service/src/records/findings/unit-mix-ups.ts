import type { NumericRecordColumn, RecordTable } from '../../regression/records';
import { listRows, rowsText, type Finding } from './finding';
import { median, pairMoments, robustDeviation } from './robust';

interface UnitFactor {
  readonly factor: number;
  readonly likely: string;
}

/** Factors between units that are often mixed. Exact by definition: 1 ft = 0.3048 m, 1 lb = 0.45359237 kg, 1 in = 25.4 mm (international yard and pound agreement, 1959). */
const factors: readonly UnitFactor[] = [
  { factor: 1 / 0.3048, likely: 'feet among metres' },
  { factor: 1 / 0.45359237, likely: 'pounds among kilograms' },
  { factor: 25.4, likely: 'millimetres among inches' },
  { factor: 10, likely: 'a slipped decimal mark, or millimetres among centimetres' },
  { factor: 1000, likely: 'millimetres among metres, or kilograms among tonnes' },
];
const candidates = factors.flatMap(({ factor, likely }) => [
  { factor, shift: Math.log(factor), likely },
  { factor: 1 / factor, shift: -Math.log(factor), likely: likely.replace(/(\w+) among (\w+)/g, '$2 among $1') },
]);

/** Above this share of the rows it is no longer a mix-up but what the column is like. */
const largestShare = 0.2;
const smallestRows = 20;
const guides = 5;
const guidingCorrelation = 0.6;

interface LogColumn {
  readonly column: NumericRecordColumn;
  readonly logs: Float64Array;
}

function logColumns(table: RecordTable): LogColumn[] {
  return table.columns.flatMap((column) => {
    if (column.kind !== 'numeric') return [];
    const present = column.values.filter((value) => value === value);
    if (present.length < smallestRows || present.some((value) => value < 0)) return [];
    // A zero says "none", not a quantity in a unit.
    return [{ column, logs: column.values.map((value) => (value > 0 ? Math.log(value) : NaN)) }];
  });
}

/** Rows near the middle of a column on the log scale: a mixed-up row would tilt a line fitted through all. */
function middleRows(logs: Float64Array): Uint8Array {
  const centre = median(logs);
  const spread = Math.max(robustDeviation(logs, centre), 1e-9);
  return Uint8Array.from(logs, (value) => (Math.abs(value - centre) <= 2.5 * spread ? 1 : 0));
}

const bothOf = (a: Uint8Array, b: Uint8Array): Uint8Array => a.map((use, row) => use & b[row]);

/** What one other column leads to expect: the least-squares line through the rows in the middle of both. */
function expectedFrom(
  target: LogColumn,
  guide: LogColumn,
  use: Uint8Array,
): { readonly strength: number; expect(row: number): number } {
  const { meanX, meanY, sdX, sdY, correlation } = pairMoments(guide.logs, target.logs, use);
  const slope = (correlation * sdY) / sdX;
  return { strength: Math.abs(correlation), expect: (row) => meanY + slope * (guide.logs[row] - meanX) };
}

/**
 * Log of each reading less what is expected of it: the median of what the most related columns lead to expect, so
 * that one of them being mixed up itself does not matter; or the column's own median where none is related.
 */
function residualsOf(
  target: LogColumn,
  others: readonly LogColumn[],
  middles: ReadonlyMap<LogColumn, Uint8Array>,
): Float64Array {
  const lines = others
    .map((guide) => expectedFrom(target, guide, bothOf(required(middles, target), required(middles, guide))))
    .filter((line) => line.strength >= guidingCorrelation)
    .sort((a, b) => b.strength - a.strength)
    .slice(0, guides);
  const centre = median(target.logs);
  return target.logs.map((value, row) => {
    if (value !== value) return NaN;
    const expected = lines
      .map((line) => line.expect(row))
      .filter((guess) => guess === guess)
      .sort((a, b) => a - b);
    const middle = expected.length >> 1;
    if (expected.length === 0) return value - centre;
    return value - (expected.length % 2 === 1 ? expected[middle] : (expected[middle - 1] + expected[middle]) / 2);
  });
}

function required(middles: ReadonlyMap<LogColumn, Uint8Array>, column: LogColumn): Uint8Array {
  const middle = middles.get(column);
  if (!middle) throw new Error('A column has no middle.');
  return middle;
}

/** Deviations from which a row lies in the tail, and from which it can be a mix-up. */
const tailDeviations = 4.5;
const farDeviations = 5;

/** Widest distance on the log scale at which a row counts as explained by a factor: the factors are 0.4 apart at least. */
const widestMiss = 0.2;

type Candidate = (typeof candidates)[number];

const nearestCandidate = (off: number): Candidate =>
  candidates.reduce((a, b) => (Math.abs(off - b.shift) < Math.abs(off - a.shift) ? b : a));

/** Rows by the factor that brings them back among the rest: far off as they stand, near once divided by it. */
function rowsByFactor(residuals: Float64Array): (readonly [Candidate, readonly number[]])[] {
  const centre = median(residuals);
  const spread = Math.max(robustDeviation(residuals, centre), 0.01);
  const miss = Math.min(2.5 * spread, widestMiss);
  const found = new Map<Candidate, number[]>(candidates.map((candidate) => [candidate, []]));
  const tails = { above: 0, below: 0 };
  residuals.forEach((residual, row) => {
    const off = residual - centre;
    if (!(Math.abs(off) > tailDeviations * spread)) return;
    tails[off > 0 ? 'above' : 'below']++;
    const nearest = nearestCandidate(off);
    if (Math.abs(off) > farDeviations * spread && Math.abs(off - nearest.shift) <= miss) found.get(nearest)?.push(row);
  });
  return distinctGroups([...found], tails);
}

/**
 * A mix-up stands apart: a group of rows at its factor, and little between it and the rest. In a column with a long
 * tail some rows lie at any factor, so a group must be twice as large as what else lies far out on its side; groups
 * that pass are taken away before smaller ones are judged.
 */
function distinctGroups(
  groups: (readonly [Candidate, readonly number[]])[],
  tails: { above: number; below: number },
): (readonly [Candidate, readonly number[]])[] {
  const left = { ...tails };
  return groups
    .filter(([, rows]) => rows.length > 0)
    .sort(([, a], [, b]) => b.length - a.length)
    .filter(([candidate, rows]) => {
      const side = candidate.shift > 0 ? 'above' : 'below';
      if (rows.length < 2 * (left[side] - rows.length)) return false;
      left[side] -= rows.length;
      return true;
    });
}

const factorText = (factor: number): string => (factor >= 1 ? factor : 1 / factor).toPrecision(5).replace(/\.?0+$/, '');

function toFinding(name: string, { factor, likely }: (typeof candidates)[number], rows: readonly number[]): Finding {
  const [direction, undo] = factor >= 1 ? ['larger', 'divide'] : ['smaller', 'multiply'];
  return {
    kind: 'unit-mix-up',
    columns: [name],
    message: `${rowsText(rows.length)} of ${name} ${rows.length === 1 ? 'is' : 'are'} about ${factorText(factor)} times ${direction} than the rest leads to expect: perhaps ${likely}.`,
    remedy: `Look at the rows; where the unit was wrong, ${undo} by ${factorText(factor)}.`,
    ...listRows(rows),
  };
}

/** Rows of positive measures that are off by the factor between two units. Cost: rows × columns². */
export function findUnitMixUps(table: RecordTable): Finding[] {
  const columns = logColumns(table);
  const middles = new Map(columns.map((column) => [column, middleRows(column.logs)]));
  return columns.flatMap((target) => {
    const residuals = residualsOf(
      target,
      columns.filter((column) => column !== target),
      middles,
    );
    return rowsByFactor(residuals)
      .filter(([, rows]) => rows.length <= largestShare * table.rowCount)
      .map(([candidate, rows]) => toFinding(target.column.name, candidate, rows));
  });
}
