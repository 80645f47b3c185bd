import { Observable, forkJoin, map, of, switchMap } from 'rxjs';
import type { MendingDraft, RecordRevision, RecordSetDetail } from '../../api/contract';
import type { MendingClient } from '../../api/mending-client';
import type { RecordsClient } from '../../api/records-client';
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
  | { readonly with: 'other'; readonly steps: Steps; readonly note: string }
  | { readonly with: 'question'; readonly number: number; readonly draft: Steps; readonly other: Steps };

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
  const { steps: other } = from.mending;
  if (JSON.stringify(other) === JSON.stringify(draft.steps)) return mine;
  if (draft.steps.length === 0) return takenOver(from.number, other);
  return { with: 'question', number: from.number, draft: draft.steps, other };
}

export function takenOver(number: number, steps: Steps): Beginning {
  return { with: 'other', steps, note: `These are the steps that made revision ${number}. Change them as you need.` };
}
