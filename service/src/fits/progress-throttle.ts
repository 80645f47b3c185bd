/** Passes on the newest value at most once in `everyMs`; what came between is dropped, the last is not. */
export class ProgressThrottle<Value> {
  private newest: Value | undefined;
  private timer: NodeJS.Timeout | undefined;

  constructor(
    private readonly everyMs: number,
    private readonly pass: (value: Value) => void,
  ) {}

  offer(value: Value): void {
    if (this.timer) {
      this.newest = value;
      return;
    }
    this.pass(value);
    this.timer = setTimeout(() => this.flush(), this.everyMs);
  }

  stop(): void {
    clearTimeout(this.timer);
    this.timer = undefined;
    this.newest = undefined;
  }

  private flush(): void {
    this.timer = undefined;
    const value = this.newest;
    this.newest = undefined;
    if (value !== undefined) this.offer(value);
  }
}
