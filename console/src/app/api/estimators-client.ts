import { HttpClient } from '@angular/common/http';
import { Injectable, inject } from '@angular/core';
import { Observable } from 'rxjs';
import type { Estimator, EstimatorChange, EstimatorList, EstimatorNew } from './contract';
import { Page, queryOf } from './page';

@Injectable({ providedIn: 'root' })
export class EstimatorsClient {
  private readonly http = inject(HttpClient);

  list(page: Page = {}): Observable<EstimatorList> {
    return this.http.get<EstimatorList>('/api/estimators', { params: queryOf(page) });
  }

  read(slug: string): Observable<Estimator> {
    return this.http.get<Estimator>(`/api/estimators/${slug}`);
  }

  create(estimator: EstimatorNew): Observable<Estimator> {
    return this.http.post<Estimator>('/api/estimators', estimator);
  }

  change(slug: string, change: EstimatorChange): Observable<Estimator> {
    return this.http.patch<Estimator>(`/api/estimators/${slug}`, change);
  }
}
