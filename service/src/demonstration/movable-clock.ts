import type { Clock } from '../clock';

/** Stands where it is put and runs on from there, so that what is done in a row has times in a row. */
export class MovableClock implements Clock {
  private setAt = Date.now();

  constructor(private time: number) {}

  now(): Date {
    return new Date(this.time + Date.now() - this.setAt);
  }

  moveTo(time: number): void {
    this.time = time;
    this.setAt = Date.now();
  }
}
