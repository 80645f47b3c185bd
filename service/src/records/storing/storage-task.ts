import type { SpilledBlock } from '../reading/spill-file';
import type { SpilledTable } from '../store-columns';

/** What the storing thread is told to do. */
export type StorageWork =
  | { readonly kind: 'store'; readonly revisionId: string; readonly table: BlockPlaces; readonly spillPath: string }
  /** Stores blocks as `FollowMessage`s tell of them. */
  | { readonly kind: 'follow'; readonly revisionId: string; readonly spillPath: string }
  | { readonly kind: 'clear'; readonly revisionId: string }
  /** `silentBefore`: tasks that have said nothing since then have died. */
  | { readonly kind: 'sweep'; readonly silentBefore: string };

export interface StorageTask {
  readonly databasePath: string;
  readonly work: StorageWork;
  /** One Int32; other than 0 asks the thread to stop between two transactions. */
  readonly stop: SharedArrayBuffer;
}

export type FollowMessage =
  { readonly kind: 'blocks'; readonly blocks: readonly SpilledBlock[] } | { readonly kind: 'end' };

export type StorageMessage =
  | { readonly kind: 'progress'; readonly done: number; readonly total: number }
  | { readonly kind: 'done' }
  | { readonly kind: 'stopped' };

/** Where the cells of each column lie in the spill file. */
export interface BlockPlaces extends Pick<SpilledTable, 'blockRowCounts' | 'stored'> {
  readonly columns: readonly Pick<SpilledTable['columns'][number], 'position' | 'blocks'>[];
}
