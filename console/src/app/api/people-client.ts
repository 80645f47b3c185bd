import { HttpClient } from '@angular/common/http';
import { Injectable, inject } from '@angular/core';
import { Observable } from 'rxjs';
import type { Invitation, Invite, Invited, Person, PersonChange, PersonList } from './contract';
import { Page, queryOf } from './page';

@Injectable({ providedIn: 'root' })
export class PeopleClient {
  private readonly http = inject(HttpClient);

  list(page: Page = {}): Observable<PersonList> {
    return this.http.get<PersonList>('/api/people', { params: queryOf(page) });
  }

  invite(invite: Invite): Observable<Invited> {
    return this.http.post<Invited>('/api/people', invite);
  }

  change(id: string, change: PersonChange): Observable<Person> {
    return this.http.patch<Person>(`/api/people/${id}`, change);
  }

  readInvitation(token: string): Observable<Invitation> {
    return this.http.get<Invitation>(`/api/invitations/${encodeURIComponent(token)}`);
  }

  acceptInvitation(token: string, password: string): Observable<void> {
    return this.http.post<void>(`/api/invitations/${encodeURIComponent(token)}`, { password });
  }
}
