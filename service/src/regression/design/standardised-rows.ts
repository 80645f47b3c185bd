import type { DesignMatrix } from './design-matrix';
import type { FoldFill, StandardisedProblem } from './moments';
import { crossProduct } from '../linear-algebra/cross-product';
import { sumOfSquares } from './predict';

export interface RowSpan {
  readonly start: number;
  readonly end: number;
}

/** The columns of one training part, standardised by its own records in two passes, times √w. Column-major rows × size. */
export interface StandardisedRows {
  readonly rowCount: number;
  readonly x: Float64Array;
  readonly y: Float64Array;
  readonly rootWeights: Float64Array;
  readonly problem: Omit<StandardisedProblem, 'gram' | 'cross'>;
}

/** A column whose spread is below this share of its mean square is constant. */
const CONSTANT_SHARE = 1e-24;

export function standardisedRows(
  design: DesignMatrix,
  spans: readonly RowSpan[],
  usable: readonly boolean[],
): StandardisedRows {
  const { columnCount, intercept } = design;
  const rootWeights = gather(design, columnCount, spans);
  const weightSum = sumOfSquares(rootWeights);
  const fills = rowFills(design, spans, rootWeights, weightSum);
  const columns = standardisedColumns({ design, spans, usable, rootWeights, weightSum, fills });
  const y = gather(design, columnCount + 1, spans);
  const targetMean = intercept ? centre(y, rootWeights, weightSum) : 0;
  return {
    rowCount: rootWeights.length,
    x: columns.x,
    y,
    rootWeights,
    problem: {
      weightSum,
      size: columns.kept.length,
      kept: Int32Array.from(columns.kept),
      targetSquare: sumOfSquares(y) / weightSum,
      means: Float64Array.from(columns.means),
      scales: Float64Array.from(columns.scales),
      targetMean,
      fills,
    },
  };
}

interface ColumnSource {
  readonly design: DesignMatrix;
  readonly spans: readonly RowSpan[];
  readonly usable: readonly boolean[];
  readonly rootWeights: Float64Array;
  readonly weightSum: number;
  readonly fills: readonly FoldFill[];
}

interface StandardisedColumns {
  readonly x: Float64Array;
  readonly kept: readonly number[];
  readonly means: readonly number[];
  readonly scales: readonly number[];
}

function standardisedColumns({
  design,
  spans,
  usable,
  rootWeights,
  weightSum,
  fills,
}: ColumnSource): StandardisedColumns {
  const rows = rootWeights.length;
  const x = new Float64Array(usable.filter(Boolean).length * rows);
  const kept: number[] = [];
  const means: number[] = [];
  const scales: number[] = [];
  for (let column = 0; column < design.columnCount; column += 1) {
    if (!usable[column]) continue;
    const values = gather(design, column, spans);
    applyFill(values, column, fills, design, spans, rootWeights);
    const mean = design.intercept ? centre(values, rootWeights, weightSum) : 0;
    const square = sumOfSquares(values) / weightSum;
    if (!(square > CONSTANT_SHARE * (mean * mean + 1))) continue;
    const scale = Math.sqrt(square);
    for (let row = 0; row < rows; row += 1) x[kept.length * rows + row] = values[row] / scale;
    kept.push(column);
    means.push(mean);
    scales.push(scale);
  }
  return { x: x.subarray(0, kept.length * rows), kept, means, scales };
}

function gather(design: DesignMatrix, column: number, spans: readonly RowSpan[]): Float64Array {
  const gathered = new Float64Array(spans.reduce((total, span) => total + span.end - span.start, 0));
  let at = 0;
  for (const { start, end } of spans) {
    gathered.set(design.data.subarray(column * design.rowCount + start, column * design.rowCount + end), at);
    at += end - start;
  }
  return gathered;
}

/** values ← values − mean·√w, twice, so that the rounding of the first mean goes too; returns the mean. */
function centre(values: Float64Array, rootWeights: Float64Array, weightSum: number): number {
  let total = 0;
  for (let pass = 0; pass < 2; pass += 1) {
    let mean = 0;
    for (let row = 0; row < values.length; row += 1) mean += values[row] * rootWeights[row];
    mean /= weightSum;
    for (let row = 0; row < values.length; row += 1) values[row] -= mean * rootWeights[row];
    total += mean;
  }
  return total;
}

function rowFills(
  design: DesignMatrix,
  spans: readonly RowSpan[],
  rootWeights: Float64Array,
  weightSum: number,
): FoldFill[] {
  const { centres, scales } = design;
  const sumOf = (column: number): number =>
    gather(design, column, spans).reduce((sum, value, row) => sum + value * rootWeights[row], 0);
  return design.filled.flatMap(({ column, indicator }) => {
    const share = scales[indicator] === 0 ? 0 : centres[indicator] + (scales[indicator] * sumOf(indicator)) / weightSum;
    const shift = share < 1 - 1e-9 ? sumOf(column) / (weightSum * (1 - share)) : 0;
    return shift === 0 ? [] : [{ column, indicator, shift }];
  });
}

function applyFill(
  values: Float64Array,
  column: number,
  fills: readonly FoldFill[],
  design: DesignMatrix,
  spans: readonly RowSpan[],
  rootWeights: Float64Array,
): void {
  const fill = fills.find((candidate) => candidate.column === column);
  if (fill === undefined) return;
  const marks = gather(design, fill.indicator, spans);
  const { indicator, shift } = fill;
  for (let row = 0; row < values.length; row += 1) {
    values[row] += shift * (design.centres[indicator] * rootWeights[row] + design.scales[indicator] * marks[row]);
  }
}

/** The same problem with its sums of products, from the centred rows. */
export function problemOfRows(rows: StandardisedRows): StandardisedProblem {
  const { size, weightSum } = rows.problem;
  const all = new Float64Array((size + 1) * rows.rowCount);
  all.set(rows.x);
  all.set(rows.y, size * rows.rowCount);
  const sums = crossProduct(all, size + 1, { rowCount: rows.rowCount, start: 0, end: rows.rowCount });
  const gram = new Float64Array(size * size);
  const cross = new Float64Array(size);
  for (let i = 0; i < size; i += 1) {
    for (let j = 0; j < size; j += 1) gram[i * size + j] = sums[i * (size + 1) + j] / weightSum;
    cross[i] = sums[i * (size + 1) + size] / weightSum;
  }
  return { ...rows.problem, gram, cross };
}

/** The problem on the wide route: no products of columns are formed (`gram` and `cross` are empty). */
export function withoutGram(rows: StandardisedRows): StandardisedProblem {
  return { ...rows.problem, gram: new Float64Array(0), cross: new Float64Array(0) };
}
