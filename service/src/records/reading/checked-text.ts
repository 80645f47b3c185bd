import { isUtf8 } from 'node:buffer';
import type { TextFormat } from './file-format';
import { TableProblem } from './table-problem';

const lineFeed = 10;
const carriageReturn = 13;

const count = (bytes: Uint8Array, byte: number): number => {
  let total = 0;
  for (let at = bytes.indexOf(byte); at !== -1; at = bytes.indexOf(byte, at + 1)) total++;
  return total;
};

/** Counts the lines that have gone by, for the line number of a complaint. */
class LineCounter {
  private lineFeeds = 0;
  private carriageReturns = 0;

  add(bytes: Uint8Array): void {
    const found = count(bytes, lineFeed);
    this.lineFeeds += found;
    if (this.lineFeeds === 0) this.carriageReturns += count(bytes, carriageReturn);
  }

  /** The line of the byte at `at` of the bytes that come next. */
  lineOf(bytes: Uint8Array, at: number): number {
    this.add(bytes.subarray(0, at));
    return 1 + (this.lineFeeds || this.carriageReturns);
  }
}

/** Bytes at the end that begin a character which the next chunk completes. */
function unfinishedBytes(bytes: Uint8Array): number {
  for (let back = 1; back <= Math.min(3, bytes.length); back++) {
    const byte = bytes[bytes.length - back];
    if (byte < 0x80) return 0;
    if (byte >= 0xc0) return back < (byte >= 0xf0 ? 4 : byte >= 0xe0 ? 3 : 2) ? back : 0;
  }
  return 0;
}

/** The first byte that does not belong to a UTF-8 character: bisects, since a prefix that ends whole is valid. */
function firstInvalidByte(bytes: Uint8Array): number {
  let valid = 0;
  let invalid = bytes.length;
  while (invalid - valid > 1) {
    const middle = (valid + invalid) >> 1;
    const prefix = bytes.subarray(0, middle);
    if (isUtf8(prefix.subarray(0, middle - unfinishedBytes(prefix)))) valid = middle;
    else invalid = middle;
  }
  return invalid - 1;
}

function encodingProblem(line: number): TableProblem {
  const remedy = 'Save the file as “CSV UTF-8” and send it again.';
  return new TableProblem('file-encoding', `Line ${line} holds a byte that is not UTF-8 text. ${remedy}`, line);
}

function nulProblem(line: number): TableProblem {
  return new TableProblem(
    'file-not-table',
    `Line ${line} holds a NUL byte: the file is damaged or not a table of text. Export it again.`,
    line,
  );
}

/** Hands the file's bytes on, free of a byte order mark, once they are known to be UTF-8 without NUL. */
async function* checkedUtf8(chunks: AsyncIterable<Buffer>): AsyncGenerator<Buffer> {
  const lines = new LineCounter();
  let carried: Buffer = Buffer.alloc(0);
  let first = true;
  const check = (bytes: Buffer): Buffer => {
    const nul = bytes.indexOf(0);
    if (nul !== -1) throw nulProblem(lines.lineOf(bytes, nul));
    if (!isUtf8(bytes)) throw encodingProblem(lines.lineOf(bytes, firstInvalidByte(bytes)));
    lines.add(bytes);
    return bytes;
  };
  for await (const chunk of chunks) {
    let bytes = carried.length > 0 ? Buffer.concat([carried, chunk]) : chunk;
    if (first && bytes.length < 3) {
      carried = bytes;
      continue;
    }
    if (first && bytes[0] === 0xef && bytes[1] === 0xbb && bytes[2] === 0xbf) bytes = bytes.subarray(3);
    first = false;
    const whole = bytes.length - unfinishedBytes(bytes);
    carried = bytes.subarray(whole);
    yield check(bytes.subarray(0, whole));
  }
  if (carried.length > 0) yield check(carried);
}

async function* decodedUtf16(chunks: AsyncIterable<Buffer>, encoding: string): AsyncGenerator<Buffer> {
  const lines = new LineCounter();
  const decoder = new TextDecoder(encoding, { fatal: true });
  const decode = (chunk?: Buffer): Buffer => {
    try {
      return Buffer.from(decoder.decode(chunk, { stream: chunk !== undefined }), 'utf8');
    } catch {
      throw encodingProblem(lines.lineOf(Buffer.alloc(0), 0));
    }
  };
  for await (const chunk of chunks) {
    const bytes = decode(chunk);
    const nul = bytes.indexOf(0);
    if (nul !== -1) throw nulProblem(lines.lineOf(bytes, nul));
    lines.add(bytes);
    yield bytes;
  }
  yield decode();
}

/** The file as UTF-8 text without a byte order mark, or the problem with the line it stands on. */
export function checkedText(
  chunks: AsyncIterable<Buffer>,
  format: Pick<TextFormat, 'encoding'>,
): AsyncGenerator<Buffer> {
  return format.encoding === 'utf-8' ? checkedUtf8(chunks) : decodedUtf16(chunks, format.encoding);
}
