import { HttpClient } from '@angular/common/http';
import { Injectable, inject } from '@angular/core';
import { Observable } from 'rxjs';
import type { Session, SignIn } from './contract';

@Injectable({ providedIn: 'root' })
export class SessionClient {
  private readonly http = inject(HttpClient);

  read(): Observable<Session> {
    return this.http.get<Session>('/api/session');
  }

  signIn(credentials: SignIn): Observable<Session> {
    return this.http.post<Session>('/api/session', credentials);
  }

  signOut(): Observable<void> {
    return this.http.delete<void>('/api/session');
  }
}
