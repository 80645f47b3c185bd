/**
 * Sums of products of columns, C = Zᵀ Z over the rows start … end − 1 of a column-major matrix with `rowCount` rows.
 * C is columns × columns, row-major, full. The rows are taken in blocks that stay in the cache, the columns in tiles of
 * 4 × 2 whose eight sums stay in registers. Cost: rows · columns² / 2 multiplications. The order of summation is fixed by
 * the arguments alone.
 */
export interface RowRange {
  readonly rowCount: number;
  readonly start: number;
  readonly end: number;
}

export type CrossProductKernel = (data: Float64Array, columns: number, range: RowRange) => Float64Array;

const ROWS_PER_BLOCK = 512;

export const crossProduct: CrossProductKernel = (data, columns, range) => {
  const sums = new Float64Array(columns * columns);
  for (let start = range.start; start < range.end; start += ROWS_PER_BLOCK) {
    addBlock(
      data,
      columns,
      { rowCount: range.rowCount, start, end: Math.min(start + ROWS_PER_BLOCK, range.end) },
      sums,
    );
  }
  mirrorLower(sums, columns);
  return sums;
};

function addBlock(data: Float64Array, columns: number, range: RowRange, sums: Float64Array): void {
  for (let row = 0; row < columns; row += 4) {
    for (let column = 0; column < Math.min(row + 4, columns); column += 2) {
      if (row + 4 <= columns && column + 2 <= columns) addTile(data, row, column, columns, range, sums);
      else addEdge(data, row, column, columns, range, sums);
    }
  }
}

function addTile(
  data: Float64Array,
  row: number,
  column: number,
  columns: number,
  range: RowRange,
  sums: Float64Array,
): void {
  const { rowCount, start, end } = range;
  const length = end - start;
  let a0 = row * rowCount + start;
  const a1 = rowCount,
    a2 = 2 * rowCount,
    a3 = 3 * rowCount;
  let b0 = column * rowCount + start;
  let s00 = 0,
    s01 = 0,
    s10 = 0,
    s11 = 0,
    s20 = 0,
    s21 = 0,
    s30 = 0,
    s31 = 0;
  for (let step = 0; step < length; step += 1) {
    const x = data[b0];
    const y = data[b0 + a1];
    const p = data[a0],
      q = data[a0 + a1],
      r = data[a0 + a2],
      t = data[a0 + a3];
    s00 += p * x;
    s01 += p * y;
    s10 += q * x;
    s11 += q * y;
    s20 += r * x;
    s21 += r * y;
    s30 += t * x;
    s31 += t * y;
    a0 += 1;
    b0 += 1;
  }
  const at = row * columns + column;
  sums[at] += s00;
  sums[at + 1] += s01;
  sums[at + columns] += s10;
  sums[at + columns + 1] += s11;
  sums[at + 2 * columns] += s20;
  sums[at + 2 * columns + 1] += s21;
  sums[at + 3 * columns] += s30;
  sums[at + 3 * columns + 1] += s31;
}

function addEdge(
  data: Float64Array,
  row: number,
  column: number,
  columns: number,
  range: RowRange,
  sums: Float64Array,
): void {
  const { rowCount, start, end } = range;
  for (let i = row; i < Math.min(row + 4, columns); i += 1) {
    for (let j = column; j < Math.min(column + 2, columns); j += 1) {
      let sum = 0;
      const first = i * rowCount,
        second = j * rowCount;
      for (let step = start; step < end; step += 1) sum += data[first + step] * data[second + step];
      sums[i * columns + j] += sum;
    }
  }
}

function mirrorLower(sums: Float64Array, columns: number): void {
  for (let i = 0; i < columns; i += 1) {
    for (let j = i + 1; j < columns; j += 1) sums[i * columns + j] = sums[j * columns + i];
  }
}
