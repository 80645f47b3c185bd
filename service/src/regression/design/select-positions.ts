import type { DesignMatrix } from './design-matrix';

/** The same design with only some of its records, in the order given. Cost and memory: positions × columns. */
export function selectPositions(design: DesignMatrix, positions: Int32Array): DesignMatrix {
  const { rowCount, columnCount, data } = design;
  const count = positions.length;
  const selected = new Float64Array(count * (columnCount + 2));
  for (let column = 0; column < columnCount + 2; column += 1) {
    const from = column * rowCount;
    const to = column * count;
    for (let row = 0; row < count; row += 1) selected[to + row] = data[from + positions[row]];
  }
  return { ...design, rowCount: count, data: selected };
}
