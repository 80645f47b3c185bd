import { createHash } from 'node:crypto';
import { mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import BetterSqlite3 from 'better-sqlite3';
import { pino } from 'pino';
import { copyTemplateDatabase } from '../../../../test/support/template-database';
import type { ReadingChoices } from '../reading/reading-choices';
import { SpillFile } from '../reading/spill-file';
import { readTableInThread } from '../import-thread';
import { CellStorage } from './cell-storage';

const hook = join(__dirname, '..', '..', '..', '..', 'test', 'support', 'typescript-hook.js');
const nodeArguments = ['-r', hook];
const rowCount = 150_000;
const digest = (cells: Buffer): string => createHash('sha256').update(cells).digest('hex');

describe('storing while a file is still being read', () => {
  let folder: string;
  let databasePath: string;
  let connection: BetterSqlite3.Database;

  beforeEach(async () => {
    folder = mkdtempSync(join(tmpdir(), 'tarebeam-companion-'));
    databasePath = join(folder, 'tarebeam.sqlite');
    await copyTemplateDatabase(databasePath);
    connection = new BetterSqlite3(databasePath);
    connection.pragma('journal_mode = WAL');
  });

  afterEach(() => {
    connection.close();
    rmSync(folder, { recursive: true });
  });

  /** Reads a table of five columns, the last of which turns from numbers to words in its last row. */
  async function readAndStore(choices: ReadingChoices) {
    const [path, spillPath] = [join(folder, 'table.csv'), join(folder, 'spill')];
    const lines = Array.from({ length: rowCount }, (_, row) =>
      [row, row / 8, row % 7, -row, row === rowCount - 1 ? 'none' : row % 5].join(),
    );
    writeFileSync(path, `a,b,c,d,e\n${lines.join('\n')}\n`);
    const ahead = { databasePath, revisionId: 'r1' };
    const reading = await readTableInThread({ path, spillPath, choices, ahead }, { nodeArguments });
    await new CellStorage({ databasePath, threadArguments: nodeArguments, log: pino({ level: 'silent' }) }).storeAhead(
      'r1',
      reading,
      spillPath,
    );
    const spill = new SpillFile(spillPath, 'r');
    const expected = reading.columns.flatMap((column) =>
      column.blocks.map((place, block) => ({
        ...{
          position: column.position,
          block,
          rowCount: reading.blockRowCounts[block],
          cells: digest(spill.read(place)),
        },
      })),
    );
    spill.close();
    return { reading, expected };
  }

  const storedBlocks = (): unknown[] => {
    const rows = connection
      .prepare(
        `SELECT position, block, row_count AS rowCount, cells FROM record_blocks
         WHERE revision_id = 'r1' ORDER BY position, block`,
      )
      .all() as { readonly cells: Buffer }[];
    return rows.map((row) => ({ ...row, cells: digest(row.cells) }));
  };

  it('ends with the cells of the table as it was read, though the kind of a column was found out late', async () => {
    const { reading, expected } = await readAndStore({});
    expect(reading.stored?.length).toBeGreaterThan(3);
    expect(reading.columns.map((column) => column.kind)).toEqual([
      'numeric',
      'numeric',
      'numeric',
      'numeric',
      'category',
    ]);
    expect(storedBlocks()).toEqual(expected);
  });

  it('leaves nothing under the numbers that columns had before others were set aside', async () => {
    const { reading, expected } = await readAndStore({ columns: [{ name: 'b', setAside: true }] });
    expect(reading.stored?.length).toBeGreaterThan(3);
    expect(reading.columns.map((column) => column.name)).toEqual(['a', 'c', 'd', 'e']);
    expect(storedBlocks()).toEqual(expected);
  });
});
