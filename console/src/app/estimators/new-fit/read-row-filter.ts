import type { RecordRevision, Specification } from '../../api/contract';
import { daysOf } from '../../ui/moment';
import { typedNumber } from '../words/typed-number';
import type { FitDraft } from './fit-draft';

type RowFilter = NonNullable<Specification['rowFilter']>;
export type FilterProblems = Readonly<Record<string, string>>;

/** The records asked for, or what is wrong with the asking; nothing when all are to be used. */
export function readRowFilter(
  draft: FitDraft,
  revision: RecordRevision,
): { readonly filter?: RowFilter; readonly problems: FilterProblems } {
  const column = revision.columns.find(({ name }) => name === draft.filterColumn);
  if (!column) return { problems: {} };
  if (column.kind === 'category') return readLevels(draft);
  const read = column.kind === 'date' ? readDay : readBound;
  return readRange(draft, read);
}

function readLevels({ filterColumn, filterLevels }: FitDraft): ReturnType<typeof readRowFilter> {
  if (filterLevels.length === 0)
    return { problems: { equals: `Tick what ${filterColumn} may be, or use all records.` } };
  return { filter: { column: filterColumn, equals: [...filterLevels] }, problems: {} };
}

type Bound = { readonly value: number } | { readonly problem: string } | { readonly empty: true };

function readRange(
  { filterColumn, filterFrom, filterTo }: FitDraft,
  read: (text: string) => Bound,
): ReturnType<typeof readRowFilter> {
  const from = read(filterFrom);
  const to = read(filterTo);
  const problems = {
    ...('problem' in from ? { from: from.problem } : {}),
    ...('problem' in to ? { to: to.problem } : {}),
  };
  if (Object.keys(problems).length > 0) return { problems };
  if ('empty' in from && 'empty' in to)
    return { problems: { from: 'Say from where, or up to where, or use all records.' } };
  if ('value' in from && 'value' in to && from.value > to.value)
    return { problems: { to: 'This end lies before the other.' } };
  const ends = { ...('value' in from ? { from: from.value } : {}), ...('value' in to ? { to: to.value } : {}) };
  return { filter: { column: filterColumn, ...ends }, problems: {} };
}

function readBound(text: string): Bound {
  return typedNumber(text);
}

/** Dates are asked for as days since 1970-01-01. */
function readDay(text: string): Bound {
  if (text === '') return { empty: true };
  const days = daysOf(text);
  return Number.isFinite(days) ? { value: days } : { problem: 'Enter a day such as 2026-03-31.' };
}
