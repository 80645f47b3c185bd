/**
 * Answers that are remembered, the least lately used forgotten first. A revision never changes, so nor does what was
 * found in it. Work that is under way is shared; work that failed is not remembered.
 */
export class Remembered<Value> {
  private readonly known = new Map<string, { readonly value: Promise<Value>; weight: number }>();

  constructor(
    /** The most that is remembered, in the unit of `weightOf`. */
    private readonly capacity: number,
    private readonly weightOf: (value: Value) => number,
  ) {}

  async get(key: readonly (string | null)[], work: () => Promise<Value>): Promise<Value> {
    const text = JSON.stringify(key);
    const known = this.known.get(text);
    if (known) {
      this.known.delete(text);
      this.known.set(text, known);
      return known.value;
    }
    const entry = { value: work(), weight: 0 };
    this.known.set(text, entry);
    try {
      const value = await entry.value;
      entry.weight = this.weightOf(value);
      this.forgetOldest();
      return value;
    } catch (error) {
      this.known.delete(text);
      throw error;
    }
  }

  private forgetOldest(): void {
    let held = [...this.known.values()].reduce((total, { weight }) => total + weight, 0);
    for (const [key, { weight }] of this.known) {
      if (held <= this.capacity) return;
      if (weight === 0) continue;
      this.known.delete(key);
      held -= weight;
    }
  }
}
