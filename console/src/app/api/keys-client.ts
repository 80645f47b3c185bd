import { HttpClient } from '@angular/common/http';
import { Injectable, inject } from '@angular/core';
import { Observable } from 'rxjs';
import type { Key, KeyIssued, KeyNew } from './contract';

@Injectable({ providedIn: 'root' })
export class KeysClient {
  private readonly http = inject(HttpClient);

  /** The answer holds the key itself, this once. */
  issue(partnerId: string, key: KeyNew): Observable<KeyIssued> {
    return this.http.post<KeyIssued>(`/api/partners/${partnerId}/keys`, key);
  }

  revoke(id: string): Observable<Key> {
    return this.http.post<Key>(`/api/keys/${id}/revoke`, null);
  }
}
