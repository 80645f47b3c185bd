import { HttpClient } from '@angular/common/http';
import { Injectable, inject } from '@angular/core';
import { Observable } from 'rxjs';
import type { Settings, SettingsChange } from './contract';

@Injectable({ providedIn: 'root' })
export class SettingsClient {
  private readonly http = inject(HttpClient);

  read(): Observable<Settings> {
    return this.http.get<Settings>('/api/settings');
  }

  change(change: SettingsChange): Observable<Settings> {
    return this.http.patch<Settings>('/api/settings', change);
  }
}
