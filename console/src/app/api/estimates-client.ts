import { HttpClient } from '@angular/common/http';
import { Injectable, inject } from '@angular/core';
import { Observable } from 'rxjs';
import type { EstimateList, EstimateRecord } from './contract';
import { Page, queryOf } from './page';

@Injectable({ providedIn: 'root' })
export class EstimatesClient {
  private readonly http = inject(HttpClient);

  list(slug: string, page: Page = {}): Observable<EstimateList> {
    return this.http.get<EstimateList>(`/api/estimators/${slug}/estimates`, { params: queryOf(page) });
  }

  read(id: string): Observable<EstimateRecord> {
    return this.http.get<EstimateRecord>(`/api/estimates/${id}`);
  }
}
