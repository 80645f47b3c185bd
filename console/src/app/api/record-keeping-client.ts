import { HttpClient } from '@angular/common/http';
import { Injectable, inject } from '@angular/core';
import { Observable } from 'rxjs';
import type { RecordSetChange, RecordSetDetail, RevisionDeletion } from './contract';

/** What is said about record sets, how long they are kept, and what leaves the desk. */
@Injectable({ providedIn: 'root' })
export class RecordKeepingClient {
  private readonly http = inject(HttpClient);

  change(recordSetId: string, change: RecordSetChange): Observable<RecordSetDetail> {
    return this.http.patch<RecordSetDetail>(`/api/record-sets/${recordSetId}`, change);
  }

  /** What would go with a revision, or why it has to stay. */
  readDeletion(revisionId: string): Observable<RevisionDeletion> {
    return this.http.get<RevisionDeletion>(`/api/record-revisions/${revisionId}/deletion`);
  }

  deleteRevision(revisionId: string): Observable<void> {
    return this.http.delete<void>(`/api/record-revisions/${revisionId}`);
  }

  /** Where the browser can fetch the revision as a CSV file. */
  tableUrl(revisionId: string): string {
    return `/api/record-revisions/${revisionId}/csv`;
  }
}
