import { copyFileSync, existsSync, mkdirSync, readdirSync, renameSync, statSync } from 'node:fs';
import { createHash } from 'node:crypto';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { openDatabase } from '../../service/src/database/connection';
import { migrate } from '../../service/src/database/migrator';
import { rootFolder } from '../../service/src/root-folder';

const migrationsFolder = join(rootFolder, 'migrations');

/** Changes whenever a migration does. */
function fingerprint(): string {
  const files = readdirSync(migrationsFolder).sort();
  const stamps = files.map((file) => `${file}:${statSync(join(migrationsFolder, file)).mtimeMs}`);
  return createHash('sha256').update(stamps.join('|')).digest('hex').slice(0, 16);
}

/** Migrates one empty database and copies it for every test file: real SQLite, a few milliseconds each. */
export async function copyTemplateDatabase(target: string): Promise<void> {
  const folder = join(tmpdir(), 'tarebeam-test');
  mkdirSync(folder, { recursive: true });
  const template = join(folder, `template-${fingerprint()}.sqlite`);
  if (!existsSync(template)) {
    const draft = join(folder, `draft-${process.pid}-${Date.now()}.sqlite`);
    const knex = openDatabase(draft);
    await migrate(knex, migrationsFolder);
    await knex.raw('PRAGMA wal_checkpoint(TRUNCATE)');
    await knex.raw('PRAGMA journal_mode = DELETE');
    await knex.destroy();
    renameSync(draft, template);
  }
  copyFileSync(template, target);
}
