import { Observable, map, switchMap } from 'rxjs';
import type { BringInRequest, RecordSetDetail } from '../../api/contract';
import { RecordsClient } from '../../api/records-client';
import type { RecordSetWords } from './kept-bring-in';

type BringInAs = BringInRequest['as'];

/** What a file is to become of an existing record set. */
export type Destination =
  | { readonly kind: 'revision'; readonly set: RecordSetDetail }
  | {
      readonly kind: 'appended';
      readonly set: RecordSetDetail;
      readonly revision: { readonly id: string; readonly number: number };
    };

export interface DestinationIds {
  readonly recordSet?: string;
  readonly appendTo?: string;
}

/** Undefined for a file that becomes a record set of its own. */
export function readDestination(
  client: RecordsClient,
  { recordSet, appendTo }: DestinationIds,
): Observable<Destination> | undefined {
  if (appendTo !== undefined)
    return client
      .readRevision(appendTo)
      .pipe(
        switchMap(({ id, number, recordSetId }) =>
          client
            .read(recordSetId)
            .pipe(map((set): Destination => ({ kind: 'appended', set, revision: { id, number } }))),
        ),
      );
  if (recordSet !== undefined)
    return client.read(recordSet).pipe(map((set): Destination => ({ kind: 'revision', set })));
  return undefined;
}

export function nextNumber({ set }: Destination): number {
  return set.lastNumber + 1;
}

export function bringInAs(destination: Destination): BringInAs {
  const { set } = destination;
  const expectedNewest = set.revision.number;
  if (destination.kind === 'appended') return { kind: 'appended', revisionId: destination.revision.id, expectedNewest };
  return { kind: 'revision', recordSetId: set.id, expectedNewest };
}

export function asRecordSet(name: string, { description, retainUntil }: RecordSetWords): BringInAs {
  return {
    kind: 'record-set',
    name: name.trim(),
    ...(description.trim() !== '' && { description: description.trim() }),
    ...(retainUntil !== '' && { retainUntil }),
  };
}
