import { HttpClient } from '@angular/common/http';
import { Injectable, inject } from '@angular/core';
import { Observable, exhaustMap, retry, takeWhile, throwError, timer } from 'rxjs';
import type { RecordTask } from './contract';
import { Problem, fieldOf, problemOf } from './problem';

export type RecordTaskState = RecordTask['state'];
export type RecordTaskProgress = RecordTask['progress'];

const ENDED: readonly RecordTaskState[] = ['done', 'failed', 'cancelled'];
const EVERY_MS = 500;
const AFTER_SILENCE_MS = 2000;
/** A service that restarts is back within half a minute. */
const MOST_SILENCES = 15;

/** Whether a task will not change any more. */
export function taskEnded(state: RecordTaskState): boolean {
  return ENDED.includes(state);
}

/** Why the work failed, under a title of the screen's own; the status is that of no call. */
export function taskProblem({ problem }: RecordTask, title: string): Problem {
  if (!problem) return { code: 'internal', status: 0, title, detail: 'Nothing was kept. Try again.', errors: [] };
  const { code, detail, line, errors = [] } = problem;
  const fields = errors.map((error) => ({ detail: error.detail, field: fieldOf(error.pointer) }));
  return { code, status: 0, title, detail, line, errors: fields };
}

@Injectable({ providedIn: 'root' })
export class RecordTasksClient {
  private readonly http = inject(HttpClient);

  read(id: string): Observable<RecordTask> {
    return this.http.get<RecordTask>(`/api/record-tasks/${id}`);
  }

  cancel(id: string): Observable<RecordTask> {
    return this.http.post<RecordTask>(`/api/record-tasks/${id}/cancel`, null);
  }

  /**
   * Emits how far the work is, twice a second, and completes with its final state. The work goes on whether or not it
   * is watched, so a connection that breaks for a while is only waited for.
   */
  follow(id: string): Observable<RecordTask> {
    return timer(0, EVERY_MS).pipe(
      exhaustMap(() => this.read(id)),
      retry({ count: MOST_SILENCES, resetOnSuccess: true, delay: waitOutSilence }),
      takeWhile((task) => !taskEnded(task.state), true),
    );
  }
}

function waitOutSilence(error: unknown): Observable<unknown> {
  const { status } = problemOf(error);
  return status === 0 || status === 503 ? timer(AFTER_SILENCE_MS) : throwError(() => error);
}
