import type { RecordColumn } from '../../api/contract';
import type { Steps } from './steps-history';

export interface LevelCount {
  readonly value: string;
  /** As in the revision that is mended: rows dropped since are counted too. */
  readonly count: number;
}

/**
 * A category's levels as they stand after the steps, followed back through renaming and mapping to the revision's own
 * column. Undefined where that cannot be known here: the column was no category, or its rare levels were joined.
 */
export function levelsAt(
  columns: readonly RecordColumn[],
  steps: Steps,
  name: string,
): readonly LevelCount[] | undefined {
  const step = steps.at(-1);
  if (step === undefined) return ownLevels(columns, name);
  const earlier = (column: string): readonly LevelCount[] | undefined => levelsAt(columns, steps.slice(0, -1), column);
  if (step.kind === 'rename' && step.to === name) return earlier(step.column);
  if (step.kind === 'map-levels' && step.column === name) return mapped(earlier(name), step.levels);
  if ((step.kind === 'join-rare-levels' || step.kind === 'set-kind') && step.column === name) return undefined;
  return earlier(name);
}

function ownLevels(columns: readonly RecordColumn[], name: string): readonly LevelCount[] | undefined {
  const column = columns.find((candidate) => candidate.name === name);
  return column?.kind === 'category' ? column.levels : undefined;
}

function mapped(
  levels: readonly LevelCount[] | undefined,
  map: Readonly<Record<string, string>>,
): readonly LevelCount[] | undefined {
  if (levels === undefined) return undefined;
  const counts = new Map<string, number>();
  for (const { value, count } of levels) {
    const name = Object.hasOwn(map, value) ? map[value] : value;
    counts.set(name, (counts.get(name) ?? 0) + count);
  }
  return [...counts].map(([value, count]) => ({ value, count })).sort((a, b) => b.count - a.count);
}
