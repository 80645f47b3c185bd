import { closeSync, openSync, readSync, writeSync } from 'node:fs';

/** Where a block of cells lies in the spill file. */
export interface SpilledCells {
  readonly offset: number;
  readonly length: number;
}

/** A block of numbers that has been written, under its column's position in the file. */
export interface SpilledBlock extends SpilledCells {
  readonly position: number;
  readonly block: number;
  readonly rowCount: number;
}

/** Cells wait here between being read and being stored, so that memory does not grow with the table. */
export class SpillFile {
  private readonly descriptor: number;
  private end = 0;

  /** `wx+` makes the file and refuses one that is there. `onBlock` is told of what `appendBlock` wrote. */
  constructor(
    path: string,
    flags: 'wx+' | 'r',
    private readonly onBlock?: (block: SpilledBlock) => void,
  ) {
    this.descriptor = openSync(path, flags);
  }

  append(cells: Uint8Array): SpilledCells {
    const place = { offset: this.end, length: cells.byteLength };
    for (let at = 0; at < cells.byteLength;)
      at += writeSync(this.descriptor, cells, at, cells.byteLength - at, this.end + at);
    this.end += cells.byteLength;
    return place;
  }

  /** As `append`, for cells in the form in which they are stored unless the column's kind turns out to be another. */
  appendBlock(cells: Uint8Array, key: Omit<SpilledBlock, keyof SpilledCells>): SpilledCells {
    const place = this.append(cells);
    this.onBlock?.({ ...key, ...place });
    return place;
  }

  read(place: SpilledCells): Buffer {
    const cells = Buffer.allocUnsafeSlow(place.length);
    this.readInto(cells, place);
    return cells;
  }

  /** Fills the beginning of `target`. */
  readInto(target: Uint8Array, { offset, length }: SpilledCells): void {
    for (let at = 0; at < length;) {
      const got = readSync(this.descriptor, target, at, length - at, offset + at);
      if (got === 0) throw new Error('The spill file ends too early.');
      at += got;
    }
  }

  close(): void {
    closeSync(this.descriptor);
  }
}
