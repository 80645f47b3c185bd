import { HttpClient } from '@angular/common/http';
import { Injectable, inject } from '@angular/core';
import { Observable } from 'rxjs';
import type { DeskOverview } from './contract';

@Injectable({ providedIn: 'root' })
export class DeskClient {
  private readonly http = inject(HttpClient);

  read(): Observable<DeskOverview> {
    return this.http.get<DeskOverview>('/api/desk');
  }
}
