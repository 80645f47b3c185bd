import { createHash } from 'node:crypto';
import { createReadStream, createWriteStream, mkdirSync } from 'node:fs';
import { readdir, rename, rm, stat } from 'node:fs/promises';
import { join } from 'node:path';
import type { Readable } from 'node:stream';
import { pipeline } from 'node:stream/promises';
import { newId } from '../database/new-id';
import { DeskError } from '../errors';

/** A file on its way in: whole, on disk, under a name of its own. */
export interface ReceivedFile {
  readonly path: string;
  readonly sha256: string;
  readonly byteCount: number;
}

const megabytes = (bytes: number): string => `${Math.floor(bytes / 1_000_000).toLocaleString('en-GB')} MB`;
const incoming = /^incoming-[0-9a-z]+(\.spill)?$/;

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
      throw error;
    }
    return { path, sha256: hash.digest('hex'), byteCount };
  }

  /** A copy of a file that lies elsewhere. */
  async receiveCopy(path: string): Promise<ReceivedFile> {
    return this.receive(createReadStream(path));
  }

  spillPathOf(file: ReceivedFile): string {
    return `${file.path}.spill`;
  }

  /** For cells that come from no received file. */
  newSpillPath(): string {
    return join(this.folder, `incoming-${newId()}.spill`);
  }

  /** Gives a received file its lasting name. */
  async keep(file: ReceivedFile, name: string): Promise<void> {
    await rename(file.path, this.pathOf(name));
  }

  pathOf(name: string): string {
    return join(this.folder, name);
  }

  async remove(...paths: readonly string[]): Promise<void> {
    for (const path of paths) await rm(path, { force: true });
  }

  /** Removes what a process that was killed left behind. Younger files may be another process's. */
  async sweep(now: Date, olderThanMs = 24 * 60 * 60 * 1000): Promise<void> {
    for (const name of (await readdir(this.folder)).filter((name) => incoming.test(name))) {
      const { mtimeMs } = await stat(this.pathOf(name));
      if (mtimeMs < now.getTime() - olderThanMs) await this.remove(this.pathOf(name));
    }
  }
}

export const tooLarge = (maximumBytes: number): DeskError =>
  new DeskError(
    'file-too-large',
    `The file is larger than ${megabytes(maximumBytes)}. Leave out columns or rows that you do not need, or send it in parts.`,
  );
