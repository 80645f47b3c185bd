import { HttpClient } from '@angular/common/http';
import { Injectable, inject } from '@angular/core';
import { Observable } from 'rxjs';
import type { JournalFilter, JournalPage } from './contract';
import { queryOf } from './page';

@Injectable({ providedIn: 'root' })
export class JournalClient {
  private readonly http = inject(HttpClient);

  list(filter: JournalFilter = {}): Observable<JournalPage> {
    return this.http.get<JournalPage>('/api/journal', { params: queryOf(filter) });
  }
}
