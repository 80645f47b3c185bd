import type { RecordColumn, RecordTable } from '../../regression/records';
import { listRows, rowsText, type Finding } from './finding';

/** With fewer columns equal rows are to be expected. */
const fewestColumns = 4;
/** Above this share equal rows are how the table is, not a slip. */
const largestShare = 0.1;

/** A 32-bit hash of each cell (multiplicative, as Knuth 1998, section 6.4); equal cells give equal hashes. */
function cellHashes(column: RecordColumn, seed: number): Uint32Array {
  const mix = (low: number, high: number): number => {
    let hash = Math.imul(low ^ Math.imul(high, 0x9e3779b1) ^ seed, 0x85ebca6b);
    hash = Math.imul(hash ^ (hash >>> 13), 0xc2b2ae35);
    return (hash ^ (hash >>> 16)) >>> 0;
  };
  if (column.kind === 'category') return Uint32Array.from(column.codes, (code) => mix(code, 1));
  if (column.kind === 'text') return Uint32Array.from(column.values, (text) => mix(textHash(text), 2));
  const words = new Uint32Array(column.values.buffer, column.values.byteOffset, column.values.length * 2);
  return Uint32Array.from(column.values, (value, row) =>
    value === value ? mix(words[2 * row], words[2 * row + 1]) : mix(0, 3),
  );
}

function textHash(text: string | null): number {
  let hash = text === null ? 7 : 11;
  for (let at = 0; at < (text?.length ?? 0); at++) hash = (Math.imul(hash, 31) + (text as string).charCodeAt(at)) | 0;
  return hash;
}

function sameCell(column: RecordColumn, a: number, b: number): boolean {
  if (column.kind === 'category') return column.codes[a] === column.codes[b];
  return Object.is(column.values[a], column.values[b]);
}

/** Two sums of hashes per row, so that a column can be left out by subtracting it. */
class RowHashes {
  private readonly first: Uint32Array;
  private readonly second: Uint32Array;

  constructor(private readonly table: RecordTable) {
    this.first = new Uint32Array(table.rowCount);
    this.second = new Uint32Array(table.rowCount);
    table.columns.forEach((_, position) => this.addColumn(position, 1));
  }

  /** Adds (1) or takes away (−1) a column. */
  addColumn(position: number, sign: 1 | -1): void {
    const column = this.table.columns[position];
    const [a, b] = [cellHashes(column, 2 * position + 1), cellHashes(column, 2 * position + 2)];
    for (let row = 0; row < this.table.rowCount; row++) {
      this.first[row] += sign * a[row];
      this.second[row] += sign * b[row];
    }
  }

  /** Rows that equal an earlier one in the columns given, with that row. */
  repeats(columns: readonly RecordColumn[]): Map<number, number> {
    const seen = new Map<number, number>();
    const repeats = new Map<number, number>();
    for (let row = 0; row < this.table.rowCount; row++) {
      // 53 bits, which a number holds exactly.
      const key = this.first[row] * 2_097_152 + (this.second[row] >>> 11);
      const earlier = seen.get(key);
      if (earlier === undefined) seen.set(key, row);
      else if (columns.every((column) => sameCell(column, earlier, row))) repeats.set(row, earlier);
    }
    return repeats;
  }
}

/** Rows that repeat an earlier one in every column; positions counted from 0. */
export const repeatedRows = (table: RecordTable): number[] => [...new RowHashes(table).repeats(table.columns).keys()];

/** Rows that repeat an earlier row in everything, or in everything but one column. Cost: rows × columns². */
export function findRepeatedRows(table: RecordTable): Finding[] {
  if (table.columns.length < fewestColumns) return [];
  const hashes = new RowHashes(table);
  const whole = [...hashes.repeats(table.columns).keys()];
  const findings: Finding[] = [];
  if (whole.length > 0) {
    findings.push({
      kind: 'repeated-rows',
      columns: [],
      message: `${rowsText(whole.length)} repeat${whole.length === 1 ? 's' : ''} an earlier row in every column.`,
      remedy: 'Drop them, unless the same case truly came up again.',
      ...listRows(whole),
    });
  }
  const known = new Set(whole);
  return findings.concat(table.columns.flatMap((column, position) => nearly(table, hashes, position, known)));
}

function nearly(table: RecordTable, hashes: RowHashes, position: number, known: ReadonlySet<number>): Finding[] {
  hashes.addColumn(position, -1);
  const others = table.columns.filter((_, other) => other !== position);
  const rows = [...hashes.repeats(others).keys()].filter((row) => !known.has(row));
  hashes.addColumn(position, 1);
  if (rows.length === 0 || rows.length > largestShare * table.rowCount) return [];
  const { name } = table.columns[position];
  return [
    {
      kind: 'nearly-repeated-rows',
      columns: [name],
      message: `${rowsText(rows.length)} repeat${rows.length === 1 ? 's' : ''} an earlier row in every column but ${name}.`,
      remedy: `Look at ${name} in these rows: one of the two may be a correction of the other. Drop the one that is wrong.`,
      ...listRows(rows),
    },
  ];
}
