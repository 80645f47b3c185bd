import type BetterSqlite3 from 'better-sqlite3';
import type { SpillFile } from '../reading/spill-file';
import type { BlockPlaces } from './storage-task';

/**
 * Bytes of cells that one transaction writes. Others wait for the write lock meanwhile, the main thread with its
 * event loop, so a transaction must end within milliseconds; and it must stay under the thousand pages of WAL at
 * which the main thread's own connection would begin to copy them into the database.
 */
const transactionBytes = 2 * 1024 * 1024;

/** Blocks that one transaction removes. */
const removedAtOnce = 8;

export interface StoringWatch {
  /** Asked between transactions; true ends the work there. */
  stopped(): boolean;
  stored(done: number, total: number): void;
}

interface PlacedBlock {
  readonly position: number;
  readonly block: number;
  readonly offset: number;
  readonly length: number;
}

/**
 * The table `record_blocks` over a synchronous connection, changed in many short transactions. Each is followed by a
 * checkpoint, which needs no write lock, so that copying the WAL into the database never falls to the main thread.
 */
export class BlockTable {
  private cells = Buffer.alloc(0);

  constructor(private readonly connection: BetterSqlite3.Database) {}

  /** False when it was stopped before the end. */
  store(revisionId: string, table: BlockPlaces, spill: SpillFile, watch: StoringWatch): boolean {
    const insert = this.connection.prepare(
      'INSERT INTO record_blocks (revision_id, position, block, row_count, cells) VALUES (?, ?, ?, ?, ?)',
    );
    const placed = placedBlocks(table);
    for (let at = 0; at < placed.length;) {
      if (watch.stopped()) return false;
      const end = endOfBatch(placed, at);
      this.inShortTransaction(() => {
        for (const one of placed.slice(at, end)) {
          const { position, block } = one;
          insert.run(revisionId, position, block, table.blockRowCounts[block], this.cellsAt(one, spill));
        }
      });
      at = end;
      watch.stored(at, placed.length);
    }
    return true;
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
  private cellsAt(place: PlacedBlock, spill: SpillFile): Buffer {
    if (this.cells.byteLength < place.length) this.cells = Buffer.allocUnsafeSlow(place.length);
    spill.readInto(this.cells, place);
    return this.cells.subarray(0, place.length);
  }
}

const placedBlocks = ({ columns }: BlockPlaces): PlacedBlock[] =>
  columns.flatMap(({ position, blocks }) =>
    blocks.map(({ offset, length }, block) => ({ position, block, offset, length })),
  );

/** At least one block, and further ones as long as they fit. */
function endOfBatch(placed: readonly PlacedBlock[], start: number): number {
  let end = start + 1;
  let bytes = placed[start].length;
  while (end < placed.length && bytes + placed[end].length <= transactionBytes) bytes += placed[end++].length;
  return end;
}
