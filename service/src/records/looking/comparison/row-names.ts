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

  get length(): number {
    return this.first.length;
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

/** In how many parts the columns are dealt, so that a row that changed in one or two is still known by another. */
const parts = 3;

/** Rows of both sides by the hashes of some columns. */
class NamedRows {
  private readonly from: RowHashes;
  private readonly to: RowHashes;

  constructor(fromRowCount: number, toRowCount: number) {
    this.from = new RowHashes(fromRowCount);
    this.to = new RowHashes(toRowCount);
  }

  add([from, to]: readonly [Cells, Cells]): void {
    this.from.add(from);
    this.to.add(to);
  }

  names(): RowNames {
    const known = new Map<number, number>();
    const namesOf = (hashes: RowHashes): Int32Array => {
      const names = new Int32Array(hashes.length);
      for (let row = 0; row < names.length; row++) {
        const hash = hashes.get(row);
        const name = known.get(hash) ?? known.size;
        if (name === known.size) known.set(hash, name);
        names[row] = name;
      }
      return names;
    };
    return { from: namesOf(this.from), to: namesOf(this.to), different: known.size };
  }
}

/** Names by all columns that both sides have, and by every third of them, those that tell most rows apart first. */
export interface NamedTables {
  readonly whole: RowNames;
  readonly parts: readonly RowNames[];
}

/**
 * Names the rows of both sides by the columns that both have, read one after another. Two different rows take the
 * same name with a chance of about n² / 2⁵⁴ (2 in 10,000 for a million rows each): a name only says which rows to
 * put side by side; their cells are compared one by one afterwards. Cost: two passes over every column; memory: some
 * 100 bytes a row.
 */
export function nameRows(from: ComparedTable, to: ComparedTable): NamedTables {
  const named = (): NamedRows => new NamedRows(from.rowCount, to.rowCount);
  const shared = sharedNames(from, to);
  const whole = named();
  const some = Array.from({ length: Math.min(parts, shared.length) }, named);
  shared.forEach((name, at) => {
    const cells = comparableCells(from.read(name), to.read(name));
    whole.add(cells);
    some[at % some.length].add(cells);
  });
  return {
    whole: whole.names(),
    parts: some.map((part) => part.names()).sort((a, b) => b.different - a.different),
  };
}
