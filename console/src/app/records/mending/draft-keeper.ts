import { DestroyRef, Injectable, inject, signal } from '@angular/core';
import {
  EMPTY,
  Observable,
  Subject,
  Subscription,
  catchError,
  of,
  retry,
  switchMap,
  tap,
  throwError,
  timer,
} from 'rxjs';
import type { MendingDraft } from '../../api/contract';
import { MendingClient } from '../../api/mending-client';
import { problemOf, type Problem } from '../../api/problem';
import { MENDING_PAUSES } from './mending-pauses';
import type { Steps } from './steps-history';

export type Keeping =
  | { readonly state: 'unchanged' | 'keeping' }
  | { readonly state: 'kept'; readonly at: string }
  | { readonly state: 'failed'; readonly problem: Problem };

interface Draft {
  readonly revisionId: string;
  readonly steps: Steps;
}

/** Keeps the list of steps on the service after each change, and goes on trying where that fails. Provide it with the screen. */
@Injectable()
export class DraftKeeper {
  private readonly client = inject(MendingClient);
  private readonly pauses = inject(MENDING_PAUSES);
  private readonly drafts = new Subject<Draft | undefined>();
  private readonly current = signal<Keeping>({ state: 'unchanged' });
  private readonly sending: Subscription;
  private unsent?: Draft;

  readonly keeping = this.current.asReadonly();

  constructor() {
    this.sending = this.drafts.pipe(switchMap((draft) => (draft ? this.afterPause(draft) : EMPTY))).subscribe();
    inject(DestroyRef).onDestroy(() => this.leave());
  }

  /** As it stands on the service. */
  begin({ changedAt }: MendingDraft): void {
    this.current.set(changedAt === null ? { state: 'unchanged' } : { state: 'kept', at: changedAt });
  }

  keep(revisionId: string, steps: Steps): void {
    this.unsent = { revisionId, steps };
    this.current.set({ state: 'keeping' });
    this.drafts.next(this.unsent);
  }

  /** Whether there is a change that the service does not have yet. */
  waits(): boolean {
    return this.unsent !== undefined;
  }

  /** Keeps at once what waits; completes even where that fails, which it says. */
  flush(): Observable<unknown> {
    const { unsent } = this;
    this.drafts.next(undefined);
    return unsent ? this.attempt(unsent).pipe(catchError(() => of(undefined))) : of(undefined);
  }

  /** What waits counts no more: a revision was made of it. */
  forget(): void {
    this.unsent = undefined;
    this.drafts.next(undefined);
  }

  private afterPause(draft: Draft): Observable<MendingDraft> {
    return timer(this.pauses.betweenEditsMs).pipe(
      switchMap(() => this.attempt(draft).pipe(retry({ delay: this.pauses.beforeRetryMs }))),
    );
  }

  private attempt({ revisionId, steps }: Draft): Observable<MendingDraft> {
    return this.client.keepDraft(revisionId, steps).pipe(
      tap((draft) => this.settle(draft)),
      catchError((error: unknown) => {
        this.current.set({ state: 'failed', problem: problemOf(error) });
        return throwError(() => error);
      }),
    );
  }

  private settle({ changedAt }: MendingDraft): void {
    this.unsent = undefined;
    this.current.set(changedAt === null ? { state: 'unchanged' } : { state: 'kept', at: changedAt });
  }

  /** Whoever leaves the page in the pause after an edit loses nothing either. */
  private leave(): void {
    this.sending.unsubscribe();
    const { unsent } = this;
    if (unsent) this.client.keepDraft(unsent.revisionId, unsent.steps).subscribe({ error: () => undefined });
  }
}
