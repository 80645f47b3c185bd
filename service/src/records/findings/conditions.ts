import { maximumFormulaLength } from '../mending/formula-tokens';

/** Words that mean something else in a formula. */
const reserved: ReadonlySet<string> = new Set(['and', 'or', 'not', 'is', 'missing']);
const plainName = /^[\p{L}_][\p{L}\p{N}_]*$/u;

/** A column's name as a formula has it; undefined for one that begins or ends with a space, which none can name. */
function nameText(name: string): string | undefined {
  if (name !== name.trim()) return undefined;
  return plainName.test(name) && !reserved.has(name.toLowerCase()) ? name : `[${name.replaceAll(']', ']]')}]`;
}

const fitting = (condition: string): string | undefined =>
  condition !== '' && condition.length <= maximumFormulaLength ? condition : undefined;

/** `name = "a" or name = "b"`. */
export function oneOfTexts(name: string, texts: readonly string[]): string | undefined {
  const column = nameText(name);
  if (column === undefined) return undefined;
  return fitting(texts.map((text) => `${column} = "${text.replaceAll('"', '""')}"`).join(' or '));
}

/** The number with the fewest digits above `low` (or at it, when `withLow`) and below `high` (or at it, when not). */
export function shortestBetween(low: number, high: number, withLow: boolean): number {
  const fits = (value: number): boolean => (withLow ? value >= low && value < high : value > low && value <= high);
  const middle = low / 2 + high / 2;
  for (let digits = 1; digits <= 17; digits++) {
    const value = Number(middle.toPrecision(digits));
    if (fits(value)) return value;
  }
  return withLow ? low : high;
}

interface Neighbours {
  /** Among the chosen: least and greatest. */
  readonly least: number;
  readonly greatest: number;
  /** Among the others: least and greatest, and the nearest below and above the chosen. */
  readonly otherLeast: number;
  readonly otherGreatest: number;
  readonly between: boolean;
  readonly below: number;
  readonly above: number;
  /** The chosen nearest to the others from below and from above. */
  readonly lowest: number;
  readonly highest: number;
}

function neighboursOf(values: Float64Array, chosen: Uint8Array): Neighbours {
  let [least, greatest, otherLeast, otherGreatest] = [Infinity, -Infinity, Infinity, -Infinity];
  values.forEach((value, row) => {
    if (chosen[row] === 1) [least, greatest] = [Math.min(least, value), Math.max(greatest, value)];
    else if (value === value)
      [otherLeast, otherGreatest] = [Math.min(otherLeast, value), Math.max(otherGreatest, value)];
  });
  let [below, above, lowest, highest, between] = [-Infinity, Infinity, -Infinity, Infinity, false];
  values.forEach((value, row) => {
    if (chosen[row] === 1) {
      if (value < otherLeast) lowest = Math.max(lowest, value);
      if (value > otherGreatest) highest = Math.min(highest, value);
      between ||= value >= otherLeast && value <= otherGreatest;
    } else if (value < least) below = Math.max(below, value);
    else if (value > greatest) above = Math.min(above, value);
  });
  return { least, greatest, otherLeast, otherGreatest, between, below, above, lowest, highest };
}

/** Rows of the chosen stretch only: no other reading lies between the least and the greatest of them. */
const alone = (values: Float64Array, chosen: Uint8Array, { least, greatest }: Neighbours): boolean =>
  values.every((value, row) => chosen[row] === 1 || !(value >= least && value <= greatest));

/**
 * A condition that the readings at `positions` (from 0, none missing) meet and no others of the column: all of them
 * outside the others, or all in one stretch without others. Its bounds have as few digits as will do. Undefined where
 * no such bounds part them. Cost: three passes.
 */
export function boundsAround(name: string, values: Float64Array, positions: readonly number[]): string | undefined {
  const column = nameText(name);
  if (column === undefined || positions.length === 0) return undefined;
  const chosen = new Uint8Array(values.length);
  for (const position of positions) chosen[position] = 1;
  const found = neighboursOf(values, chosen);
  if (found.otherLeast > found.otherGreatest) return `${column} is not missing`;
  const parts: string[] = [];
  if (!found.between) {
    if (found.lowest > -Infinity) parts.push(`${column} < ${shortestBetween(found.lowest, found.otherLeast, false)}`);
    if (found.highest < Infinity)
      parts.push(`${column} > ${shortestBetween(found.otherGreatest, found.highest, true)}`);
    return fitting(parts.join(' or '));
  }
  if (!alone(values, chosen, found)) return undefined;
  parts.push(`${column} >= ${shortestBetween(found.below, found.least, false)}`);
  parts.push(`${column} <= ${shortestBetween(found.greatest, found.above, true)}`);
  return fitting(parts.join(' and '));
}
