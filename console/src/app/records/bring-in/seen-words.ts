import type { ProposedColumn, ReadingProposal } from '../../api/contract';
import { countOf, formatCount } from '../../ui/figure';
import { formatReading } from '@widget/format/number-format';

const LOCALE = 'en-GB';

type UnitInCells = ProposedColumn['unitsInCells'][number];

/** What was seen in a column's cells, a sentence each. What the doubts say already is not said twice. */
export function seenWords(column: ProposedColumn): readonly string[] {
  const { missingCount, unreadableCount, unitsInCells, unit, doubts } = column;
  const converted = unitsInCells.length > 1 ? unitsInCells.filter(({ factor }) => factor !== 1) : unitsInCells;
  return [
    missingCount > 0 ? `${formatCount(missingCount)} missing.` : '',
    unreadableCount > 0 && doubts.length === 0 ? unreadableWords(column) : '',
    ...converted.map((seen) => unitWords(seen, unit)),
  ].filter((words) => words !== '');
}

function unreadableWords({ unreadableCount, kind }: ProposedColumn): string {
  return `${countOf(unreadableCount, 'cell')} cannot be read as ${KIND_NOUNS[kind]} and would be missing.`;
}

const KIND_NOUNS: Readonly<Record<ProposedColumn['kind'], string>> = {
  numeric: 'a number',
  date: 'a date',
  category: 'a category',
  text: 'text',
};

function unitWords({ unit, count, factor }: UnitInCells, into: string | null): string {
  const stands = `“${unit}” stands behind ${countOf(count, 'number')}`;
  if (factor === null) return `${stands}${into ? ` and cannot be converted to ${into}` : ''}.`;
  if (factor === 1) return `${stands}.`;
  return `${stands}: multiplied by ${formatReading(factor, LOCALE)}${into ? ` to give ${into}` : ''}.`;
}

/** Whether a person should look at a column before it counts. */
export function wantsALook({ unreadableCount, suspectMarks, doubts, unitsInCells }: ProposedColumn): boolean {
  const unconverted = unitsInCells.some(({ factor }) => factor === null);
  return unreadableCount > 0 || suspectMarks.length > 0 || doubts.length > 0 || unconverted;
}

/** What the counts rest on. */
export function basisWords({ rowsLookedAt, complete }: ReadingProposal): string {
  const rows = countOf(rowsLookedAt, 'row');
  return complete
    ? `${rows}, all that the file has`
    : `the first ${rows}; where you choose no kind, the whole file decides`;
}
