/** An independent piece of work that may run on another thread: plain data in, plain data out. */
export interface FoldTask {
  readonly kind: string;
}

export interface FoldAnswer {
  readonly kind: string;
}
