import { DestroyRef, inject, signal } from '@angular/core';
import { takeUntilDestroyed } from '@angular/core/rxjs-interop';
import { EMPTY, finalize, map, switchMap } from 'rxjs';
import type { Finding, MendingDraft } from '../../api/contract';
import { MendingClient } from '../../api/mending-client';
import { problemOf, type Problem } from '../../api/problem';
import { Announcer } from '../../ui/announcer';
import { countOf } from '../../ui/figure';
import { load } from '../../ui/load';
import { holdsRemedy, withRemedy } from './remedies';
import type { Steps } from './steps-history';

const CLASH: Problem = {
  code: 'unreadable',
  status: 0,
  title: 'The rows cannot be dropped beside the steps that wait',
  detail:
    'A step that waits drops rows or names rows by number already. Take that step out of the mending, then add this one.',
  errors: [],
};

/** The steps that wait for a revision, to which remedies can be added. Make it in an injection context. */
export class WaitingSteps {
  private readonly client = inject(MendingClient);
  private readonly announcer = inject(Announcer);
  private readonly destroyRef = inject(DestroyRef);
  private readonly failure = signal<Problem | undefined>(undefined);
  private readonly sending = signal(false);
  private readonly draft;

  readonly problem = this.failure.asReadonly();
  readonly underWay = this.sending.asReadonly();

  /** `revisionId` gives undefined for whoever may not mend. */
  constructor(private readonly revisionId: () => string | undefined) {
    this.draft = load(() => {
      const id = this.revisionId();
      return id === undefined ? undefined : this.client.readDraft(id);
    });
  }

  /** Undefined until they are known. */
  get steps(): Steps | undefined {
    return this.draft.value()?.steps;
  }

  get readProblem(): Problem | undefined {
    return this.draft.problem();
  }

  holds({ steps }: Finding): boolean {
    return holdsRemedy(this.steps ?? [], steps);
  }

  readAgain(): void {
    this.draft.reload();
  }

  /** Adds to the list as it now stands on the service: the mending page may be open beside this one. */
  add(findings: readonly Finding[]): void {
    const id = this.revisionId();
    if (id === undefined || this.sending()) return;
    this.sending.set(true);
    this.failure.set(undefined);
    this.client
      .readDraft(id)
      .pipe(
        map(({ steps }) => withRemedies(steps, findings)),
        switchMap((steps) => {
          if (steps) return this.client.keepDraft(id, steps);
          this.failure.set(CLASH);
          return EMPTY;
        }),
        takeUntilDestroyed(this.destroyRef),
        finalize(() => this.sending.set(false)),
      )
      .subscribe({ next: (draft) => this.take(draft), error: (error: unknown) => this.failure.set(problemOf(error)) });
  }

  private take(draft: MendingDraft): void {
    this.draft.set(draft);
    this.announcer.say(`Added. ${countOf(draft.steps.length, 'step')} in the mending.`);
  }
}

function withRemedies(list: Steps, findings: readonly Finding[]): Steps | undefined {
  return findings.reduce<Steps | undefined>((steps, { steps: remedy }) => steps && withRemedy(steps, remedy), list);
}
