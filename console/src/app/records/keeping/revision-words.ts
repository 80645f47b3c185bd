import type { RecordSet, RevisionSummary } from '../../api/contract';
import { daysOf, formatDay, formatRecordedDay } from '../../ui/moment';

/** Where a revision came from: `Brought in from refits.csv`. */
export function originOf({ origin, basedOn, fileName }: RevisionSummary): string {
  const base = basedOn ? `revision ${basedOn.number}` : 'a revision that has been deleted';
  if (origin === 'mended') return `Mended from ${base}`;
  if (origin === 'appended') return `${fileName} appended to ${base}`;
  return `Brought in from ${fileName}`;
}

/** What is not kept of it any more, or never was; empty when all is. */
export function lackingOf({ erasedAt, originalKept }: RevisionSummary): readonly string[] {
  return [
    erasedAt === null ? '' : `Rows erased on ${formatDay(erasedAt)}`,
    originalKept ? '' : 'Original file not kept',
  ].filter((words) => words !== '');
}

/** Only while the rows are there does the original file lie beside them. */
export function hasOriginal({ erasedAt, originalKept }: RevisionSummary): boolean {
  return originalKept && erasedAt === null;
}

/** The day after which a set's rows are erased, as people write it; a calendar day, so no time zone may shift it. */
export function retentionDayOf({ retainUntil }: Pick<RecordSet, 'retainUntil'>): string | undefined {
  return retainUntil === null ? undefined : formatRecordedDay(daysOf(retainUntil));
}

/** `Rows kept until 31 Mar 2031, then erased`; undefined while they are kept without a day. */
export function retentionTold({
  retainUntil,
  revision,
}: Pick<RecordSet, 'retainUntil'> & { readonly revision: RevisionSummary }): string | undefined {
  if (revision.erasedAt !== null) return `Rows erased on ${formatDay(revision.erasedAt)}`;
  const day = retentionDayOf({ retainUntil });
  return day && `Rows kept until ${day}, then erased`;
}

/** Revisions that this one can be compared with, newest first: those of its set whose rows are there. */
export function comparable(id: string, revisions: readonly RevisionSummary[]): readonly RevisionSummary[] {
  return revisions
    .filter((revision) => revision.id !== id && revision.erasedAt === null)
    .sort((a, b) => b.number - a.number);
}

/** The revision that another one is compared with unless somebody chooses: what it is based on, else its forerunner. */
export function usualOther(
  revision: RevisionSummary,
  revisions: readonly RevisionSummary[],
): RevisionSummary | undefined {
  const others = comparable(revision.id, revisions);
  return (
    others.find(({ id }) => id === revision.basedOn?.id) ??
    others.find(({ number }) => number < revision.number) ??
    others.at(-1)
  );
}
