import { InjectionToken } from '@angular/core';

export interface MendingPauses {
  /** Edits that follow one another faster are tried out and kept as one. */
  readonly betweenEditsMs: number;
  /** A draft that could not be kept is sent again after it. */
  readonly beforeRetryMs: number;
}

export const MENDING_PAUSES = new InjectionToken<MendingPauses>('how long the mending page waits', {
  providedIn: 'root',
  factory: () => ({ betweenEditsMs: 400, beforeRetryMs: 5000 }),
});
