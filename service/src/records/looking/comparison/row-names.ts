import { comparableCells, sharedNames, type Cells, type ComparedTable } from './compared-table';

/** Mixes 32 bits so that each of them depends on all (the finaliser of MurmurHash3, Appleby 2011, public domain). */
function mix(bits: number): number {
  let mixed = bits;
  mixed = Math.imul(mixed ^ (mixed >>> 16), 0x85ebca6b);
  mixed = Math.imul(mixed ^ (mixed >>> 13), 0xc2b2ae35);
  return mixed ^ (mixed >>> 16);
}

const number = new Float64Array(1);
const words = new Uint32Array(number.buffer);
const missing = 0x5bd1e995;

/** Two 32-bit hashes of a cell, left in `first` and `second`; equal cells give equal ones. */
class CellHash {
  first = 0;
  second = 0;

  read(value: number | string | null): void {
    if (value === null) this.set(missing, missing);
    else if (typeof value === 'string') this.readText(value);
    else {
      // Adding nothing makes −0 and 0, which are equal, the same bits.
      number[0] = value + 0;
      this.set(words[0], words[1]);
    }
  }

  private set(low: number, high: number): void {
    this.first = mix(low ^ mix(high));
    this.second = mix(high ^ mix(low ^ 0x9e3779b9));
  }

  private readText(text: string): void {
    let [first, second] = [0x811c9dc5, text.length];
    for (let at = 0; at < text.length; at++) {
      const code = text.charCodeAt(at);
      first = Math.imul(first ^ code, 0x01000193);
      second = (Math.imul(second, 31) + code) | 0;
    }
    this.first = first;
    this.second = second;
  }
}

/** 53 bits for each row, which a number holds exactly. */
class RowHashes {
  private readonly first: Int32Array;
  private readonly second: Int32Array;

  constructor(rowCount: number) {
    this.first = new Int32Array(rowCount);
    this.second = new Int32Array(rowCount);
  }

  add(cells: Cells): void {
    const hash = new CellHash();
    for (let row = 0; row < this.first.length; row++) {
      hash.read(cells(row));
      this.first[row] = mix(Math.imul(this.first[row], 0x9e3779b1) ^ hash.first);
      this.second[row] = mix(Math.imul(this.second[row], 0xc2b2ae3d) ^ hash.second);
    }
  }

  get(row: number): number {
    return (this.first[row] >>> 0) * 2_097_152 + (this.second[row] >>> 11);
  }
}

/** Rows as small whole numbers: equal numbers stand for equal rows. */
export interface RowNames {
  readonly from: Int32Array;
  readonly to: Int32Array;
  /** How many different rows there are in the two together. */
  readonly different: number;
}

/**
 * Names the rows of both sides by the columns that both have, read one after another. Two different rows take the
 * same name with a chance of about n² / 2⁵⁴ (2 in 10,000 for a million rows each): a name only says which rows to
 * put side by side; their cells are compared one by one afterwards. Cost: two passes over every column.
 */
export function rowNames(from: ComparedTable, to: ComparedTable): RowNames {
  const [before, after] = [new RowHashes(from.rowCount), new RowHashes(to.rowCount)];
  for (const name of sharedNames(from, to)) {
    const [cellsBefore, cellsAfter] = comparableCells(from.read(name), to.read(name));
    before.add(cellsBefore);
    after.add(cellsAfter);
  }
  const known = new Map<number, number>();
  const nameOf = (hash: number): number => {
    const name = known.get(hash) ?? known.size;
    if (name === known.size) known.set(hash, name);
    return name;
  };
  return {
    from: Int32Array.from({ length: from.rowCount }, (_, row) => nameOf(before.get(row))),
    to: Int32Array.from({ length: to.rowCount }, (_, row) => nameOf(after.get(row))),
    different: known.size,
  };
}
