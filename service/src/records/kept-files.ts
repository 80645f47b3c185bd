import { createHash } from 'node:crypto';
import { createReadStream, createWriteStream, mkdirSync } from 'node:fs';
import { open, readdir, rename, rm, stat, utimes } from 'node:fs/promises';
import { basename, join } from 'node:path';
import type { Readable } from 'node:stream';
import { pipeline } from 'node:stream/promises';
import { newId } from '../database/new-id';
import { DeskError } from '../errors';
import { translateFullDisk } from './storage-full';

/** A file on its way in: whole, on disk, under a name of its own. */
export interface ReceivedFile {
  readonly path: string;
  readonly sha256: string;
  readonly byteCount: number;
}

/** Read at once when a file is copied: large enough that the handing over costs little. */
const copyBytes = 1024 * 1024;

const megabytes = (bytes: number): string => `${Math.floor(bytes / 1_000_000).toLocaleString('en-GB')} MB`;

/** A file of ours: on its way in, its cells, or under its lasting name. */
const ours = /^(incoming-)?[0-9a-z]{16}(\.spill)?$/;
const dayMs = 24 * 60 * 60 * 1000;

/** The uploaded files, byte for byte, in one folder. */
export class KeptFiles {
  constructor(
    private readonly folder: string,
    private readonly maximumBytes: number,
  ) {
    mkdirSync(folder, { recursive: true });
  }

  /** Streams a file to disk and hashes it on the way. Whatever goes wrong, no part of it stays. */
  async receive(source: Readable, signal?: AbortSignal): Promise<ReceivedFile> {
    const path = join(this.folder, `incoming-${newId()}`);
    const hash = createHash('sha256');
    let byteCount = 0;
    const { maximumBytes } = this;
    async function* measured(chunks: AsyncIterable<Buffer>): AsyncGenerator<Buffer> {
      for await (const chunk of chunks) {
        byteCount += chunk.length;
        if (byteCount > maximumBytes) throw tooLarge(maximumBytes);
        hash.update(chunk);
        yield chunk;
      }
    }
    try {
      await pipeline(source, measured, createWriteStream(path, { flags: 'wx' }), { signal });
    } catch (error) {
      await rm(path, { force: true });
      throw translateFullDisk(error);
    }
    return { path, sha256: hash.digest('hex'), byteCount };
  }

  /** A copy of a file that lies elsewhere. */
  async receiveCopy(path: string): Promise<ReceivedFile> {
    return this.receive(createReadStream(path, { highWaterMark: copyBytes }));
  }

  spillPathOf(file: ReceivedFile): string {
    return `${file.path}.spill`;
  }

  /** For cells that come from no received file. */
  newSpillPath(): string {
    return join(this.folder, `incoming-${newId()}.spill`);
  }

  /** A received file by the name that `nameOf` gave. */
  received(name: string, facts: Pick<ReceivedFile, 'sha256' | 'byteCount'>): ReceivedFile {
    return { path: this.pathOf(name), sha256: facts.sha256, byteCount: facts.byteCount };
  }

  /** What to write down of a received file, to find it again. */
  nameOf(file: ReceivedFile): string {
    return basename(file.path);
  }

  /** Gives a received file its lasting name. It counts as young from now on, so that no sweep takes it. */
  async keep(file: ReceivedFile, name: string): Promise<void> {
    const now = new Date();
    await utimes(file.path, now, now);
    await rename(file.path, this.pathOf(name));
  }

  /** Undoes `keep`, whether it came to that or not. */
  async takeBack(file: ReceivedFile, name: string): Promise<void> {
    await unlessMissing(rename(this.pathOf(name), file.path));
  }

  /** Its bytes; null when it is not there. */
  async open(name: string): Promise<Readable | null> {
    const file = await unlessMissing(open(this.pathOf(name), 'r'));
    return file && file.createReadStream();
  }

  /** Whether the file is there, whole: after a crash of the machine it may be neither. */
  async holds(name: string, byteCount: number): Promise<boolean> {
    return (await unlessMissing(stat(this.pathOf(name))))?.size === byteCount;
  }

  pathOf(name: string): string {
    return join(this.folder, name);
  }

  async remove(...paths: readonly string[]): Promise<void> {
    for (const path of paths) await rm(path, { force: true });
  }

  /**
   * Removes what a process that was killed left behind: files that nobody has named, by what the database knows.
   * Younger files may be another process's, on their way.
   */
  async sweep(now: Date, isNamed: (name: string) => boolean, olderThanMs = dayMs): Promise<void> {
    for (const name of await readdir(this.folder)) {
      if (!ours.test(name) || isNamed(name)) continue;
      const changedAt = await changeTimeOf(this.pathOf(name));
      if (changedAt !== null && changedAt < now.getTime() - olderThanMs) await this.remove(this.pathOf(name));
    }
  }
}

async function unlessMissing<Result>(work: Promise<Result>): Promise<Result | null> {
  try {
    return await work;
  } catch (error) {
    if ((error as NodeJS.ErrnoException).code === 'ENOENT') return null;
    throw error;
  }
}

/** Null when another process has removed the file in the meantime. */
const changeTimeOf = async (path: string): Promise<number | null> => (await unlessMissing(stat(path)))?.mtimeMs ?? null;

export const tooLarge = (maximumBytes: number): DeskError =>
  new DeskError(
    'file-too-large',
    `The file is larger than ${megabytes(maximumBytes)}. Leave out columns or rows that you do not need, or send it in parts.`,
  );
