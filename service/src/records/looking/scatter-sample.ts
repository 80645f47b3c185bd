import { seededRandom } from '../../regression/random';

export interface ScatterPoints {
  /** Rows where both are present. */
  readonly total: number;
  readonly points: readonly { readonly x: number; readonly y: number; readonly row: number }[];
}

const scatterPoints = 2000;
/** Any number would do; a fixed one gives the same rows every time. */
const seed = 1;

/**
 * The rows where both are present: all of them, or a sample without replacement of 2,000, drawn by the first steps
 * of a shuffle (Knuth 1998, volume 2, section 3.4.2, algorithm P) with a fixed seed. Cost: one pass.
 */
export function scatterSample(x: Float64Array, y: Float64Array): ScatterPoints {
  const present = new Uint32Array(x.length);
  let total = 0;
  for (let row = 0; row < x.length; row++) if (x[row] === x[row] && y[row] === y[row]) present[total++] = row;
  const count = Math.min(total, scatterPoints);
  if (total > count) {
    const random = seededRandom(seed);
    for (let at = 0; at < count; at++) {
      const other = at + Math.floor(random() * (total - at));
      [present[at], present[other]] = [present[other], present[at]];
    }
  }
  const rows = present.slice(0, count).sort();
  return { total, points: Array.from(rows, (row) => ({ x: x[row], y: y[row], row: row + 1 })) };
}
