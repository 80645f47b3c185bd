import { createReadStream, type ReadStream } from 'node:fs';
import { open } from 'node:fs/promises';
import { pipeline } from 'node:stream';
import { createGunzip } from 'node:zlib';
import { TableProblem } from './table-problem';

const chunkBytes = 256 * 1024;

/** A small compressed file can unpack to almost anything. */
const maximumUnpackedBytes = 4_000_000_000;

async function isGzip(path: string): Promise<boolean> {
  const file = await open(path, 'r');
  try {
    const { buffer, bytesRead } = await file.read(Buffer.alloc(2), 0, 2, 0);
    return bytesRead === 2 && buffer[0] === 0x1f && buffer[1] === 0x8b;
  } finally {
    await file.close();
  }
}

/** Told after every chunk how many bytes of the file, as it lies on disk, have been read. */
export type OnBytes = (bytes: number) => void;

function counted(path: string, onBytes: OnBytes): ReadStream {
  const stream = createReadStream(path, { highWaterMark: chunkBytes });
  stream.on('data', () => onBytes(stream.bytesRead));
  return stream;
}

async function* unpacked(path: string, onBytes?: OnBytes): AsyncGenerator<Buffer> {
  // Errors of either stream come out of the iteration.
  const stream = pipeline(
    onBytes ? counted(path, onBytes) : createReadStream(path, { highWaterMark: chunkBytes }),
    createGunzip({ chunkSize: chunkBytes }),
    () => undefined,
  );
  let total = 0;
  try {
    for await (const chunk of stream as AsyncIterable<Buffer>) {
      total += chunk.length;
      if (total > maximumUnpackedBytes)
        throw new TableProblem('file-too-large', 'The file unpacks to more than 4,000 MB. Send it in parts.');
      yield chunk;
    }
  } catch (error) {
    if (
      !String((error as { code?: unknown }).code).startsWith('Z_') &&
      (error as { code?: unknown }).code !== 'ERR_STREAM_PREMATURE_CLOSE'
    )
      throw error;
    throw new TableProblem(
      'file-not-table',
      'The compressed file is damaged or breaks off. Pack it again, or send it unpacked.',
    );
  }
}

/** A file's bytes, unpacked when it is gzip. */
export async function* fileBytes(path: string, onBytes?: OnBytes): AsyncGenerator<Buffer> {
  if (await isGzip(path)) {
    yield* unpacked(path, onBytes);
    return;
  }
  let read = 0;
  for await (const chunk of createReadStream(path, { highWaterMark: chunkBytes }) as AsyncIterable<Buffer>) {
    read += chunk.length;
    onBytes?.(read);
    yield chunk;
  }
}

export interface FileSample {
  readonly sample: Buffer;
  /** Whether the sample is the whole file. */
  readonly complete: boolean;
}

export async function readSample(path: string, sampleBytes: number): Promise<FileSample> {
  const chunks: Buffer[] = [];
  let length = 0;
  for await (const chunk of fileBytes(path)) {
    chunks.push(chunk);
    length += chunk.length;
    if (length > sampleBytes) break;
  }
  return { sample: Buffer.concat(chunks).subarray(0, sampleBytes), complete: length <= sampleBytes };
}
