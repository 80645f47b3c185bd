/** Work that recurs. A run that fails is logged and tried again the next time. */
export interface Job {
  readonly name: string;
  readonly everyMs: number;
  run(): Promise<void>;
}
