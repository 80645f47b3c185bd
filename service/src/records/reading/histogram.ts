export interface Histogram {
  readonly edges: readonly number[];
  readonly counts: readonly number[];
}

const bins = 20;

/** Rising from minimum to maximum, equally far apart; just these two when nothing fits between them. */
function edgesBetween(minimum: number, maximum: number): number[] {
  const width = (maximum - minimum) / bins;
  if (!(width > 0) || width === Infinity) return [minimum, maximum];
  return Array.from({ length: bins + 1 }, (_, edge) => (edge === bins ? maximum : minimum + edge * width));
}

/**
 * Equal bins from minimum to maximum, the last one closed; one bin when all values are equal. NaN is missing.
 *
 * A reading x is counted in bin i where edge i ≤ x < edge i + 1 holds of the very edges that are told, so that a
 * condition made of these finds the rows that were counted. ⌊(x − minimum) / width⌋ alone may be off by rounding.
 * Cost: one pass.
 */
export function histogramOf(values: Float64Array, minimum: number, maximum: number): Histogram {
  const edges = edgesBetween(minimum, maximum);
  const last = edges.length - 2;
  const width = (maximum - minimum) / (last + 1);
  const counts = new Array<number>(last + 1).fill(0);
  for (let row = 0; row < values.length; row++) {
    const value = values[row];
    if (value !== value) continue;
    let bin = last === 0 ? 0 : Math.min(last, Math.floor((value - minimum) / width));
    while (bin > 0 && value < edges[bin]) bin--;
    while (bin < last && value >= edges[bin + 1]) bin++;
    counts[bin]++;
  }
  return { edges, counts };
}
