import { Signal, computed, signal } from '@angular/core';
import { takeUntilDestroyed, toObservable } from '@angular/core/rxjs-interop';
import { EMPTY, Observable, catchError, map, of, startWith, switchMap } from 'rxjs';
import { Problem, problemOf } from '../api/problem';

export type LoadState = 'loading' | 'ready' | 'error';

/** One read of the service as signals; a screen switches on `state()`. */
export interface Load<Value> {
  readonly state: Signal<LoadState>;
  readonly value: Signal<Value | undefined>;
  readonly problem: Signal<Problem | undefined>;
  /** True while a newer answer is on its way and the older one still stands. */
  readonly reloading: Signal<boolean>;
  reload(): void;
  /** Puts a newer value in place, such as the answer to a change. */
  set(value: Value): void;
}

type Step<Value> = { readonly value: Value } | { readonly problem: Problem } | 'asking';

/**
 * Call in an injection context. `request` may read signals (a route input, say): when they change, it is asked
 * again and a call under way is cancelled. Return undefined to wait.
 */
export function load<Value>(request: () => Observable<Value> | undefined): Load<Value> {
  const attempt = signal(0);
  const value = signal<Value | undefined>(undefined);
  const problem = signal<Problem | undefined>(undefined);
  const asking = signal(true);

  const asked = computed(() => ({ attempt: attempt(), observable: request() }));
  toObservable(asked)
    .pipe(
      switchMap(({ observable }) => (observable ? steps(observable) : EMPTY)),
      takeUntilDestroyed(),
    )
    .subscribe((step) => {
      asking.set(step === 'asking');
      if (step === 'asking') return;
      problem.set('problem' in step ? step.problem : undefined);
      if ('value' in step) value.set(step.value);
    });

  return {
    state: computed(() => stateOf(asking(), problem(), value())),
    value: value.asReadonly(),
    problem: problem.asReadonly(),
    reloading: computed(() => asking() && value() !== undefined),
    reload: () => attempt.update((count) => count + 1),
    set: (newer) => value.set(newer),
  };
}

function steps<Value>(observable: Observable<Value>): Observable<Step<Value>> {
  return observable.pipe(
    map((value): Step<Value> => ({ value })),
    catchError((error: unknown) => of<Step<Value>>({ problem: problemOf(error) })),
    startWith<Step<Value>>('asking'),
  );
}

function stateOf(asking: boolean, problem: Problem | undefined, value: unknown): LoadState {
  if (asking && (value === undefined || problem)) return 'loading';
  if (problem) return 'error';
  return value === undefined ? 'loading' : 'ready';
}
