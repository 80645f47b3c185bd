import { HttpClient } from '@angular/common/http';
import { Injectable, inject } from '@angular/core';
import { Observable } from 'rxjs';
import type { Partner, PartnerChange, PartnerList, PartnerNew, Site } from './contract';
import { Page, queryOf } from './page';

@Injectable({ providedIn: 'root' })
export class PartnersClient {
  private readonly http = inject(HttpClient);

  list(page: Page = {}): Observable<PartnerList> {
    return this.http.get<PartnerList>('/api/partners', { params: queryOf(page) });
  }

  read(id: string): Observable<Partner> {
    return this.http.get<Partner>(`/api/partners/${id}`);
  }

  create(partner: PartnerNew): Observable<Partner> {
    return this.http.post<Partner>('/api/partners', partner);
  }

  change(id: string, change: PartnerChange): Observable<Partner> {
    return this.http.patch<Partner>(`/api/partners/${id}`, change);
  }

  addSite(id: string, origin: string): Observable<Site> {
    return this.http.post<Site>(`/api/partners/${id}/sites`, { origin });
  }

  removeSite(id: string, siteId: string): Observable<void> {
    return this.http.delete<void>(`/api/partners/${id}/sites/${siteId}`);
  }
}
