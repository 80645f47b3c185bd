import { Injectable, inject } from '@angular/core';
import { Observable, catchError, map, of, shareReplay, tap, throwError } from 'rxjs';
import type { MendStep, MendingTrial, RecordRevision } from '../../api/contract';
import { MendingClient, refusedStepOf, type RefusedStep } from '../../api/mending-client';
import { problemOf } from '../../api/problem';
import type { Steps } from './steps-history';

export type TrialColumn = MendingTrial['columns'][number];
export type StepEffect = MendingTrial['effects'][number];

/** What would come out of a list of steps, or of those before the one that cannot be done. */
export interface Outlook {
  readonly rowCount: number;
  readonly columns: readonly TrialColumn[];
  /** Of the steps that can be done, from the first on. */
  readonly effects: readonly StepEffect[];
  readonly refused?: RefusedStep;
}

/** Outlooks that are remembered, so that undoing and redoing asks the service nothing. */
const REMEMBERED = 30;

/** Tries lists of steps on one revision. Provide it with the screen: what it remembers goes with it. */
@Injectable()
export class Trials {
  private readonly client = inject(MendingClient);
  private readonly known = new Map<string, Observable<Outlook>>();
  private readonly numbers = new WeakMap<MendStep, number>();
  private lastNumber = 0;

  outlookOf(revision: RecordRevision, steps: Steps): Observable<Outlook> {
    if (steps.length === 0) return of(unchanged(revision));
    const key = [revision.id, ...steps.map((step) => this.numberOf(step))].join(' ');
    return this.known.get(key) ?? this.remember(key, this.asked(revision, steps, key));
  }

  private asked(revision: RecordRevision, steps: Steps, key: string): Observable<Outlook> {
    return this.client.tryOut(revision.id, steps).pipe(
      map((trial): Outlook => trial),
      catchError((error: unknown) => this.upToRefused(revision, steps, error)),
      tap({ error: () => this.known.delete(key) }),
      shareReplay({ bufferSize: 1, refCount: true }),
    );
  }

  private upToRefused(revision: RecordRevision, steps: Steps, error: unknown): Observable<Outlook> {
    const refused = refusedStepOf(problemOf(error));
    if (!refused || refused.index >= steps.length) return throwError(() => error);
    return this.outlookOf(revision, steps.slice(0, refused.index)).pipe(map((outlook) => ({ refused, ...outlook })));
  }

  private remember(key: string, outlook: Observable<Outlook>): Observable<Outlook> {
    this.known.set(key, outlook);
    const [oldest] = this.known.keys();
    if (this.known.size > REMEMBERED) this.known.delete(oldest);
    return outlook;
  }

  /** Steps are never changed in place, so each object stands for one step. */
  private numberOf(step: MendStep): number {
    const known = this.numbers.get(step) ?? ++this.lastNumber;
    this.numbers.set(step, known);
    return known;
  }
}

function unchanged({ rowCount, columns }: RecordRevision): Outlook {
  return {
    rowCount,
    columns: columns.map(({ name, kind, unit, missingCount }) => ({ name, kind, unit, missingCount })),
    effects: [],
  };
}
