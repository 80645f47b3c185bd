import type { JournalFilter } from '../api/contract';

/** The filter as the address holds it; days as date fields give them. */
export interface JournalQuery {
  readonly action: string;
  readonly actorId: string;
  readonly subjectKind: string;
  readonly subjectId: string;
  readonly fromDay: string;
  readonly toDay: string;
}

export const EMPTY_QUERY: JournalQuery = {
  action: '',
  actorId: '',
  subjectKind: '',
  subjectId: '',
  fromDay: '',
  toDay: '',
};

/** Both days belong to the span, and begin and end where the reader is. The service bounds as from ≤ at < to. */
export function filterOf(
  query: JournalQuery,
  page: { readonly limit: number; readonly offset: number },
): JournalFilter {
  const { action, actorId, subjectKind, subjectId } = query;
  return {
    action,
    actorId,
    subjectKind,
    subjectId,
    from: startOf(query.fromDay, 0),
    to: startOf(query.toDay, 1),
    ...page,
  };
}

/** Undefined for no day, and for an address that somebody mistyped. */
function startOf(day: string, daysLater: number): string | undefined {
  const moment = new Date(`${day}T00:00:00`);
  moment.setDate(moment.getDate() + daysLater);
  return Number.isNaN(moment.getTime()) ? undefined : moment.toISOString();
}

/** Query parameters of the address: an empty field leaves its parameter out. */
export function addressOf(query: JournalQuery): Record<string, string | null> {
  return Object.fromEntries(Object.entries(query).map(([name, value]) => [name, value === '' ? null : value]));
}

export function isFiltered(query: JournalQuery): boolean {
  return Object.values(query).some((value) => value !== '');
}
