import { Matrix, SingularValueDecomposition } from 'ml-matrix';
import type { DesignMatrix } from '../design/design-matrix';
import type { ReadRecords } from '../design/read-records';
import { factorise, upper } from '../linear-algebra/householder-qr';
import type { ConditionIndex, FitDiagnostics } from '../result';
import { isWide, type TrainingPart } from '../solvers/solve-path';
import { symmetricEigen } from './condition';

/** Beyond this many columns an eigendecomposition for diagnostics costs more than the fit. */
const MOST_COLUMNS = 300;

/** Indices that are kept, the largest: each carries a share for every column. */
const MOST_INDICES = 60;

/** Eigenvalues below this share of the largest are rounding: the direction is missing. */
const MISSING_SHARE = 1e-13;

export interface LabelledColumn {
  readonly input: string;
  readonly level?: string;
}

/**
 * Positions among the kept columns for which collinearity has a meaning: of a category that keeps all its levels the commonest
 * is left aside, as its columns always add up to one.
 */
export function comparablePositions(part: TrainingPart, design: DesignMatrix, read: ReadRecords): number[] {
  const aside = new Set<number>();
  read.inputs.forEach((readings, input) => {
    if (readings.kind !== 'category') return;
    const levels = Array.from(part.problem.kept.keys()).filter(
      (at) => design.columns[part.problem.kept[at]].input === input,
    );
    const hasReference = design.columns.some(
      (column) => column.input === input && column.leftOut === 'reference-level',
    );
    if (hasReference || levels.length === 0) return;
    const share = (at: number): number => design.centres[part.problem.kept[at]];
    aside.add(levels.reduce((best, at) => (share(at) > share(best) ? at : best)));
  });
  return Array.from(part.problem.kept.keys()).filter((at) => !aside.has(at));
}

export function collinearity(
  part: TrainingPart,
  design: DesignMatrix,
  positions: readonly number[],
  labels: readonly LabelledColumn[],
): Pick<FitDiagnostics, 'varianceInflation' | 'conditionIndices' | 'conditionColumns'> {
  if (positions.length === 0 || positions.length > MOST_COLUMNS || isWide(part))
    return { varianceInflation: [], conditionIndices: [], conditionColumns: [] };
  const factors = varianceInflation(part, positions);
  return {
    varianceInflation: labels.map((label, at) => ({ ...label, factor: factors[at] })),
    conditionIndices: conditionIndices(part, design, positions),
    conditionColumns: design.intercept ? [{ input: 'intercept' }, ...labels] : [...labels],
  };
}

/** VIF_j = [corr⁻¹]_jj = Σ_k v_jk²/d_k; null (infinite) for a column in a missing direction. */
function varianceInflation(part: TrainingPart, positions: readonly number[]): (number | null)[] {
  const { gram, size } = part.problem;
  const { values, vectors } = symmetricEigen(positions.length, (i, j) => gram[positions[i] * size + positions[j]]);
  const floor = MISSING_SHARE * Math.max(...values);
  return positions.map((_, j) => {
    let factor = 0;
    for (const [k, value] of values.entries()) {
      const square = vectors.get(j, k) ** 2;
      if (value > floor) factor += square / value;
      else if (square > 1e-10) return null;
    }
    return factor;
  });
}

/**
 * Columns of [1 X] in original units, each scaled to length 1, not centred: condition indices d_1/d_k and the shares
 * π_jk = (v_jk²/d_k²)/Σ_k (v_jk²/d_k²) of each coefficient's variance (Belsley, Kuh and Welsch 1980, sections 3.1 and 3.2).
 */
function conditionIndices(part: TrainingPart, design: DesignMatrix, positions: readonly number[]): ConditionIndex[] {
  const { singular, right } =
    part.rows === null ? fromMoments(part, design, positions) : fromRows(part, design, positions);
  const largest = Math.max(...singular);
  const missing = (value: number): boolean => value <= Math.sqrt(Number.EPSILON) * 1e-6 * largest;
  const weight = (j: number, k: number): number => (missing(singular[k]) ? 0 : (right.get(j, k) / singular[k]) ** 2);
  const totals = Array.from({ length: right.rows }, (_, j) => singular.reduce((sum, __, k) => sum + weight(j, k), 0));
  return singular
    .map((value, k) => ({
      index: missing(value) ? null : largest / value,
      proportions: totals.map((total, j) => (total > 0 ? weight(j, k) / total : 0)),
    }))
    .sort((first, second) => (first.index ?? Infinity) - (second.index ?? Infinity))
    .slice(-MOST_INDICES);
}

interface Decomposed {
  readonly singular: readonly number[];
  readonly right: Matrix;
}

function fromRows(part: TrainingPart, design: DesignMatrix, positions: readonly number[]): Decomposed {
  const rows = part.rows;
  if (rows === null) return fromMoments(part, design, positions);
  const { rowCount, rootWeights } = rows;
  const columns = positions.map((at) => {
    const { centre, scale } = originalUnits(part, design, at);
    return Float64Array.from(rootWeights, (root, row) => rows.x[at * rowCount + row] * scale + centre * root);
  });
  if (design.intercept) columns.unshift(rootWeights.slice());
  const data = new Float64Array(rowCount * columns.length);
  columns.forEach((values, at) => {
    const length = Math.sqrt(values.reduce((sum, value) => sum + value * value, 0));
    data.set(
      values.map((value) => value / length),
      at * rowCount,
    );
  });
  const qr = factorise(data, rowCount, columns.length);
  const triangle = new Matrix(columns.length, columns.length);
  for (let i = 0; i < qr.diagonal.length; i += 1)
    for (let j = i; j < columns.length; j += 1) triangle.set(i, j, upper(qr, i, j));
  const decomposition = new SingularValueDecomposition(triangle);
  return { singular: decomposition.diagonal, right: decomposition.rightSingularVectors };
}

/** Centre and scale of a standardised column in original units. */
function originalUnits(part: TrainingPart, design: DesignMatrix, at: number): { centre: number; scale: number } {
  const column = part.problem.kept[at];
  return {
    centre: design.centres[column] + part.problem.means[at] * design.scales[column],
    scale: design.scales[column] * part.problem.scales[at],
  };
}

/** g_ij = (c_i c_j + s_i s_j S_ij)/(‖x_i‖ ‖x_j‖); half the digits of the route by rows. */
function fromMoments(part: TrainingPart, design: DesignMatrix, positions: readonly number[]): Decomposed {
  const { gram, size } = part.problem;
  const offset = design.intercept ? 1 : 0;
  const parts = positions.map((at) => {
    const { centre, scale } = originalUnits(part, design, at);
    const length = Math.hypot(centre, scale);
    return { centre: centre / length, scale: scale / length, at };
  });
  const entry = (i: number, j: number): number => {
    if (i < offset && j < offset) return 1;
    if (i < offset) return parts[j - offset].centre;
    if (j < offset) return parts[i - offset].centre;
    const first = parts[i - offset];
    const second = parts[j - offset];
    return first.centre * second.centre + first.scale * second.scale * gram[first.at * size + second.at];
  };
  const { values, vectors } = symmetricEigen(positions.length + offset, entry);
  return { singular: values.map((value) => Math.sqrt(Math.max(0, value))), right: vectors };
}
