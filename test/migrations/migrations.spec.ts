import { mkdtempSync, readdirSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import type { Knex } from 'knex';
import { openDatabase } from '../../service/src/database/connection';
import { FolderMigrations, migrate } from '../../service/src/database/migrator';
import { rootFolder } from '../../service/src/root-folder';

const folder = join(rootFolder, 'migrations');

describe('migrations', () => {
  let place: string;
  let knex: Knex;
  beforeEach(() => {
    place = mkdtempSync(join(tmpdir(), 'tarebeam-migrations-'));
    knex = openDatabase(join(place, 'empty.sqlite'));
  });
  afterEach(async () => {
    await knex.destroy();
    rmSync(place, { recursive: true });
  });

  const tables = async (): Promise<string[]> => {
    const rows = (await knex.raw(
      "select name from sqlite_master where type = 'table' and name not like 'sqlite_%' order by name",
    )) as { name: string }[];
    return rows.map((row) => row.name).filter((name) => !name.startsWith('knex_'));
  };

  it('run from nothing, leave foreign keys on and refer to no missing row', async () => {
    const applied = await migrate(knex, folder);
    expect(applied).toEqual(readdirSync(folder).sort());
    expect(await knex.raw('PRAGMA foreign_keys')).toEqual([{ foreignKeys: 1 }]);
    expect(await knex.raw('PRAGMA integrity_check')).toEqual([{ integrityCheck: 'ok' }]);
  });

  it('do nothing the second time', async () => {
    await migrate(knex, folder);
    expect(await migrate(knex, folder)).toEqual([]);
  });

  it('can all be taken back', async () => {
    await migrate(knex, folder);
    await knex.raw('PRAGMA foreign_keys = OFF');
    await knex.migrate.rollback({ migrationSource: new FolderMigrations(folder) }, true);
    expect(await tables()).toEqual([]);
  });

  it('give every table a primary key', async () => {
    await migrate(knex, folder);
    for (const table of await tables()) {
      const columns = (await knex.raw(`PRAGMA table_info(${table})`)) as { pk: number }[];
      expect({ table, keyed: columns.some((column) => column.pk > 0) }).toEqual({ table, keyed: true });
    }
  });

  it('let one edition of an estimator be in force and no second', async () => {
    await migrate(knex, folder);
    await knex.raw('PRAGMA foreign_keys = OFF');
    const edition = (id: string, number: number) => ({
      id,
      estimatorId: 'estimator',
      number,
      fitId: 'fit',
      state: 'in-force',
      changeNote: '',
      formula: '{}',
      checksum: '',
      inputSchema: '{}',
      cautions: '[]',
      method: 'ridge',
      rmse: 1,
      recordCount: 1,
      inputCount: 1,
      createdAt: '',
      createdBy: 'person',
    });
    await knex('editions').insert(edition('first', 1));
    await expect(knex('editions').insert(edition('second', 2))).rejects.toMatchObject({
      message: expect.stringMatching(/UNIQUE/),
    });
  });
});
