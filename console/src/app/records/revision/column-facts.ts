import { withUnit } from '@widget/format/number-format';
import type { RecordColumn } from '../../api/contract';
import { NO_FIGURE, formatCount, formatShare } from '../../ui/figure';
import {
  KIND_WORDS,
  betweenReadings,
  cellOf,
  distinctOf,
  meanOf,
  missingOf,
  shareWords,
  spreadOf,
} from './column-words';
import { atMostIn, equalIn, levelIn, missingIn, otherLevelsIn, outsideIn, stretchIn } from './rows-condition';

/** A figure of a column, and the rows behind it where there are any. */
export interface ColumnFact {
  readonly name: string;
  readonly value: string;
  readonly where?: string;
}

/** Facts that the column has. */
export function factsOf(column: RecordColumn, rowCount: number): readonly ColumnFact[] {
  const inUnit = (figure: string): string => (figure === NO_FIGURE ? figure : withUnit(figure, column.unit));
  const facts: readonly ColumnFact[] = [
    { name: 'Kind', value: KIND_WORDS[column.kind] },
    { name: 'Unit', value: unitOf(column) },
    {
      name: 'Missing',
      value: missingOf(column, rowCount),
      where: column.missingCount > 0 ? missingIn(column) : undefined,
    },
    { name: 'Distinct values', value: distinctOf(column) },
    endOf('Minimum', column, column.minimum),
    endOf('Maximum', column, column.maximum),
    { name: 'Mean', value: inUnit(meanOf(column)) },
    { name: 'Standard deviation', value: inUnit(spreadOf(column)) },
  ];
  return facts.filter(({ value }) => value !== NO_FIGURE);
}

function unitOf({ kind, unit }: RecordColumn): string {
  if (kind !== 'numeric') return NO_FIGURE;
  return unit ?? 'none';
}

function endOf(name: string, column: RecordColumn, value: number | null): ColumnFact {
  if (value === null) return { name, value: NO_FIGURE };
  return { name, value: withUnit(cellOf(value, column.kind), column.unit), where: equalIn(column, value) };
}

/** Quantiles, each with the rows up to it. */
export function quantilesOf(column: RecordColumn): readonly ColumnFact[] {
  return (column.quantiles ?? []).map(({ share, value }) => ({
    name: shareWords(share),
    value: withUnit(betweenReadings(value, column.kind), column.unit),
    where: atMostIn(column, value),
  }));
}

export function outlyingRowsOf(column: RecordColumn): string | undefined {
  const { outlying } = column;
  return outlying && outlying.count > 0 ? outsideIn(column, outlying.low, outlying.high) : undefined;
}

export interface BinFact {
  readonly from: string;
  readonly to: string;
  readonly count: string;
  readonly where?: string;
}

export function binsOf(column: RecordColumn): readonly BinFact[] {
  const { edges, counts } = column.histogram ?? { edges: [], counts: [] };
  return counts.map((count, index) => {
    const [from, to] = [edges[index], edges[index + 1]];
    return {
      from: betweenReadings(from, column.kind),
      to: betweenReadings(to, column.kind),
      count: formatCount(count),
      where: count > 0 ? stretchIn(column, { from, to, closed: index === counts.length - 1 }) : undefined,
    };
  });
}

export interface LevelFact {
  readonly name: string;
  readonly count: string;
  readonly share: string;
  readonly percent: number;
  readonly where?: string;
}

/** Levels beyond these are summed into one line. */
const LEVELS_SHOWN = 12;

export function levelsOf(column: RecordColumn, rowCount: number): readonly LevelFact[] {
  const present = Math.max(1, rowCount - column.missingCount);
  const shown = column.levels.slice(0, LEVELS_SHOWN);
  const facts = shown.map(({ value, count }) => levelFact(value, count / present, count, levelIn(column, value)));
  const others = present - shown.reduce((sum, { count }) => sum + count, 0);
  if (others <= 0 || shown.length === 0) return facts;
  const otherRows = otherLevelsIn(
    column,
    shown.map(({ value }) => value),
  );
  return [...facts, levelFact('All others', others / present, others, otherRows)];
}

function levelFact(name: string, share: number, count: number, where: string | undefined): LevelFact {
  return { name, count: formatCount(count), share: formatShare(share), percent: 100 * share, where };
}
