import { randomInt } from 'node:crypto';
import type { RecordColumn, RecordTable } from '../../regression/records';

/**
 * Another one in every thread, so that nobody can make a file whose rows all meet in one place, over which the search
 * would never come to an end. What is found does not depend on it, for rows that meet are compared cell by cell.
 */
const secret = randomInt(2 ** 32);

function textHash(text: string | null): number {
  if (text === null) return secret;
  let hash = ~secret;
  for (let at = 0; at < text.length; at++) {
    hash = Math.imul(hash ^ text.charCodeAt(at), 0x9e3779b1);
    hash ^= hash >>> 15;
  }
  return hash;
}

function sameCell(column: RecordColumn, a: number, b: number): boolean {
  if (column.kind === 'category') return column.codes[a] === column.codes[b];
  return Object.is(column.values[a], column.values[b]);
}

const sameCells = (columns: readonly RecordColumn[], a: number, b: number): boolean =>
  columns.every((column) => sameCell(column, a, b));

/** A 32-bit hash of two words (multiplicative, as Knuth 1998, section 6.4; shifts between, so that all bits count). */
function mix(low: number, high: number, seed: number): number {
  let hash = Math.imul(low ^ secret ^ seed, 0x85ebca6b);
  hash = Math.imul(hash ^ (hash >>> 13) ^ high, 0xc2b2ae35);
  return hash ^ (hash >>> 16);
}

const unset = -1;

/**
 * Rows by the hashes of their cells: two sums for each row, so that a column can be left out by subtracting it, and a
 * table of open places in which equal rows meet. Memory: 24 bytes a row.
 */
export class RowHashes {
  private readonly first: Uint32Array;
  private readonly second: Uint32Array;
  /** For every place the first row that came to it. */
  private readonly places: Int32Array;

  constructor(private readonly table: RecordTable) {
    this.first = new Uint32Array(table.rowCount);
    this.second = new Uint32Array(table.rowCount);
    this.places = new Int32Array(2 ** Math.ceil(Math.log2(2 * table.rowCount + 2)));
    table.columns.forEach((_, position) => this.addColumn(position, 1));
  }

  /** Adds (1) or takes away (−1) a column. */
  addColumn(position: number, sign: 1 | -1): void {
    const column = this.table.columns[position];
    if (column.kind === 'category') {
      column.codes.forEach((code, row) => this.addCell(row, code, 1, position, sign));
      return;
    }
    if (column.kind === 'text') {
      column.values.forEach((text, row) => this.addCell(row, textHash(text), 2, position, sign));
      return;
    }
    const { values } = column;
    const words = new Uint32Array(values.buffer, values.byteOffset, values.length * 2);
    for (let row = 0; row < values.length; row++) {
      if (values[row] === values[row]) this.addCell(row, words[2 * row], words[2 * row + 1], position, sign);
      else this.addCell(row, 0, 3, position, sign);
    }
  }

  private addCell(row: number, low: number, high: number, position: number, sign: 1 | -1): void {
    this.first[row] += sign * mix(low, high, 2 * position + 1);
    this.second[row] += sign * mix(low, high, 2 * position + 2);
  }

  /** Rows that equal an earlier one in the columns given, rising. Cost: about one look at the places a row. */
  repeats(columns: readonly RecordColumn[]): number[] {
    const { first, second, places } = this;
    const mask = places.length - 1;
    places.fill(unset);
    const repeats: number[] = [];
    for (let row = 0; row < first.length; row++) {
      let place = mix(first[row], second[row], 0) & mask;
      for (let other = places[place]; other !== unset; other = places[place]) {
        if (first[other] === first[row] && second[other] === second[row] && sameCells(columns, other, row)) break;
        place = (place + 1) & mask;
      }
      if (places[place] === unset) places[place] = row;
      else repeats.push(row);
    }
    return repeats;
  }
}
