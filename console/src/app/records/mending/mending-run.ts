import { DestroyRef, computed, inject, signal } from '@angular/core';
import { takeUntilDestroyed } from '@angular/core/rxjs-interop';
import { Observable, finalize } from 'rxjs';
import type { RecordTask } from '../../api/contract';
import { problemOf, type Problem } from '../../api/problem';
import { taskProblem } from '../../api/record-tasks-client';
import { Announcer } from '../../ui/announcer';
import { FollowedTask } from '../task-progress/followed-task';

/** The making of one revision: how far it is, why it failed, and the way to stop it. Make it in an injection context. */
export class MendingRun {
  private readonly announcer = inject(Announcer);
  private readonly destroyRef = inject(DestroyRef);
  private readonly taskId = signal<string | undefined>(undefined);
  private readonly sending = signal(false);
  private readonly failure = signal<Problem | undefined>(undefined);
  private done: (revisionId: string) => void = () => undefined;

  /** How far it is, once it has begun. */
  readonly work = new FollowedTask(this.taskId, (task) => this.end(task));
  /** Why no revision was made. */
  readonly problem = this.failure.asReadonly();
  readonly underWay = computed(() => this.sending() || this.taskId() !== undefined);

  start(request: Observable<RecordTask>, done: (revisionId: string) => void): void {
    this.failure.set(undefined);
    this.done = done;
    this.sending.set(true);
    request
      .pipe(
        finalize(() => this.sending.set(false)),
        takeUntilDestroyed(this.destroyRef),
      )
      .subscribe({
        next: ({ id }) => this.taskId.set(id),
        error: (error: unknown) => this.failure.set(problemOf(error)),
      });
  }

  private end(task: RecordTask): void {
    if (task.state === 'done' && task.revisionId !== null) return this.done(task.revisionId);
    this.taskId.set(undefined);
    if (task.state === 'failed') this.failure.set(taskProblem(task, 'The revision could not be made'));
    else this.announcer.show('The mending was cancelled. No revision was made; your steps are as they were.');
  }
}
