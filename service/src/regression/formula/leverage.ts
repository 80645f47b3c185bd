import type { FormulaLeverage } from './formula';

/** constant + x̃ᵀ M x̃ with M's lower triangle packed by rows. */
export function leverageAt(leverage: FormulaLeverage, columns: ArrayLike<number>): number {
  const { columns: positions, packed, constant } = leverage;
  let total = constant;
  let at = 0;
  for (let row = 0; row < positions.length; row += 1) {
    const value = columns[positions[row]];
    let inner = 0;
    for (let column = 0; column < row; column += 1) inner += packed[at + column] * columns[positions[column]];
    total += value * (2 * inner + packed[at + row] * value);
    at += row + 1;
  }
  return Math.max(0, total);
}

const DIGITS = 6;

/** Packs a symmetric matrix, rounded to six digits: leverage decides a flag and a width, not a value. */
export function packLower(matrix: Float64Array, size: number): number[] {
  const packed: number[] = [];
  for (let row = 0; row < size; row += 1)
    for (let column = 0; column <= row; column += 1)
      packed.push(Number(matrix[row * size + column].toPrecision(DIGITS)));
  return packed;
}
