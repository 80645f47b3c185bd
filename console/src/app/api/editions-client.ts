import { HttpClient } from '@angular/common/http';
import { Injectable, inject } from '@angular/core';
import { Observable } from 'rxjs';
import type { Edition, EditionList, EditionNew, Evaluation, Inputs, Withdrawal } from './contract';
import { Page, queryOf } from './page';

@Injectable({ providedIn: 'root' })
export class EditionsClient {
  private readonly http = inject(HttpClient);

  list(slug: string, page: Page = {}): Observable<EditionList> {
    return this.http.get<EditionList>(`/api/estimators/${slug}/editions`, { params: queryOf(page) });
  }

  read(id: string): Observable<Edition> {
    return this.http.get<Edition>(`/api/editions/${id}`);
  }

  create(slug: string, edition: EditionNew): Observable<Edition> {
    return this.http.post<Edition>(`/api/estimators/${slug}/editions`, edition);
  }

  submit(id: string): Observable<Edition> {
    return this.http.post<Edition>(`/api/editions/${id}/submit`, null);
  }

  putInForce(id: string): Observable<Edition> {
    return this.http.post<Edition>(`/api/editions/${id}/put-in-force`, null);
  }

  sendBack(id: string, note: string): Observable<Edition> {
    return this.http.post<Edition>(`/api/editions/${id}/send-back`, { note });
  }

  withdraw(id: string, withdrawal: Withdrawal): Observable<Edition> {
    return this.http.post<Edition>(`/api/editions/${id}/withdraw`, withdrawal);
  }

  /** Evaluates a case as a partner would get it; nothing is kept. */
  tryCase(id: string, inputs: Inputs): Observable<Evaluation> {
    return this.http.post<Evaluation>(`/api/editions/${id}/try`, { inputs });
  }
}
