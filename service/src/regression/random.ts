/** Seeded generator of uniform numbers in [0, 1): mulberry32 (public domain, Tommy Ettinger 2017). Not for secrets. */
export type Random = () => number;

export function seededRandom(seed: number): Random {
  let state = seed >>> 0;
  return () => {
    state = (state + 0x6d2b79f5) >>> 0;
    let mixed = state;
    mixed = Math.imul(mixed ^ (mixed >>> 15), mixed | 1);
    mixed ^= mixed + Math.imul(mixed ^ (mixed >>> 7), mixed | 61);
    return ((mixed ^ (mixed >>> 14)) >>> 0) / 4294967296;
  };
}

/** The numbers 0 … count−1 in random order (Fisher and Yates). */
export function shuffledOrder(count: number, random: Random): Int32Array {
  const order = Int32Array.from({ length: count }, (_, index) => index);
  for (let last = count - 1; last > 0; last -= 1) {
    const other = Math.floor(random() * (last + 1));
    [order[last], order[other]] = [order[other], order[last]];
  }
  return order;
}
