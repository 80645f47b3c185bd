import { Signal, computed, signal } from '@angular/core';
import { takeUntilDestroyed } from '@angular/core/rxjs-interop';
import { Subject, map, switchMap, takeWhile, timer } from 'rxjs';

const SECOND_MS = 1000;

/** Seconds left of a wait that the service asked for. Make it in an injection context. */
export class Countdown {
  private readonly starts = new Subject<number>();
  private readonly left = signal(0);

  readonly seconds: Signal<number> = this.left.asReadonly();
  readonly running = computed(() => this.left() > 0);

  constructor() {
    this.starts
      .pipe(
        switchMap((seconds) =>
          timer(0, SECOND_MS).pipe(
            map((elapsed) => seconds - elapsed),
            takeWhile((left) => left >= 0),
          ),
        ),
        takeUntilDestroyed(),
      )
      .subscribe((left) => this.left.set(left));
  }

  start(seconds: number): void {
    this.starts.next(seconds);
  }
}
