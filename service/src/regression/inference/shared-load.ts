import type { SharedLoadGroup } from '../result';
import { symmetricEigen } from './condition';

/** Average |correlation| at which two groups of inputs are still joined. */
const JOIN_AT = 0.8;
/** Condition index from which a direction counts as near-null (Belsley, Kuh and Welsch 1980, section 3.2). */
const NEAR_NULL_INDEX = 30;
/** Share of the largest entry of a near-null direction from which an input takes part in it. */
const TAKES_PART = 0.3;
const SMALL_RIDGE = 1e-9;

export interface SharedLoadSource {
  /** Correlations of the kept columns, row-major. */
  readonly gram: Float64Array;
  readonly size: number;
  /** Kept columns of each input, in order; inputs without any are left out. */
  readonly inputs: readonly { readonly name: string; readonly positions: readonly number[] }[];
}

export type FoundGroup = Pick<SharedLoadGroup, 'found' | 'smallestCorrelation'> & {
  readonly members: readonly number[];
};

/**
 * Groups of inputs that carry the same information: by average-linkage clustering on the largest canonical correlation between
 * their columns (for two plain inputs, |correlation|), and by near-null directions of the correlation matrix, in which several
 * inputs nearly cancel although no two of them need be close. Cost O(inputs³) + one eigendecomposition.
 */
export function findSharedLoad(source: SharedLoadSource): FoundGroup[] {
  const correlations = inputCorrelations(source);
  const clusters: FoundGroup[] = averageLinkage(correlations)
    .filter((members) => members.length > 1)
    .map((members) => ({
      members,
      found: 'correlation' as const,
      smallestCorrelation: smallest(correlations, members),
    }));
  const known = clusters.map((group) => group.members);
  const directions = nearNullGroups(source).filter(
    (members) => !known.some((group) => members.every((member) => group.includes(member))),
  );
  const distinct = directions.filter(
    (members, at) => directions.findIndex((other) => other.join() === members.join()) === at,
  );
  return [
    ...clusters,
    ...distinct.map((members) => ({
      members,
      found: 'near-null direction' as const,
      smallestCorrelation: smallest(correlations, members),
    })),
  ];
}

function smallest(correlations: readonly (readonly number[])[], members: readonly number[]): number {
  return members.reduce(
    (least, a) => members.reduce((inner, b) => (a === b ? inner : Math.min(inner, correlations[a][b])), least),
    1,
  );
}

function inputCorrelations({ inputs, gram, size }: SharedLoadSource): number[][] {
  const correlations = inputs.map(() => new Array<number>(inputs.length).fill(1));
  inputs.forEach((first, a) =>
    inputs.slice(0, a).forEach((second, b) => {
      correlations[a][b] = canonicalCorrelation(gram, size, first.positions, second.positions);
      correlations[b][a] = correlations[a][b];
    }),
  );
  return correlations;
}

/** Largest canonical correlation (Hotelling 1936) between two sets of standardised columns; 1 at most. */
function canonicalCorrelation(
  gram: Float64Array,
  size: number,
  first: readonly number[],
  second: readonly number[],
): number {
  if (first.length === 1 && second.length === 1) return Math.min(1, Math.abs(gram[first[0] * size + second[0]]));
  const a = whitener(gram, size, first);
  const b = whitener(gram, size, second);
  const whitened = a.map((left) =>
    b.map((right) =>
      left.reduce(
        (sum, x, i) => sum + x * right.reduce((inner, y, j) => inner + y * gram[first[i] * size + second[j]], 0),
        0,
      ),
    ),
  );
  const { values } = symmetricEigen(whitened.length, (i, j) =>
    whitened[i].reduce((sum, value, k) => sum + value * whitened[j][k], 0),
  );
  return Math.sqrt(Math.min(1, Math.max(0, ...values)));
}

/** Rows u with uᵀSu = 1 that span the columns' directions. */
function whitener(gram: Float64Array, size: number, positions: readonly number[]): number[][] {
  const { values, vectors } = symmetricEigen(positions.length, (i, j) => gram[positions[i] * size + positions[j]]);
  const floor = SMALL_RIDGE * Math.max(...values);
  return values.flatMap((value, k) =>
    value > floor ? [positions.map((_, i) => vectors.get(i, k) / Math.sqrt(value))] : [],
  );
}

function averageLinkage(correlations: readonly (readonly number[])[]): number[][] {
  const groups = correlations.map((_, at) => [at]);
  const average = (a: readonly number[], b: readonly number[]): number =>
    a.reduce((sum, i) => sum + b.reduce((inner, j) => inner + correlations[i][j], 0), 0) / (a.length * b.length);
  for (;;) {
    let best: { a: number; b: number; value: number } | null = null;
    for (let a = 1; a < groups.length; a += 1) {
      for (let b = 0; b < a; b += 1) {
        const value = average(groups[a], groups[b]);
        if (value >= JOIN_AT && (best === null || value > best.value)) best = { a, b, value };
      }
    }
    if (best === null) return groups.map((group) => group.sort((first, second) => first - second));
    groups[best.b].push(...groups[best.a]);
    groups.splice(best.a, 1);
  }
}

function nearNullGroups({ gram, size, inputs }: SharedLoadSource): number[][] {
  const columns = inputs.flatMap((input, at) =>
    input.positions.length === 1 ? [{ at, position: input.positions[0] }] : [],
  );
  if (columns.length < 2) return [];
  const { values, vectors } = symmetricEigen(
    columns.length,
    (i, j) => gram[columns[i].position * size + columns[j].position],
  );
  const largest = Math.max(...values);
  return values.flatMap((value, k) => {
    if (value > 0 && Math.sqrt(largest / value) < NEAR_NULL_INDEX) return [];
    const entries = columns.map((_, i) => Math.abs(vectors.get(i, k)));
    const bar = TAKES_PART * Math.max(...entries);
    const members = columns.flatMap(({ at }, i) => (entries[i] >= bar ? [at] : []));
    return members.length > 1 ? [members] : [];
  });
}
