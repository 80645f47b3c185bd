const quote = 0x22;
const backslash = 0x5c;
const nullLength = 4;

/**
 * A block of texts as it is stored, a JSON array without spaces, of which each is read when it is asked for: a few of
 * them then cost a look at the bytes before them, less than half of reading them all. Cheapest in rising order.
 */
export class TextBlock {
  private readonly bytes: Buffer;
  private row = 0;
  private begin = 1;

  constructor(cells: Uint8Array) {
    this.bytes = Buffer.from(cells.buffer, cells.byteOffset, cells.byteLength);
  }

  at(row: number): string | null {
    if (row < this.row) [this.row, this.begin] = [0, 1];
    while (this.row < row) {
      // Past the comma.
      this.begin = this.endOf(this.begin) + 1;
      this.row++;
    }
    const { bytes, begin } = this;
    const end = this.endOf(begin);
    if (bytes[begin] !== quote) return null;
    const inner = bytes.toString('utf8', begin + 1, end - 1);
    return inner.includes('\\') ? (JSON.parse(`"${inner}"`) as string) : inner;
  }

  /** Past the text, or the null, that begins there. */
  private endOf(begin: number): number {
    const { bytes } = this;
    if (begin >= bytes.length) throw new RangeError('A block of texts has fewer rows.');
    if (bytes[begin] !== quote) return begin + nullLength;
    let at = begin + 1;
    while (at < bytes.length && bytes[at] !== quote) at += bytes[at] === backslash ? 2 : 1;
    return at + 1;
  }
}
