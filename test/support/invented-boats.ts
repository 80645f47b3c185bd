import type { RecordTable } from '../../service/src/regression/records';

/** Park and Miller 1988, "Random number generators: good ones are hard to find", so that a failure can be repeated. */
function randomSource(seed: number): () => number {
  let state = seed;
  return () => (state = (state * 48271) % 2147483647) / 2147483647;
}

export const boatCount = 600;

/** Clean records of boats: length and what goes with it, labour, hulls and days. Invented. */
export function cleanBoats(seed = 11) {
  const next = randomSource(seed);
  const normal = (): number => Math.sqrt(-2 * Math.log(next())) * Math.cos(2 * Math.PI * next());
  const length = Float64Array.from({ length: boatCount }, () => 10 * Math.exp(0.3 * normal()));
  const like = (scale: number, power: number) =>
    length.map((metres) => scale * metres ** power * Math.exp(0.06 * normal()));
  return {
    length,
    waterline: like(0.9, 1),
    beam: like(0.7, 0.7),
    draught: like(0.3, 0.8),
    labour: length.map((metres) => 4 * metres + 10 * normal()),
    hulls: Int32Array.from({ length: boatCount }, () => Math.floor(next() * 3)),
    levels: ['steel', 'oak', 'larch'],
    days: Float64Array.from({ length: boatCount }, (_, row) => 19_000 + row),
  };
}

export type Boats = ReturnType<typeof cleanBoats>;

export function tableOf(boats: Boats, more: RecordTable['columns'] = []): RecordTable {
  const numeric = (name: string, values: Float64Array) => ({ name, kind: 'numeric' as const, values });
  return {
    rowCount: boatCount,
    columns: [
      numeric('length', boats.length),
      numeric('waterline', boats.waterline),
      numeric('beam', boats.beam),
      numeric('draught', boats.draught),
      numeric('labour', boats.labour),
      { name: 'hull', kind: 'category', codes: boats.hulls, levels: boats.levels },
      { name: 'day', kind: 'date', values: boats.days },
      ...more,
    ],
  };
}
