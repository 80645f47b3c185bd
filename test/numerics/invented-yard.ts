import type { RecordTable } from '../../service/src/regression/records';
import { seededRandom, type Random } from '../../service/src/regression/random';

/** Standard normal numbers (Box and Muller 1958) from the seeded generator. */
export function normalNumbers(random: Random): () => number {
  return () => Math.sqrt(-2 * Math.log(1 - random())) * Math.cos(2 * Math.PI * random());
}

const HULLS = ['glass fibre', 'steel', 'wood', 'aluminium'];

/** Invented refits: overlapping lengths, a category, gaps, a date, a positive target whose logarithm is nearly linear. */
export function inventedRefits(count: number, seed: number): RecordTable {
  const random = seededRandom(seed);
  const normal = normalNumbers(random);
  const length = new Float64Array(count),
    waterline = new Float64Array(count),
    draught = new Float64Array(count);
  const day = new Float64Array(count),
    labour = new Float64Array(count);
  const hull = new Int32Array(count),
    yard = new Int32Array(count);
  for (let row = 0; row < count; row += 1) {
    length[row] = 6 + 12 * random();
    waterline[row] = 0.85 * length[row] + 0.1 * normal();
    draught[row] = random() < 0.1 ? NaN : 0.9 + 0.08 * length[row] + 0.15 * normal();
    hull[row] = Math.floor(random() * HULLS.length);
    yard[row] = Math.floor(random() * 7);
    day[row] = 18000 + Math.floor(2000 * random());
    labour[row] = Math.exp(1.5 + 0.9 * Math.log(length[row]) + 0.15 * hull[row] + 0.05 * normal() + 0.02 * yard[row]);
  }
  return {
    rowCount: count,
    columns: [
      { name: 'length', kind: 'numeric', unit: 'm', values: length },
      { name: 'waterline', kind: 'numeric', unit: 'm', values: waterline },
      { name: 'draught', kind: 'numeric', unit: 'm', values: draught },
      { name: 'hull', kind: 'category', codes: hull, levels: HULLS },
      { name: 'yard', kind: 'category', codes: yard, levels: ['A', 'B', 'C', 'D', 'E', 'F', 'G'] },
      { name: 'booked', kind: 'date', values: day },
      { name: 'labour', kind: 'numeric', unit: 'h', values: labour },
    ],
  };
}
