import { DestroyRef, computed, inject, signal } from '@angular/core';
import { Observable, Subscription } from 'rxjs';
import { Problem, problemOf } from '../../api/problem';
import type { Upload } from '../../api/upload';
import { Announcer } from '../../ui/announcer';

interface Sending {
  readonly sent: number;
  readonly total: number;
}

/** One upload at a time: how far it is, why it failed, and the way to stop it. Make it in an injection context. */
export class UploadRun<Answer> {
  private readonly announcer = inject(Announcer);
  private readonly sending = signal<Sending | undefined>(undefined);
  private readonly failure = signal<Problem | undefined>(undefined);
  private subscription?: Subscription;

  readonly progress = this.sending.asReadonly();
  readonly problem = this.failure.asReadonly();
  readonly underWay = computed(() => this.sending() !== undefined);
  /** Everything has arrived; the service is reading the file. */
  readonly beingRead = computed(() => {
    const sending = this.sending();
    return sending !== undefined && sending.total > 0 && sending.sent >= sending.total;
  });

  constructor() {
    inject(DestroyRef).onDestroy(() => this.subscription?.unsubscribe());
  }

  start(upload: Observable<Upload<Answer>>, done: (answer: Answer) => void): void {
    this.subscription?.unsubscribe();
    this.failure.set(undefined);
    this.sending.set({ sent: 0, total: 0 });
    this.subscription = upload.subscribe({
      next: (step) => this.take(step, done),
      error: (error: unknown) => this.fail(problemOf(error)),
    });
  }

  cancel(): void {
    this.subscription?.unsubscribe();
    this.sending.set(undefined);
    this.announcer.show('The upload was cancelled. Nothing was kept.');
  }

  private take(step: Upload<Answer>, done: (answer: Answer) => void): void {
    if (step.state === 'sending') return this.sending.set(step);
    this.sending.set(undefined);
    done(step.answer);
  }

  private fail(problem: Problem): void {
    this.sending.set(undefined);
    this.failure.set(problem);
  }
}
