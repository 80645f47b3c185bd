import { open, type FileHandle } from 'node:fs/promises';
import { createInflateRaw } from 'node:zlib';

/** A part of a zip file, as its central directory tells (PKWARE, .ZIP File Format Specification 6.3, section 4.3). */
export interface ZipEntry {
  readonly name: string;
  readonly method: number;
  readonly encrypted: boolean;
  readonly crc: number;
  readonly packedBytes: number;
  readonly unpackedBytes: number;
  readonly headerOffset: number;
}

/** The zip file's directory is missing or tells what cannot be: it breaks off, or is damaged. */
export class ZipDamaged extends Error {}

const endSignature = 0x06054b50;
const entrySignature = 0x02014b50;
const localSignature = 0x04034b50;
const endBytes = 22;
const longestComment = 65_535;
const most32 = 0xffffffff;
const pieceBytes = 256 * 1024;
/** A workbook of thousands of parts has a directory of some hundreds of kilobytes. */
const longestDirectory = 16 * 1024 * 1024;
export const zipMethod = { stored: 0, deflated: 8 } as const;

async function readAt(file: FileHandle, offset: number, length: number): Promise<Buffer> {
  const buffer = Buffer.alloc(length);
  const { bytesRead } = await file.read(buffer, 0, length, offset);
  if (bytesRead < length) throw new ZipDamaged();
  return buffer;
}

async function findEnd(file: FileHandle, size: number): Promise<Buffer> {
  const length = Math.min(size, endBytes + longestComment);
  const tail = await readAt(file, size - length, length);
  for (let at = tail.length - endBytes; at >= 0; at--)
    if (tail.readUInt32LE(at) === endSignature) return tail.subarray(at);
  throw new ZipDamaged();
}

function entriesOf(directory: Buffer): ZipEntry[] {
  const entries: ZipEntry[] = [];
  for (let at = 0; at + 46 <= directory.length && directory.readUInt32LE(at) === entrySignature;) {
    const nameBytes = directory.readUInt16LE(at + 28);
    entries.push({
      name: directory.toString('utf8', at + 46, at + 46 + nameBytes),
      method: directory.readUInt16LE(at + 10),
      encrypted: (directory.readUInt16LE(at + 8) & 1) !== 0,
      crc: directory.readUInt32LE(at + 16),
      packedBytes: directory.readUInt32LE(at + 20),
      unpackedBytes: directory.readUInt32LE(at + 24),
      headerOffset: directory.readUInt32LE(at + 42),
    });
    at += 46 + nameBytes + directory.readUInt16LE(at + 30) + directory.readUInt16LE(at + 32);
  }
  return entries;
}

/** The parts of a zip file. Sizes of 4 GB and more, which zip64 would tell, do not occur in workbooks that we take. */
export async function readZipDirectory(path: string): Promise<readonly ZipEntry[]> {
  const file = await open(path, 'r');
  try {
    const { size } = await file.stat();
    if (size < endBytes) throw new ZipDamaged();
    const end = await findEnd(file, size);
    const [length, offset] = [end.readUInt32LE(12), end.readUInt32LE(16)];
    if (offset === most32 || length > longestDirectory || offset + length > size) throw new ZipDamaged();
    return entriesOf(await readAt(file, offset, length));
  } finally {
    await file.close();
  }
}

/** The entry's bytes as they lie in the file, packed. */
export async function readPacked(path: string, entry: ZipEntry): Promise<Buffer> {
  const file = await open(path, 'r');
  try {
    const header = await readAt(file, entry.headerOffset, 30);
    if (header.readUInt32LE(0) !== localSignature) throw new ZipDamaged();
    const begins = entry.headerOffset + 30 + header.readUInt16LE(26) + header.readUInt16LE(28);
    const { size } = await file.stat();
    if (begins + entry.packedBytes > size) throw new ZipDamaged();
    return await readAt(file, begins, entry.packedBytes);
  } finally {
    await file.close();
  }
}

/** More came out of an entry than may. */
export class ZipTooLarge extends Error {}

function inflated(packed: Buffer): AsyncIterable<Buffer> {
  const inflating = createInflateRaw({ chunkSize: pieceBytes });
  inflating.end(packed);
  return inflating;
}

/** Unpacks an entry piece by piece; what it says of its size is not trusted. */
export async function* unpacked(packed: Buffer, { method }: ZipEntry, mostBytes: number): AsyncGenerator<Buffer> {
  if (method !== zipMethod.stored && method !== zipMethod.deflated) throw new ZipDamaged();
  const pieces = method === zipMethod.stored ? [packed] : inflated(packed);
  let length = 0;
  try {
    for await (const piece of pieces) {
      length += piece.length;
      if (length > mostBytes) throw new ZipTooLarge();
      yield piece;
    }
  } catch (error) {
    if (error instanceof ZipTooLarge) throw error;
    throw new ZipDamaged();
  }
}
