import { readdirSync } from 'node:fs';
import { join } from 'node:path';
import type { Knex } from 'knex';

interface MigrationFile {
  readonly name: string;
  readonly path: string;
}

/**
 * Migrations from a folder, recorded under one name for ever: `20261201090000-create-people.ts`, whether they are
 * run from the sources (tests) or compiled (`.js`).
 */
export class FolderMigrations implements Knex.MigrationSource<MigrationFile> {
  constructor(private readonly folder: string) {}

  async getMigrations(): Promise<MigrationFile[]> {
    return readdirSync(this.folder)
      .filter((file) => /^\d{14}-[a-z0-9-]+\.(ts|js)$/.test(file))
      .sort()
      .map((file) => ({ name: file.replace(/\.(ts|js)$/, '.ts'), path: join(this.folder, file) }));
  }

  getMigrationName(migration: MigrationFile): string {
    return migration.name;
  }

  async getMigration(migration: MigrationFile): Promise<Knex.Migration> {
    return (await import(migration.path)) as Knex.Migration;
  }
}

/**
 * Brings the database up to the newest migration. Foreign keys are off meanwhile, since SQLite rebuilds a table by
 * dropping it and the drop would empty its children; afterwards every reference is checked.
 */
export async function migrate(knex: Knex, folder: string): Promise<readonly string[]> {
  await knex.raw('PRAGMA foreign_keys = OFF');
  const [, applied] = (await knex.migrate.latest({ migrationSource: new FolderMigrations(folder) })) as [
    number,
    string[],
  ];
  const broken = (await knex.raw('PRAGMA foreign_key_check')) as unknown[];
  if (broken.length > 0) throw new Error(`After migrating, ${broken.length} rows refer to rows that do not exist.`);
  await knex.raw('PRAGMA foreign_keys = ON');
  return applied;
}
