import { HttpClient } from '@angular/common/http';
import { Injectable, inject } from '@angular/core';
import { Observable } from 'rxjs';
import type { MendStep, MendingDraft, MendingTrial, RecordTask } from './contract';
import type { Problem } from './problem';

export interface MendingNew {
  readonly steps: readonly MendStep[];
  /** Number of the set's newest revision as the person knows it. */
  readonly expectedNewest: number;
}

/** A step that cannot be done, counted from 0, and why. */
export interface RefusedStep {
  readonly index: number;
  readonly reason: string;
}

@Injectable({ providedIn: 'root' })
export class MendingClient {
  private readonly http = inject(HttpClient);

  /** What the steps would do; nothing is kept. At least one step. */
  tryOut(revisionId: string, steps: readonly MendStep[]): Observable<MendingTrial> {
    return this.http.post<MendingTrial>(`/api/record-revisions/${revisionId}/mending-trial`, { steps });
  }

  readDraft(revisionId: string): Observable<MendingDraft> {
    return this.http.get<MendingDraft>(`/api/record-revisions/${revisionId}/mending-draft`);
  }

  keepDraft(revisionId: string, steps: readonly MendStep[]): Observable<MendingDraft> {
    return this.http.put<MendingDraft>(`/api/record-revisions/${revisionId}/mending-draft`, { steps });
  }

  /** Answers with the task that makes the new revision. */
  mend(revisionId: string, mending: MendingNew): Observable<RecordTask> {
    return this.http.post<RecordTask>(`/api/record-revisions/${revisionId}/mended-revisions`, mending);
  }
}

/** The step that the service complains about, where it complains about one. */
export function refusedStepOf({ errors }: Problem): RefusedStep | undefined {
  for (const { field, detail } of errors) {
    const index = /^steps\/(\d+)/.exec(field)?.[1];
    if (index !== undefined) return { index: Number(index), reason: detail };
  }
  return undefined;
}
