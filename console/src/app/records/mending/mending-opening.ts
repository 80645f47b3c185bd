import { Observable, forkJoin, map, of, switchMap } from 'rxjs';
import type { MendingDraft, RecordRevision, RecordSetDetail } from '../../api/contract';
import type { MendingClient } from '../../api/mending-client';
import type { RecordsClient } from '../../api/records-client';
import { formatCount } from '../../ui/figure';
import { namesRows } from './step-rows';
import type { Steps } from './steps-history';

/** What the mending page needs before it can show a list of steps. */
export interface MendingOpening {
  readonly revision: RecordRevision;
  readonly set: RecordSetDetail;
  readonly draft: MendingDraft;
  /** The revision whose steps are to be taken over. */
  readonly from?: RecordRevision;
}

export interface OpeningClients {
  readonly records: RecordsClient;
  readonly mending: MendingClient;
}

export function openingOf(
  { records, mending }: OpeningClients,
  id: string,
  fromId: string | undefined,
): Observable<MendingOpening> {
  const read = forkJoin({
    revision: records.readRevision(id),
    draft: mending.readDraft(id),
    from: fromId ? records.readRevision(fromId) : of(undefined),
  });
  return read.pipe(
    switchMap((opening) => records.read(opening.revision.recordSetId).pipe(map((set) => ({ ...opening, set })))),
  );
}

/** Where the list begins: with the draft, with the steps of another revision, or with a question between the two. */
export type Beginning =
  | { readonly with: 'draft'; readonly steps: Steps; readonly note?: string }
  | { readonly with: 'other'; readonly steps: Steps; readonly note: string; readonly caution?: string }
  | { readonly with: 'question'; readonly draft: Steps; readonly other: RevisionSteps };

/** The steps that made a revision. */
export interface RevisionSteps {
  readonly number: number;
  readonly steps: Steps;
  /** What to look out for when they are applied here. */
  readonly caution?: string;
}

export function beginningOf({ revision, draft, from }: MendingOpening): Beginning {
  const mine: Beginning = { with: 'draft', steps: draft.steps };
  if (!from) return mine;
  if (from.recordSetId !== revision.recordSetId)
    return {
      ...mine,
      note: `Revision ${from.number} of ${from.recordSetName} belongs to another record set, so its steps were not taken over.`,
    };
  if (!from.mending)
    return { ...mine, note: `Revision ${from.number} was brought in from a file: it has no steps to take over.` };
  const { steps } = from.mending;
  if (JSON.stringify(steps) === JSON.stringify(draft.steps)) return mine;
  const other = { number: from.number, steps, caution: cautionOf(revision, from) };
  return draft.steps.length === 0 ? takenOver(other) : { with: 'question', draft: draft.steps, other };
}

export function takenOver({ number, steps, caution }: RevisionSteps): Beginning {
  const note = `These are the steps that made revision ${number}. Change them as you need.`;
  return { with: 'other', steps, note, caution };
}

/** Row numbers hold where the rows stand as they stood: in the same revision, or in one to which a file was appended. */
function cautionOf(revision: RecordRevision, { mending, basedOn }: RecordRevision): string | undefined {
  const numbered = mending?.steps.filter(namesRows).length ?? 0;
  const appended = revision.origin === 'appended' && revision.basedOn?.id === mending?.from;
  if (numbered === 0 || mending?.from === revision.id || appended) return undefined;
  const where = basedOn ? `revision ${basedOn.number}` : 'a revision that has been deleted';
  const which = numbered === 1 ? '1 of them names' : `${formatCount(numbered)} of them name`;
  return `${which} rows by number, counted in ${where}. Look whether these are the same rows here before you go on.`;
}
