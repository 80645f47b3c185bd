import type { components } from '../../../openapi/types/desk';

export type ColumnKind = components['schemas']['ColumnKind'];

/** Rows in a block of a table of ordinary width. */
const ordinaryBlockRows = 65_536;

/** A block of every column is held in memory while a file is read; wide tables get shorter blocks. */
const blockMemoryBytes = 64 * 1024 * 1024;

export function blockRowsFor(columnCount: number): number {
  const fitting = Math.floor(blockMemoryBytes / (8 * Math.max(1, columnCount)));
  return Math.min(ordinaryBlockRows, 2 ** Math.floor(Math.log2(fitting)));
}

/** Bytes of one cell as stored; 0 for text, whose blocks are JSON. */
export const cellBytesOf = (kind: ColumnKind): number => (kind === 'text' ? 0 : kind === 'category' ? 4 : 8);

/**
 * Cells as they lie in `record_blocks`: little-endian, which every platform that Node.js runs on uses, so typed
 * arrays are their own storage format.
 */
export const numbersToCells = (values: Float64Array): Buffer =>
  Buffer.from(values.buffer, values.byteOffset, values.byteLength);

export const codesToCells = (codes: Int32Array): Buffer =>
  Buffer.from(codes.buffer, codes.byteOffset, codes.byteLength);

export const textsToCells = (texts: readonly (string | null)[]): Buffer => Buffer.from(JSON.stringify(texts), 'utf8');

/** Copies, since a stored buffer need not begin at a multiple of eight bytes. */
export function cellsToNumbers(cells: Uint8Array): Float64Array {
  const values = new Float64Array(cells.byteLength / 8);
  new Uint8Array(values.buffer).set(cells);
  return values;
}

export function cellsToCodes(cells: Uint8Array): Int32Array {
  const codes = new Int32Array(cells.byteLength / 4);
  new Uint8Array(codes.buffer).set(cells);
  return codes;
}

export const cellsToTexts = (cells: Uint8Array): (string | null)[] =>
  JSON.parse(Buffer.from(cells.buffer, cells.byteOffset, cells.byteLength).toString('utf8')) as (string | null)[];
