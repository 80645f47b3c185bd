import type { Database } from '../../database/database';

/** A file that has arrived and does not count yet. */
export interface IncomingFileRecord {
  readonly id: string;
  readonly fileName: string;
  /** Name within the folder of uploads. */
  readonly path: string;
  readonly sha256: string;
  readonly byteCount: number;
  readonly receivedAt: string;
  readonly keptUntil: string;
  readonly createdBy: string;
}

export class IncomingFilesStore {
  constructor(private readonly database: Database) {}

  async insert(file: IncomingFileRecord): Promise<void> {
    await this.database.connection('incomingFiles').insert(file);
  }

  async findOf(personId: string, id: string): Promise<IncomingFileRecord | null> {
    const row = (await this.database.connection('incomingFiles').where({ id, createdBy: personId }).first()) as
      IncomingFileRecord | undefined;
    return row ? { ...row, byteCount: Number(row.byteCount) } : null;
  }

  /** False when it is not there any more. */
  async keepUntil(id: string, keptUntil: string): Promise<boolean> {
    return (await this.database.connection('incomingFiles').where({ id }).update({ keptUntil })) > 0;
  }

  /** False when it is not there any more. */
  async remove(id: string): Promise<boolean> {
    return (await this.database.connection('incomingFiles').where({ id }).delete()) > 0;
  }

  /** Removes those whose time has passed, and answers the names of their files. */
  async removeKeptUntil(time: string): Promise<string[]> {
    const { connection } = this.database;
    const past = (await connection('incomingFiles').where('keptUntil', '<', time).select('id', 'path')) as {
      id: string;
      path: string;
    }[];
    const names: string[] = [];
    for (const { id, path } of past) {
      // Asked again: its time may have been put off a moment ago.
      if ((await connection('incomingFiles').where({ id }).where('keptUntil', '<', time).delete()) > 0)
        names.push(path);
    }
    return names;
  }

  /** Names of the files in the folder of uploads that the database knows of: those on their way and the originals. */
  async namedFiles(): Promise<ReadonlySet<string>> {
    const { connection } = this.database;
    const incoming = (await connection('incomingFiles').select('path as name')) as { name: string }[];
    const originals = (await connection('recordRevisions').select('originalPath as name')) as { name: string }[];
    return new Set([...incoming, ...originals].map((file) => file.name));
  }
}
