import type { DesignMatrix } from './design-matrix';
import type { ColumnModel } from './moments';

/** √w · (y − constant − z·b) for the positions start … end − 1. Cost (end − start) · number of weights that are not 0. */
export function weightedResiduals(design: DesignMatrix, model: ColumnModel, start: number, end: number): Float64Array {
  const { rowCount, columnCount, data } = design;
  const residuals = data.slice((columnCount + 1) * rowCount + start, (columnCount + 1) * rowCount + end);
  subtractColumn(residuals, data, columnCount * rowCount + start, model.constant);
  for (let column = 0; column < columnCount; column += 1) {
    const weight = model.weights[column];
    if (weight !== 0) subtractColumn(residuals, data, column * rowCount + start, weight);
  }
  return residuals;
}

function subtractColumn(residuals: Float64Array, data: Float64Array, offset: number, weight: number): void {
  for (let row = 0; row < residuals.length; row += 1) residuals[row] -= weight * data[offset + row];
}

export function sumOfSquares(values: Float64Array): number {
  let sum = 0;
  for (let index = 0; index < values.length; index += 1) sum += values[index] * values[index];
  return sum;
}
