import { HttpClient } from '@angular/common/http';
import { Injectable, inject } from '@angular/core';
import { Observable } from 'rxjs';
import type { RecordFindings, RecordRevision, RecordSetDetail, RecordSetList } from './contract';
import { Page, queryOf } from './page';

@Injectable({ providedIn: 'root' })
export class RecordsClient {
  private readonly http = inject(HttpClient);

  list(page: Page = {}): Observable<RecordSetList> {
    return this.http.get<RecordSetList>('/api/record-sets', { params: queryOf(page) });
  }

  read(id: string): Observable<RecordSetDetail> {
    return this.http.get<RecordSetDetail>(`/api/record-sets/${id}`);
  }

  readRevision(id: string): Observable<RecordRevision> {
    return this.http.get<RecordRevision>(`/api/record-revisions/${id}`);
  }

  /** Name a numeric column as the target to have columns sought that may be known too late to estimate it. */
  readFindings(revisionId: string, target?: string): Observable<RecordFindings> {
    const params = queryOf({ target });
    return this.http.get<RecordFindings>(`/api/record-revisions/${revisionId}/findings`, { params });
  }

  /** Where the browser can fetch the uploaded file, byte for byte. */
  originalUrl(revisionId: string): string {
    return `/api/record-revisions/${revisionId}/original`;
  }
}
