import { DestroyRef, computed, inject, signal } from '@angular/core';
import { Observable, Subscription, switchMap } from 'rxjs';
import type { RecordTask } from '../../api/contract';
import { problemOf, type Problem } from '../../api/problem';
import { RecordTasksClient } from '../../api/record-tasks-client';
import { Announcer } from '../../ui/announcer';

/** The making of one revision: how far it is, why it failed, and the way to stop it. Make it in an injection context. */
export class MendingRun {
  private readonly tasks = inject(RecordTasksClient);
  private readonly announcer = inject(Announcer);
  private readonly current = signal<RecordTask | undefined>(undefined);
  private readonly failure = signal<Problem | undefined>(undefined);
  private readonly begun = signal(false);
  private readonly stopping = signal(false);
  private subscription?: Subscription;

  readonly task = this.current.asReadonly();
  readonly problem = this.failure.asReadonly();
  readonly underWay = this.begun.asReadonly();
  readonly cancelling = this.stopping.asReadonly();
  readonly progress = computed(() => this.current()?.progress);

  constructor() {
    inject(DestroyRef).onDestroy(() => this.subscription?.unsubscribe());
  }

  start(request: Observable<RecordTask>, done: (revisionId: string) => void): void {
    this.failure.set(undefined);
    this.current.set(undefined);
    this.stopping.set(false);
    this.begun.set(true);
    this.subscription = request.pipe(switchMap(({ id }) => this.tasks.follow(id))).subscribe({
      next: (task) => this.take(task, done),
      error: (error: unknown) => this.fail(problemOf(error)),
    });
  }

  /** The work goes on until the service has stopped it, which following it tells. */
  cancel(): void {
    const task = this.current();
    if (!task) return;
    this.stopping.set(true);
    // Refused where the work has ended already; that is told by following it too.
    this.tasks.cancel(task.id).subscribe({ error: () => this.stopping.set(false) });
  }

  private take(task: RecordTask, done: (revisionId: string) => void): void {
    this.current.set(task);
    if (task.state === 'done' && task.revisionId !== null) done(task.revisionId);
    if (task.state === 'failed') this.fail(problemOfTask(task));
    if (task.state === 'cancelled') this.stopped();
  }

  private stopped(): void {
    this.begun.set(false);
    this.announcer.show('The mending was cancelled. No revision was made; your steps are as they were.');
  }

  private fail(problem: Problem): void {
    this.begun.set(false);
    this.failure.set(problem);
  }
}

function problemOfTask({ problem }: RecordTask): Problem {
  return {
    code: problem?.code ?? 'internal',
    status: 422,
    title: 'The revision could not be made',
    detail: problem?.detail ?? 'Nothing was kept. Try again.',
    errors: (problem?.errors ?? []).map(({ detail, pointer }) => ({ detail, field: pointer.replace(/^#?\/?/, '') })),
  };
}
