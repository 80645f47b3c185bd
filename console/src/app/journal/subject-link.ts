import type { JournalEntry } from '../api/contract';

/** Where a kind of subject has a screen of its own, under its id. */
const SHEETS: Readonly<Record<string, string>> = {
  estimator: '/estimators',
  edition: '/journal/edition',
  fit: '/journal/fit',
  partner: '/partners',
  estimate: '/estimates',
  'record-set': '/records',
};

/** Where a kind of subject stands in a list only. */
const LISTS: Readonly<Record<string, string>> = { person: '/people', setting: '/settings' };

/** The router's path to what an entry is about; undefined where it has no screen of its own (a key). */
export function subjectLink({ subjectKind, subjectId }: JournalEntry): readonly string[] | undefined {
  const list = LISTS[subjectKind];
  if (list !== undefined) return [list];
  const sheets = SHEETS[subjectKind];
  return sheets !== undefined && subjectId !== null ? [sheets, subjectId] : undefined;
}
