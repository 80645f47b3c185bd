import type { NamedTables, RowNames } from './row-names';
import type { RowMatching } from './row-matching';

/** A stretch of each side that is still to be matched; ends are past the last row. */
interface Stretch {
  readonly fromStart: number;
  readonly fromEnd: number;
  readonly toStart: number;
  readonly toEnd: number;
}

/**
 * Positions of a longest rising subsequence (Fredman 1975, "On computing the length of longest increasing
 * subsequences"). Cost: n log n.
 */
function longestRising(values: ArrayLike<number>): number[] {
  const tails: number[] = [];
  const before = new Int32Array(values.length);
  for (let at = 0; at < values.length; at++) {
    let [low, high] = [0, tails.length];
    while (low < high) {
      const middle = (low + high) >> 1;
      if (values[tails[middle]] < values[at]) low = middle + 1;
      else high = middle;
    }
    before[at] = low > 0 ? tails[low - 1] : -1;
    tails[low] = at;
  }
  const rising: number[] = [];
  for (let at = tails.at(-1) ?? -1; at >= 0; at = before[at]) rising.push(at);
  return rising.reverse();
}

/**
 * Matches rows by their order, in the way known from comparing texts as "patience" (common practice, no published
 * source): equal rows at the two ends of a stretch belong together; so do rows that stand just once in each side's
 * stretch, as far as their order agrees. They part the stretch into shorter ones, which are treated alike. Where no
 * equal rows are left, rows that agree in a third of the columns do the same, so that a row that changed is found
 * beside one that went. What is left is matched from the top, and the surplus was added or removed. Cost: about
 * n log n.
 */
export class OrderMatcher {
  private readonly matching: RowMatching;
  private readonly countFrom: Int32Array;
  private readonly countTo: Int32Array;
  private readonly rowInFrom: Int32Array;
  private readonly open: Stretch[];

  constructor(private readonly named: NamedTables) {
    const { whole, parts } = named;
    const different = Math.max(whole.different, ...parts.map((part) => part.different));
    this.matching = new Int32Array(whole.to.length).fill(-1);
    this.countFrom = new Int32Array(different);
    this.countTo = new Int32Array(different);
    this.rowInFrom = new Int32Array(different);
    this.open = [{ fromStart: 0, fromEnd: whole.from.length, toStart: 0, toEnd: whole.to.length }];
  }

  match(): RowMatching {
    for (let stretch = this.open.pop(); stretch; stretch = this.open.pop()) this.matchStretch(this.trim(stretch));
    return this.matching;
  }

  /** Matches equal rows at the beginning and at the end, and gives what lies between. */
  private trim({ fromStart, fromEnd, toStart, toEnd }: Stretch): Stretch {
    const { from, to } = this.named.whole;
    while (fromStart < fromEnd && toStart < toEnd && from[fromStart] === to[toStart])
      this.matching[toStart++] = fromStart++;
    while (fromStart < fromEnd && toStart < toEnd && from[fromEnd - 1] === to[toEnd - 1])
      this.matching[--toEnd] = --fromEnd;
    return { fromStart, fromEnd, toStart, toEnd };
  }

  private matchStretch(stretch: Stretch): void {
    const { fromStart, fromEnd, toStart, toEnd } = stretch;
    if (fromStart === fromEnd || toStart === toEnd) return;
    for (const names of [this.named.whole, ...this.named.parts]) {
      const anchors = this.anchorsOf(stretch, names);
      if (anchors.length === 0) continue;
      this.partAt(anchors, stretch);
      return;
    }
    const paired = Math.min(fromEnd - fromStart, toEnd - toStart);
    for (let at = 0; at < paired; at++) this.matching[toStart + at] = fromStart + at;
  }

  private partAt(anchors: readonly number[], { fromStart, fromEnd, toStart, toEnd }: Stretch): void {
    let from = fromStart;
    let to = toStart;
    for (const row of anchors) {
      const twin = this.matching[row];
      this.open.push({ fromStart: from, fromEnd: twin, toStart: to, toEnd: row });
      from = twin + 1;
      to = row + 1;
    }
    this.open.push({ fromStart: from, fromEnd, toStart: to, toEnd });
  }

  /** Rows of `to` that stand just once in either side's stretch and keep their order; they are matched. */
  private anchorsOf({ fromStart, fromEnd, toStart, toEnd }: Stretch, { from, to }: RowNames): number[] {
    for (let row = fromStart; row < fromEnd; row++) {
      this.countFrom[from[row]]++;
      this.rowInFrom[from[row]] = row;
    }
    for (let row = toStart; row < toEnd; row++) this.countTo[to[row]]++;
    const alone: number[] = [];
    for (let row = toStart; row < toEnd; row++)
      if (this.countFrom[to[row]] === 1 && this.countTo[to[row]] === 1) alone.push(row);
    const anchors = longestRising(alone.map((row) => this.rowInFrom[to[row]])).map((at) => alone[at]);
    for (const row of anchors) this.matching[row] = this.rowInFrom[to[row]];
    for (let row = fromStart; row < fromEnd; row++) this.countFrom[from[row]] = 0;
    for (let row = toStart; row < toEnd; row++) this.countTo[to[row]] = 0;
    return anchors;
  }
}
