import type { FitContext } from '../fit-context';
import { cholesky, invertCholesky } from '../linear-algebra/cholesky';
import { factorise, solveUpper, type QrForm } from '../linear-algebra/householder-qr';
import type { ColumnPenalties } from '../solvers/column-penalties';
import type { TrainingPart } from '../solvers/solve-path';
import { hatFeatures, penalisedInverse } from './hat-features';
import { dotAt } from '../solvers/wide-problem';
import type { LeverageMatrix } from './influence';

/** Beyond this many columns no leverage matrix is kept: it would dwarf the formula, and no two cases would be alike anyway. */
export const MOST_LEVER_COLUMNS = 200;

/** Ridge added to duplicate active columns, as a share of their unit variance. */
const SMALL_RIDGE = 1e-8;

export interface LeverRequest {
  readonly context: FitContext;
  readonly part: TrainingPart;
  readonly penalties: ColumnPenalties;
  readonly lambda: number;
  /** Standardised weights of the kept columns at λ. */
  readonly weights: Float64Array;
  readonly dependent: readonly number[];
}

/**
 * (S + λP)⁻¹/n on the columns that carry leverage: all kept ones for ridge and least squares, those with a weight for lasso and
 * elastic net. Null when there are none or too many.
 */
export function leverageMatrix(request: LeverRequest): LeverageMatrix | null {
  const { part, context } = request;
  const { size, weightSum } = part.problem;
  const { kind } = context.settings;
  const positions = Array.from({ length: size }, (_, at) => at).filter((at) =>
    kind === 'descent' ? request.weights[at] !== 0 : !request.dependent.includes(at),
  );
  if (positions.length === 0 || positions.length > MOST_LEVER_COLUMNS) return null;
  const inverse = inverseFor(request, positions);
  return {
    positions,
    matrix: inverse.map((value) => value / weightSum),
    base: context.design.intercept ? 1 / weightSum : 0,
  };
}

function inverseFor(request: LeverRequest, positions: readonly number[]): Float64Array {
  const { part, penalties, lambda, context } = request;
  if (context.settings.kind === 'ridge') return penalisedInverse(hatFeatures(part.problem, penalties), lambda);
  if (context.settings.kind === 'least-squares' && part.rows !== null) return inverseFromRows(part, positions);
  const square = lambda * (1 - context.settings.mixing);
  const entry = productsOf(part);
  const matrix = (extra: number): Float64Array =>
    Float64Array.from(
      positions.flatMap((row) =>
        positions.map((column) => entry(row, column) + (row === column ? square * penalties.factors[row] + extra : 0)),
      ),
    );
  const factor = cholesky(matrix(0), positions.length);
  return invertCholesky(factor.dependent < 0 ? factor : cholesky(matrix(SMALL_RIDGE), positions.length));
}

/** S_ij; on the wide route from the rows. */
function productsOf({ problem, rows }: TrainingPart): (row: number, column: number) => number {
  if (rows === null || problem.gram.length > 0) return (row, column) => problem.gram[row * problem.size + column];
  const { x, rowCount } = rows;
  return (row, column) => dotAt(x, row * rowCount, x, column * rowCount, rowCount) / problem.weightSum;
}

/** R of the independent columns of a part's rows. */
export function triangularOf(part: TrainingPart, positions: readonly number[]): QrForm | null {
  if (part.rows === null) return null;
  const { x, rowCount } = part.rows;
  const data = new Float64Array(rowCount * positions.length);
  positions.forEach((position, at) =>
    data.set(x.subarray(position * rowCount, (position + 1) * rowCount), at * rowCount),
  );
  return factorise(data, rowCount, positions.length);
}

/** n R⁻¹ R⁻ᵀ: digits are lost with the condition number of the columns, not with its square. */
function inverseFromRows(part: TrainingPart, positions: readonly number[]): Float64Array {
  const size = positions.length;
  const qr = triangularOf(part, positions);
  const inverse = new Float64Array(size * size);
  if (qr === null) return inverse;
  const columns = positions.map((_, k) =>
    solveUpper(
      qr,
      Float64Array.from({ length: size }, (__, row) => (row === k ? 1 : 0)),
      size,
    ),
  );
  for (let i = 0; i < size; i += 1) {
    for (let j = 0; j < size; j += 1)
      inverse[i * size + j] = columns.reduce((sum, column) => sum + column[i] * column[j], 0) * part.problem.weightSum;
  }
  return inverse;
}
