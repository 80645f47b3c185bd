import { Readable } from 'node:stream';
import type { ZipEntry } from './zip-directory';

export interface PackedPart {
  readonly entry: ZipEntry;
  readonly packed: Buffer;
  /** As counted while unpacking. */
  readonly unpackedBytes: number;
}

/** PKWARE, .ZIP File Format Specification 6.3, sections 4.3.7, 4.3.12 and 4.3.16; bit 11 of the flags: names in UTF-8. */
const utf8Names = 0x0800;
const versionNeeded = 20;

/** What local header and directory entry have in common, from the version on. */
function commonFields({ entry, packed, unpackedBytes }: PackedPart, name: Buffer): Buffer {
  const fields = Buffer.alloc(26);
  fields.writeUInt16LE(versionNeeded, 0);
  fields.writeUInt16LE(utf8Names, 2);
  fields.writeUInt16LE(entry.method, 4);
  fields.writeUInt32LE(entry.crc, 10);
  fields.writeUInt32LE(packed.length, 14);
  fields.writeUInt32LE(unpackedBytes, 18);
  fields.writeUInt16LE(name.length, 22);
  return fields;
}

const signature = (letters: string, low: number, high: number): Buffer =>
  Buffer.from([...Buffer.from(letters, 'latin1'), low, high]);

function directoryEntry(part: PackedPart, name: Buffer, offset: number): Buffer {
  const rest = Buffer.alloc(14);
  rest.writeUInt32LE(offset, 10);
  const madeBy = Buffer.from([versionNeeded, 0]);
  return Buffer.concat([signature('PK', 1, 2), madeBy, commonFields(part, name), rest, name]);
}

function endOfDirectory(count: number, length: number, offset: number): Buffer {
  const fields = Buffer.alloc(18);
  fields.writeUInt16LE(count, 4);
  fields.writeUInt16LE(count, 6);
  fields.writeUInt32LE(length, 8);
  fields.writeUInt32LE(offset, 12);
  return Buffer.concat([signature('PK', 5, 6), fields]);
}

function* excerptPieces(parts: readonly PackedPart[]): Generator<Buffer> {
  const directory: Buffer[] = [];
  let offset = 0;
  for (const part of parts) {
    const name = Buffer.from(part.entry.name, 'utf8');
    directory.push(directoryEntry(part, name, offset));
    const header = Buffer.concat([signature('PK', 3, 4), commonFields(part, name), name]);
    yield header;
    yield part.packed;
    offset += header.length + part.packed.length;
  }
  const entries = Buffer.concat(directory);
  yield entries;
  yield endOfDirectory(parts.length, entries.length, offset);
}

/**
 * A zip file of some of another one's parts, still packed: the reader of workbooks then never meets a part whose size
 * was not checked, nor unpacks sheets that nobody asked for.
 */
export const zipExcerpt = (parts: readonly PackedPart[]): Readable =>
  Readable.from(excerptPieces(parts), { objectMode: false });
