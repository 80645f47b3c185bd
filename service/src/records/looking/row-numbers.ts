/** Row numbers from 1 as they stand in an address, parted by commas: each once, rising. */
export const parseNumbers = (text: string): Uint32Array =>
  Uint32Array.from(new Set(text.split(',').map(Number))).sort();

/** Positions that meet the condition and are listed too, when both are given; rising. */
export function chosenRows(met: Uint32Array | null, listed: Uint32Array | null): Uint32Array {
  if (met === null) return listed ?? new Uint32Array(0);
  if (listed === null) return met;
  const wanted = new Set(listed);
  return met.filter((position) => wanted.has(position));
}
