import { HttpClient, HttpParams } from '@angular/common/http';
import { Injectable, inject } from '@angular/core';
import { Observable } from 'rxjs';
import type { Correlations, RecordRows, RevisionComparison, Scatter } from './contract';
import { Page, queryOf } from './page';

/** Which rows of a revision: those that meet a condition, those with a number, or both. */
export interface RowsWanted {
  readonly where?: string;
  /** Row numbers from 1, parted by commas. */
  readonly numbers?: string;
}

/** Ways of looking at what a revision holds. */
@Injectable({ providedIn: 'root' })
export class LookingClient {
  private readonly http = inject(HttpClient);

  readRows(revisionId: string, wanted: RowsWanted, page: Page): Observable<RecordRows> {
    const params = queryOf({ ...wanted, ...page });
    return this.http.get<RecordRows>(`/api/record-revisions/${revisionId}/rows`, { params });
  }

  readCorrelations(revisionId: string): Observable<Correlations> {
    return this.http.get<Correlations>(`/api/record-revisions/${revisionId}/correlations`);
  }

  readScatter(revisionId: string, x: string, y: string): Observable<Scatter> {
    const params = queryOf({ x, y });
    return this.http.get<Scatter>(`/api/record-revisions/${revisionId}/scatter`, { params });
  }

  /** An empty key matches rows by their order; without one the service finds a key. */
  compare(revisionId: string, otherId: string, key?: string): Observable<RevisionComparison> {
    const base = new HttpParams({ fromObject: { with: otherId } });
    const params = key === undefined ? base : base.set('key', key);
    return this.http.get<RevisionComparison>(`/api/record-revisions/${revisionId}/comparison`, { params });
  }
}
