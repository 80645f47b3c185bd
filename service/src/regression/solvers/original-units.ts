import type { DesignMatrix } from '../design/design-matrix';
import type { ColumnModel } from '../design/moments';
import type { ReadRecords } from '../design/read-records';
import type { FoldPlan } from '../selection/folds';
import { LongSum } from '../linear-algebra/double-double';
import { refinedLeastSquares } from './refined-least-squares';

/** Least squares in original units, with the same model on the design's columns. */
export interface OriginalUnits {
  readonly intercept: number;
  /** By design column; 0 for a column that is left out. */
  readonly values: Float64Array;
  readonly model: ColumnModel;
}

/**
 * Solves least squares once more on the columns as they were recorded, [√w, √w x], scaled by powers of two only, so that the
 * rounding of standardised columns does not reach the answer. Null when a column is not plain numeric or depends on others.
 * Cost 2 n p² + O(n p) a round.
 */
export function leastSquaresInOriginalUnits(
  read: ReadRecords,
  design: DesignMatrix,
  plan: FoldPlan,
): OriginalUnits | null {
  const used = design.columns.flatMap((column, at) => (column.leftOut === undefined ? [at] : []));
  const plain = used.every(
    (at) =>
      design.columns[at].label === undefined && read.inputs[design.columns[at].input].input.transform !== 'spline',
  );
  if (!plain) return null;
  const rows = read.count;
  const offset = design.intercept ? 1 : 0;
  const matrix = new Float64Array(rows * (used.length + offset));
  const roots = Float64Array.from(plan.order, (record) => Math.sqrt(read.weights[record]));
  if (design.intercept) matrix.set(roots);
  const powers = used.map((at, index) => {
    const { values } = read.inputs[design.columns[at].input];
    const power = powerOfTwoNear(values);
    plan.order.forEach(
      (record, row) => (matrix[(index + offset) * rows + row] = (values[record] / power) * roots[row]),
    );
    return power;
  });
  const target = Float64Array.from(plan.order, (record, row) => read.target[record] * roots[row]);
  const answer = refinedLeastSquares(matrix, rows, used.length + offset, target);
  if (answer.dependent.length > 0) return null;
  const values = new Float64Array(design.columnCount);
  used.forEach((at, index) => (values[at] = answer.weights[index + offset] / powers[index]));
  const intercept = design.intercept ? answer.weights[0] : 0;
  return { intercept, values, model: toDesignColumns(design, intercept, values) };
}

function powerOfTwoNear(values: Float64Array): number {
  const largest = values.reduce((most, value) => Math.max(most, Math.abs(value)), 0);
  return largest === 0 ? 1 : 2 ** Math.round(Math.log2(largest));
}

function toDesignColumns(design: DesignMatrix, intercept: number, values: Float64Array): ColumnModel {
  const constant = new LongSum();
  constant.add(intercept);
  constant.add(-design.targetCentre);
  values.forEach((value, at) => constant.addProduct(value, design.centres[at]));
  return { constant: constant.value(), weights: values.map((value, at) => value * design.scales[at]) };
}
