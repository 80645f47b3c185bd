/**
 * Counts different numbers with an open-addressing table of their bits (linear probing, at most half full; Knuth
 * 1998, The Art of Computer Programming 3, section 6.4, algorithm L). One table serves every column of a file, so
 * that memory stays at 32 MB however long the columns are. Cost: linear, against n log n for sorting.
 */
export class DistinctCounter {
  private readonly slots: Float64Array;
  private readonly mask: number;
  private readonly bits = new Float64Array(1);
  private readonly words = new Uint32Array(this.bits.buffer);

  /** `limit`: counting stops above it. */
  constructor(
    rowCount: number,
    private readonly limit: number,
  ) {
    const size = 2 ** Math.ceil(Math.log2(2 * Math.max(8, Math.min(rowCount, limit + 1))));
    this.slots = new Float64Array(size);
    this.mask = size - 1;
  }

  /** How many different numbers there are, NaN apart; null above the limit. */
  count(values: Float64Array): number | null {
    const { slots, limit } = this;
    slots.fill(0);
    // An empty slot holds zero, so zero itself is counted aside.
    let zero = 0;
    let distinct = 0;
    for (const value of values) {
      if (value === 0) zero = 1;
      else if (value === value) {
        const slot = this.find(value);
        if (slots[slot] === 0) {
          if (++distinct + zero > limit) return null;
          slots[slot] = value;
        }
      }
    }
    return distinct + zero > limit ? null : distinct + zero;
  }

  /** The slot that holds the value, or the empty one where it belongs. */
  private find(value: number): number {
    const { slots, mask } = this;
    this.bits[0] = value;
    // Odd multipliers spread both halves of the bits over the whole word (Knuth, section 6.4, multiplicative hashing).
    const mixed = Math.imul(this.words[0] ^ Math.imul(this.words[1], 0x9e3779b1), 0x85ebca6b);
    let slot = (mixed ^ (mixed >>> 15)) & mask;
    while (slots[slot] !== 0 && slots[slot] !== value) slot = (slot + 1) & mask;
    return slot;
  }
}
