import { HttpClient } from '@angular/common/http';
import { Injectable, inject } from '@angular/core';
import { Observable } from 'rxjs';
import type { Fit, FitAccepted, FitList, FitNew, FitProgressEvent, FitState } from './contract';
import { OPEN_EVENT_SOURCE } from './event-source';
import { Page, queryOf } from './page';

const ENDED: readonly FitState[] = ['done', 'failed', 'cancelled'];

/** Whether a fit will not change any more. */
export function fitEnded(state: FitState): boolean {
  return ENDED.includes(state);
}

@Injectable({ providedIn: 'root' })
export class FitsClient {
  private readonly http = inject(HttpClient);
  private readonly openEventSource = inject(OPEN_EVENT_SOURCE);

  list(slug: string, page: Page = {}): Observable<FitList> {
    return this.http.get<FitList>(`/api/estimators/${slug}/fits`, { params: queryOf(page) });
  }

  start(slug: string, fit: FitNew): Observable<FitAccepted> {
    return this.http.post<FitAccepted>(`/api/estimators/${slug}/fits`, fit);
  }

  read(id: string): Observable<Fit> {
    return this.http.get<Fit>(`/api/fits/${id}`);
  }

  cancel(id: string): Observable<FitAccepted> {
    return this.http.post<FitAccepted>(`/api/fits/${id}/cancel`, null);
  }

  /**
   * Emits each step of a fit and completes with its final state. The browser reconnects a dropped stream by
   * itself; when it gives up, this completes without a final state and the caller reads the fit once more.
   */
  follow(id: string): Observable<FitProgressEvent> {
    return new Observable((subscriber) => {
      const source = this.openEventSource(`/api/fits/${id}/progress`);
      source.addEventListener('progress', (event: MessageEvent<string>) => {
        const step = JSON.parse(event.data) as FitProgressEvent;
        subscriber.next(step);
        if (fitEnded(step.state)) subscriber.complete();
      });
      source.addEventListener('error', () => {
        if (source.readyState === EventSource.CLOSED) subscriber.complete();
      });
      return () => source.close();
    });
  }
}
