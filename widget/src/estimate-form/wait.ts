import { signal } from '@angular/core';

/** Counts down the seconds for which asking again would be refused. */
export class Wait {
  readonly seconds = signal(0);
  private timer: ReturnType<typeof setInterval> | undefined;

  start(seconds: number): void {
    clearInterval(this.timer);
    this.seconds.set(Math.max(0, Math.ceil(seconds)));
    if (this.seconds() > 0) {
      this.timer = setInterval(() => this.tick(), 1000);
    }
  }

  private tick(): void {
    this.seconds.update((left) => left - 1);
    if (this.seconds() <= 0) {
      clearInterval(this.timer);
    }
  }
}
