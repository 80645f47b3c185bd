import { DestroyRef, Signal, computed, inject, signal } from '@angular/core';
import { takeUntilDestroyed, toObservable } from '@angular/core/rxjs-interop';
import { EMPTY, Observable, catchError, switchMap } from 'rxjs';
import type { RecordTask } from '../../api/contract';
import { Problem, problemOf } from '../../api/problem';
import { RecordTasksClient, taskEnded } from '../../api/record-tasks-client';

/** Follows the work on records that an address names, and can cancel it. Make it in an injection context. */
export class FollowedTask {
  private readonly client = inject(RecordTasksClient);
  private readonly destroyRef = inject(DestroyRef);
  private readonly current = signal<RecordTask | undefined>(undefined);
  private readonly failure = signal<Problem | undefined>(undefined);
  private readonly stopping = signal(false);
  private readonly attempt = signal(0);

  readonly task = this.current.asReadonly();
  /** Why the work cannot be watched or cancelled. */
  readonly problem = this.failure.asReadonly();
  readonly cancelling = this.stopping.asReadonly();

  /** `taskId` is undefined while there is nothing to follow; `ended` hears of every end. */
  constructor(
    private readonly taskId: Signal<string | undefined>,
    private readonly ended: (task: RecordTask) => void,
  ) {
    toObservable(computed(() => ({ id: this.taskId(), attempt: this.attempt() })))
      .pipe(
        switchMap(({ id }) => this.follow(id)),
        takeUntilDestroyed(),
      )
      .subscribe((task) => this.take(task));
  }

  again(): void {
    this.attempt.update((count) => count + 1);
  }

  cancel(): void {
    const id = this.taskId();
    if (id === undefined) return;
    this.stopping.set(true);
    this.client
      .cancel(id)
      .pipe(takeUntilDestroyed(this.destroyRef))
      .subscribe({ error: (error: unknown) => this.stayed(problemOf(error)) });
  }

  private follow(id: string | undefined): Observable<RecordTask> {
    this.current.set(undefined);
    this.failure.set(undefined);
    this.stopping.set(false);
    if (id === undefined) return EMPTY;
    return this.client.follow(id).pipe(
      catchError((error: unknown) => {
        this.failure.set(problemOf(error));
        return EMPTY;
      }),
    );
  }

  private take(task: RecordTask): void {
    this.current.set(task);
    if (taskEnded(task.state)) this.ended(task);
  }

  /** Work that ended in the meantime has nothing left to cancel: following tells how it ended. */
  private stayed(problem: Problem): void {
    this.stopping.set(false);
    if (problem.code !== 'task-ended') this.failure.set(problem);
  }
}
