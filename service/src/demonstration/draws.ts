import { seededRandom } from '../regression/random';

/** Draws from one seeded stream: the same seed gives the same numbers in the same order. */
export class Draws {
  private readonly random: () => number;

  constructor(seed: number) {
    this.random = seededRandom(seed);
  }

  /** Uniform in [from, to). */
  between(from: number, to: number): number {
    return from + (to - from) * this.random();
  }

  /** A whole number from `from` to `to`, both possible. */
  whole(from: number, to: number): number {
    return Math.floor(this.between(from, to + 1));
  }

  chance(probability: number): boolean {
    return this.random() < probability;
  }

  /** Standard normal (Box and Muller 1958). */
  normal(): number {
    const radius = Math.sqrt(-2 * Math.log(1 - this.random()));
    return radius * Math.cos(2 * Math.PI * this.random());
  }

  /** A factor about 1: exp(spread · normal). */
  factor(spread: number): number {
    return Math.exp(spread * this.normal());
  }

  /** One of the names, as often as its share says. */
  oneOf<Name extends string>(shares: Readonly<Record<Name, number>>): Name {
    const entries = Object.entries(shares) as [Name, number][];
    let left = this.random() * entries.reduce((sum, [, share]) => sum + share, 0);
    for (const [name, share] of entries) {
      left -= share;
      if (left < 0) return name;
    }
    return entries[entries.length - 1][0];
  }

  /** `count` different positions below `length`, ascending. */
  positions(count: number, length: number): number[] {
    const chosen = new Set<number>();
    while (chosen.size < Math.min(count, length)) chosen.add(this.whole(0, length - 1));
    return [...chosen].sort((first, second) => first - second);
  }
}

export function roundTo(value: number, step: number): number {
  // Divided by the whole number of steps in one unit, so that 7.1 does not become 7.1000000000000005.
  return step < 1 ? Math.round(value / step) / Math.round(1 / step) : Math.round(value / step) * step;
}
