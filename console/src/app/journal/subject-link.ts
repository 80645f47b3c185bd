import type { JournalEntry } from '../api/contract';

/** Where a kind of subject has a screen of its own, under its id. */
const SHEETS: Readonly<Record<string, string>> = {
  estimator: '/estimators',
  edition: '/editions',
  fit: '/fits',
  partner: '/partners',
  estimate: '/estimates',
  'record-set': '/records',
};

/** Where a kind of subject stands in a list only. */
const LISTS: Readonly<Record<string, string>> = { person: '/people', settings: '/settings' };

/** The router's path to what an entry is about; undefined where it has no screen (a key, a session). */
export function subjectLink({ subjectKind, subjectId }: JournalEntry): readonly string[] | undefined {
  const list = LISTS[subjectKind];
  if (list !== undefined) return [list];
  const sheets = SHEETS[subjectKind];
  return sheets !== undefined && subjectId !== null ? [sheets, subjectId] : undefined;
}
