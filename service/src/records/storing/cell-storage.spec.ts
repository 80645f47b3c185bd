import { existsSync, mkdtempSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import BetterSqlite3 from 'better-sqlite3';
import { copyTemplateDatabase } from '../../../../test/support/template-database';
import { numbersToCells } from '../cell-blocks';
import { finishTable } from '../mending/finish-table';
import { SpillFile } from '../reading/spill-file';
import type { SpilledTable } from '../store-columns';
import { CellStorage } from './cell-storage';

const hook = join(__dirname, '..', '..', '..', '..', 'test', 'support', 'typescript-hook.js');
const rowCount = 200_000;
const values = Float64Array.from({ length: rowCount }, (_, row) => Math.sin(row));

describe('the storage of cells', () => {
  let folder: string;
  let databasePath: string;
  let spillPath: string;
  let storage: CellStorage;
  let table: SpilledTable;
  let connection: BetterSqlite3.Database;
  const log = { error: jest.fn() };

  const stored = (revisionId: string): { position: number; block: number; rowCount: number; cells: Buffer }[] =>
    connection
      .prepare(
        `SELECT position, block, row_count AS rowCount, cells FROM record_blocks
         WHERE revision_id = ? ORDER BY position, block`,
      )
      .all(revisionId) as ReturnType<typeof stored>;

  const addTask = (id: string, state: string, saidAt: string): unknown =>
    connection
      .prepare(
        `INSERT INTO record_tasks (id, kind, state, progress, revision_id, said_at, created_at, created_by)
         VALUES (?, 'mend', ?, '{}', ?, ?, ?, 'ada')`,
      )
      .run(`task of ${id}`, state, id, saidAt, saidAt);

  beforeEach(async () => {
    folder = mkdtempSync(join(tmpdir(), 'tarebeam-cells-'));
    databasePath = join(folder, 'tarebeam.sqlite');
    spillPath = join(folder, 'cells.spill');
    await copyTemplateDatabase(databasePath);
    connection = new BetterSqlite3(databasePath);
    connection.pragma('journal_mode = WAL');
    connection.pragma('foreign_keys = OFF');
    const spill = new SpillFile(spillPath, 'wx+');
    const columns = [
      { name: 'length', kind: 'numeric', values },
      { name: 'hull', kind: 'category', codes: new Int32Array(rowCount).fill(-1), levels: [] },
    ] as const;
    table = finishTable({ rowCount, columns }, spill);
    spill.close();
    storage = new CellStorage({ databasePath, threadArguments: ['-r', hook], log });
  });

  afterEach(() => {
    connection.close();
    rmSync(folder, { recursive: true });
  });

  it('holds every block of every column, byte for byte, before the revision has a row', async () => {
    const said: unknown[] = [];
    await storage.storeAhead('r1', table, spillPath, { onProgress: (progress) => said.push(progress) });
    const blocks = stored('r1');
    expect(blocks.map(({ position, block, rowCount }) => [position, block, rowCount])).toEqual(
      [0, 1].flatMap((position) => table.blockRowCounts.map((rows, block) => [position, block, rows])),
    );
    expect(Buffer.concat(blocks.slice(0, 4).map((block) => block.cells)).equals(numbersToCells(values))).toBe(true);
    expect(said.at(-1)).toEqual({ stage: 'storing', done: 8, total: 8 });
  });

  it('keeps what others write from growing the log that the main thread would have to copy', async () => {
    await storage.storeAhead('r1', table, spillPath);
    const [{ log }] = connection.pragma('wal_checkpoint(PASSIVE)') as [{ log: number }];
    expect(log).toBeLessThan(1000);
  });

  it('stops when it is cancelled, and clears what it stored', async () => {
    const controller = new AbortController();
    const work = jest.fn();
    const storing = storage.storeFor({ revisionId: 'r1', table, spillPath }, work, {
      signal: controller.signal,
      onProgress: () => controller.abort(),
    });
    controller.abort();
    await expect(storing).rejects.toMatchObject({ code: 'body-unreadable' });
    expect(work).not.toHaveBeenCalled();
    expect(stored('r1')).toEqual([]);
  });

  it('clears the cells when the unit of work that needs them fails, and those only', async () => {
    await storage.storeAhead('r2', table, spillPath);
    const failing = storage.storeFor({ revisionId: 'r1', table, spillPath }, async () => {
      expect(stored('r1')).toHaveLength(8);
      throw new Error('the name is taken');
    });
    await expect(failing).rejects.toThrow('the name is taken');
    expect(stored('r1')).toEqual([]);
    expect(stored('r2')).toHaveLength(8);
  });

  it('tells what failed first, and logs that the cells could not be cleared after it', async () => {
    const failing = storage.storeFor({ revisionId: 'r1', table, spillPath }, async () => {
      connection.exec('ALTER TABLE record_blocks RENAME TO elsewhere');
      throw new Error('the name is taken');
    });
    await expect(failing).rejects.toThrow('the name is taken');
    expect(log.error).toHaveBeenCalledWith(
      { err: expect.objectContaining({ code: 'SQLITE_ERROR' }), revisionId: 'r1' },
      expect.any(String),
    );
    expect(existsSync(spillPath)).toBe(false);
  });

  it('sweeps cells without a revision, unless work that is alive is storing them', async () => {
    const now = new Date('2026-11-03T09:00:00.000Z');
    for (const id of ['kept', 'alive', 'dead', 'failed', 'forgotten']) await storage.storeAhead(id, table, spillPath);
    connection
      .prepare(
        `INSERT INTO record_revisions (id, record_set_id, number, sha256, row_count, column_count, byte_count,
           file_name, original_path, reading, created_at, created_by)
         VALUES ('kept', 's', 1, '', 1, 1, 1, '', '', '{}', '', 'ada')`,
      )
      .run();
    addTask('alive', 'running', '2026-11-03T08:59:59.000Z');
    addTask('dead', 'running', '2026-11-03T07:00:00.000Z');
    addTask('failed', 'failed', '2026-11-03T08:59:59.000Z');
    await storage.sweep(now);
    const left = ['kept', 'alive', 'dead', 'failed', 'forgotten'].filter((id) => stored(id).length > 0);
    expect(left).toEqual(['kept', 'alive']);
  });
});
