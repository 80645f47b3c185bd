import { closeSync, openSync, readSync, writeSync } from 'node:fs';

/** Where a block of cells lies in the spill file. */
export interface SpilledCells {
  readonly offset: number;
  readonly length: number;
}

/** Cells wait here between being read and being stored, so that memory does not grow with the table. */
export class SpillFile {
  private readonly descriptor: number;
  private end = 0;

  /** `wx+` makes the file and refuses one that is there. */
  constructor(path: string, flags: 'wx+' | 'r') {
    this.descriptor = openSync(path, flags);
  }

  append(cells: Uint8Array): SpilledCells {
    const place = { offset: this.end, length: cells.byteLength };
    for (let at = 0; at < cells.byteLength;)
      at += writeSync(this.descriptor, cells, at, cells.byteLength - at, this.end + at);
    this.end += cells.byteLength;
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
