import type { NumericRecordColumn, RecordTable } from '../../regression/records';
import { boundsAround } from './conditions';
import { logResiduals, thinned } from './expected-logs';
import { listRows, rowsText, stepForRows, type Finding } from './finding';
import { median, robustDeviation } from './robust';
import { nearestFactor, unitFactors, type UnitFactor } from './unit-factors';

/** Rows of a column that are off by the factor between two units; positions from 0. */
export interface UnitMixUp {
  readonly column: NumericRecordColumn;
  readonly by: UnitFactor;
  readonly rows: readonly number[];
}

/** Above this share of the rows it is no longer a mix-up but what the column is like. */
const largestShare = 0.2;
/** Deviations from which a row lies in the tail, from which it can be a mix-up, and which a factor must span. */
const tailDeviations = 4.5;
const farDeviations = 5;
const factorDeviations = 8;
/** Widest distance on the log scale at which a row counts as explained by a factor: the factors are 0.4 apart at least. */
const widestMiss = 0.2;

/** On the log scale: over what length rows far off lie when nothing but chance put them there (a factor of 20). */
const tailLength = 3;
/** Chance at which so many of the rows far off would lie at one of the factors (limit ours: common practice, no source). */
const largestChance = 0.5;

type Group = readonly [UnitFactor, readonly number[]];

/** Rows by the factor that brings them back among the rest: far off as they stand, near once divided by it. */
function rowsByFactor(residuals: Float64Array): Group[] {
  const some = thinned(residuals);
  const centre = median(some);
  const spread = Math.max(robustDeviation(some, centre), 0.01);
  const miss = Math.min(2.5 * spread, widestMiss);
  const found = new Map<UnitFactor, number[]>(unitFactors.map((factor) => [factor, []]));
  const tails = { above: 0, below: 0 };
  residuals.forEach((residual, row) => {
    const off = residual - centre;
    if (!(Math.abs(off) > tailDeviations * spread)) return;
    tails[off > 0 ? 'above' : 'below']++;
    const nearest = nearestFactor(off);
    if (Math.abs(nearest.shift) < factorDeviations * spread) return;
    if (Math.abs(off) > farDeviations * spread && Math.abs(off - nearest.shift) <= miss) found.get(nearest)?.push(row);
  });
  return distinctGroups([...found], tails).filter(([, rows]) => chanceOfFactor(rows.length, miss) <= largestChance);
}

/** Chance that `count` rows far off all lie within `miss` of one and the same of the factors on their side. */
const chanceOfFactor = (count: number, miss: number): number =>
  (unitFactors.length / 2) * Math.min(1, (2 * miss) / tailLength) ** count;

/**
 * A mix-up stands apart: a group of rows at its factor, and little between it and the rest. In a column with a long
 * tail some rows lie at any factor, so a group must be twice as large as what else lies far out on its side; groups
 * that pass are taken away before smaller ones are judged.
 */
function distinctGroups(groups: readonly Group[], tails: { above: number; below: number }): Group[] {
  const left = { ...tails };
  return groups
    .filter(([, rows]) => rows.length > 0)
    .sort(([, a], [, b]) => b.length - a.length)
    .filter(([{ shift }, rows]) => {
      const side = shift > 0 ? 'above' : 'below';
      if (rows.length < 2 * (left[side] - rows.length)) return false;
      left[side] -= rows.length;
      return true;
    });
}

/** Rows of positive measures that are off by the factor between two units. Cost: see `logResiduals`. */
export const unitMixUps = (table: RecordTable): UnitMixUp[] =>
  logResiduals(table).flatMap(({ column, residuals }) =>
    rowsByFactor(residuals())
      .filter(([, rows]) => rows.length <= largestShare * table.rowCount)
      .map(([by, rows]) => ({ column, by, rows })),
  );

const factorText = (factor: number): string => (factor >= 1 ? factor : 1 / factor).toPrecision(5).replace(/\.?0+$/, '');

export function findUnitMixUps(mixUps: readonly UnitMixUp[]): Finding[] {
  return mixUps.map(({ column: { name, values }, by: { factor, undo, likely }, rows }) => {
    const [direction, remedy] = factor >= 1 ? ['larger', 'divide'] : ['smaller', 'multiply'];
    const where = boundsAround(name, values, rows);
    return {
      kind: 'unit-mix-up',
      columns: [name],
      message: `${rowsText(rows.length)} of ${name} ${rows.length === 1 ? 'is' : 'are'} about ${factorText(factor)} times ${direction} than the rest leads to expect: perhaps ${likely}.`,
      remedy: `Look at the rows; where the unit was wrong, ${remedy} by ${factorText(factor)}.`,
      ...listRows(rows),
      where,
      steps: stepForRows(rows, where, (choice) => ({ kind: 'convert-unit', column: name, factor: undo, ...choice })),
    };
  });
}

/** The column as it would be with its mixed-up readings put right. */
export function withoutMixUps(column: NumericRecordColumn, mixUps: readonly UnitMixUp[]): NumericRecordColumn {
  const own = mixUps.filter((mixUp) => mixUp.column === column);
  if (own.length === 0) return column;
  const values = column.values.slice();
  for (const { by, rows } of own) for (const row of rows) values[row] *= by.undo;
  return { ...column, values };
}
