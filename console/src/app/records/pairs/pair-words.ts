import type { Correlations, RecordColumn } from '../../api/contract';
import type { PlotVariable } from '../../ui/plots/plot-axis';
import { correlationText, type Pair } from '../../ui/plots/correlation-map';

/** Two columns and how they go together. */
export interface PairRow extends Pair {
  /** Null where one of the two does not vary. */
  readonly correlation: number | null;
  readonly strength: number;
  readonly count: number;
}

/** Columns that can be set against each other. */
export function pairable(columns: readonly RecordColumn[]): readonly RecordColumn[] {
  return columns.filter(({ kind }) => kind === 'numeric' || kind === 'date');
}

/** Every pair once, in the order of the map. */
export function pairsOf({ columns, correlations, counts }: Correlations): readonly PairRow[] {
  return columns.flatMap((y, row) =>
    columns.slice(0, row).map((x, column) => {
      const correlation = correlations[row][column];
      return { x, y, correlation, strength: Math.abs(correlation ?? 0), count: counts[row][column] };
    }),
  );
}

/** Two decimals and the sign. */
export function correlationWords(correlation: number | null): string {
  return correlation === null ? 'none: one of them does not vary' : correlationText(correlation);
}

export function strongestOf(pairs: readonly PairRow[]): PairRow | undefined {
  return pairs.reduce<PairRow | undefined>(
    (strongest, pair) => (pair.strength > (strongest?.strength ?? -1) ? pair : strongest),
    undefined,
  );
}

export function variableOf(columns: readonly RecordColumn[], name: string): PlotVariable {
  const column = columns.find((each) => each.name === name);
  return { name, unit: column?.unit ?? null, date: column?.kind === 'date' };
}
