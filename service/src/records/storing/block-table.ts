import type BetterSqlite3 from 'better-sqlite3';
import type { SpilledBlock, SpillFile } from '../reading/spill-file';
import type { StoredBlock } from '../store-columns';
import type { BlockPlaces } from './storage-task';

/**
 * Bytes of cells that one transaction writes. Others wait for the write lock meanwhile, the main thread with its
 * event loop, so a transaction must end within milliseconds; and it must stay under the thousand pages of WAL at
 * which the main thread's own connection would begin to copy them into the database.
 */
export const transactionBytes = 2 * 1024 * 1024;

/** Blocks that one transaction removes. */
const removedAtOnce = 8;

export interface StoringWatch {
  /** Asked between transactions; true ends the work there. */
  stopped(): boolean;
  stored(done: number, total: number): void;
}

/**
 * The table `record_blocks` over a synchronous connection, changed in many short transactions. Each is followed by a
 * checkpoint, which needs no write lock, so that copying the WAL into the database never falls to the main thread.
 */
export class BlockTable {
  private cells = Buffer.alloc(0);

  constructor(private readonly connection: BetterSqlite3.Database) {}

  /** Stores what is not stored yet. False when it was stopped before the end. */
  store(revisionId: string, table: BlockPlaces, spill: SpillFile, watch: StoringWatch): boolean {
    const placed = placedBlocks(table);
    const stored = new Map(table.stored?.map((one) => [keyOf(one), one]));
    const left = placed.filter((one) => stored.get(keyOf(one))?.offset !== one.offset);
    this.removeStrangers(revisionId, placed, table.stored ?? []);
    const before = placed.length - left.length;
    for (let at = 0; at < left.length;) {
      if (watch.stopped()) return false;
      const end = endOfBatch(left, at);
      this.put(revisionId, left.slice(at, end), spill);
      at = end;
      watch.stored(before + at, placed.length);
    }
    return true;
  }

  /** Stores blocks in one transaction, in place of what was stored under the same number. */
  put(revisionId: string, blocks: readonly SpilledBlock[], spill: SpillFile): void {
    const insert = this.connection.prepare(
      'INSERT OR REPLACE INTO record_blocks (revision_id, position, block, row_count, cells) VALUES (?, ?, ?, ?, ?)',
    );
    this.inShortTransaction(() => {
      for (const one of blocks) {
        const { position, block, rowCount } = one;
        insert.run(revisionId, position, block, rowCount, this.cellsAt(one, spill));
      }
    });
  }

  /** Also empties the WAL, where the cells stand once more. */
  clear(revisionId: string): void {
    this.removeWhile(revisionId, '');
    this.emptyLog();
  }

  /**
   * Removes blocks that belong to no revision and to no work that is still going on. A revision whose row appears
   * in the meantime is left alone, and the check of `storeColumns` refuses one that lost blocks before its row came.
   */
  sweep(silentBefore: string): void {
    const orphans = this.connection
      .prepare(
        `SELECT DISTINCT revision_id FROM record_blocks
         WHERE revision_id NOT IN (SELECT id FROM record_revisions)
         AND revision_id NOT IN
           (SELECT revision_id FROM record_tasks WHERE state IN ('queued', 'running') AND said_at >= ?)`,
      )
      .pluck()
      .all(silentBefore) as string[];
    for (const revisionId of orphans)
      this.removeWhile(revisionId, 'AND revision_id NOT IN (SELECT id FROM record_revisions)');
  }

  /** Blocks of columns that were set aside or turned out to be others were stored under numbers that no column has. */
  private removeStrangers(revisionId: string, placed: readonly SpilledBlock[], stored: readonly StoredBlock[]): void {
    const wanted = new Set(placed.map(keyOf));
    const strangers = stored.filter((one) => !wanted.has(keyOf(one)));
    const remove = this.connection.prepare(
      'DELETE FROM record_blocks WHERE revision_id = ? AND position = ? AND block = ?',
    );
    for (let at = 0; at < strangers.length; at += removedAtOnce) {
      this.inShortTransaction(() => {
        for (const { position, block } of strangers.slice(at, at + removedAtOnce))
          remove.run(revisionId, position, block);
      });
    }
  }

  private removeWhile(revisionId: string, condition: string): void {
    const remove = this.connection.prepare(
      `DELETE FROM record_blocks WHERE rowid IN
       (SELECT rowid FROM record_blocks WHERE revision_id = ? ${condition} LIMIT ${removedAtOnce})`,
    );
    while (this.inShortTransaction(() => remove.run(revisionId).changes) > 0);
  }

  /** Not while somebody is reading: the checkpoint would wait for them under the write lock, and hold up the rest. */
  private emptyLog(): void {
    const patience = this.connection.pragma('busy_timeout', { simple: true }) as number;
    this.connection.pragma('busy_timeout = 0');
    this.connection.pragma('wal_checkpoint(TRUNCATE)');
    this.connection.pragma(`busy_timeout = ${patience}`);
  }

  private inShortTransaction<Result>(work: () => Result): Result {
    const result = this.connection.transaction(work).immediate();
    this.connection.pragma('wal_checkpoint(PASSIVE)');
    return result;
  }

  /** In a buffer that serves every block, since the statement copies what it is given. */
  private cellsAt(place: SpilledBlock, spill: SpillFile): Buffer {
    if (this.cells.byteLength < place.length) this.cells = Buffer.allocUnsafeSlow(place.length);
    spill.readInto(this.cells, place);
    return this.cells.subarray(0, place.length);
  }
}

const keyOf = ({ position, block }: Pick<SpilledBlock, 'position' | 'block'>): string => `${position} ${block}`;

const placedBlocks = ({ columns, blockRowCounts }: BlockPlaces): SpilledBlock[] =>
  columns.flatMap(({ position, blocks }) =>
    blocks.map(({ offset, length }, block) => ({ position, block, rowCount: blockRowCounts[block], offset, length })),
  );

/** At least one block, and further ones as long as they fit. */
function endOfBatch(placed: readonly SpilledBlock[], start: number): number {
  let end = start + 1;
  let bytes = placed[start].length;
  while (end < placed.length && bytes + placed[end].length <= transactionBytes) bytes += placed[end++].length;
  return end;
}
