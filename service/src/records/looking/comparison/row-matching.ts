/** For each row of `to` its row in `from`, or −1 where it was added. No row of `from` is taken twice. */
export type RowMatching = Int32Array;

/** Rows of `from` that no row of `to` has: positions from 0, rising. */
export function removedRows(matching: RowMatching, fromRowCount: number): Uint32Array {
  const kept = new Uint8Array(fromRowCount);
  for (const row of matching) if (row >= 0) kept[row] = 1;
  return positionsOf(kept, 0);
}

export function addedRows(matching: RowMatching): Uint32Array {
  return positionsOf(matching, -1);
}

function positionsOf(values: Int32Array | Uint8Array, wanted: number): Uint32Array {
  let count = 0;
  const positions = new Uint32Array(values.length);
  for (let row = 0; row < values.length; row++) if (values[row] === wanted) positions[count++] = row;
  return positions.slice(0, count);
}
