import type { ProposedColumn, ReadingProposal } from '../../api/contract';
import { cellOf, cellsOf } from '../revision/column-words';

export type Showing = 'read' | 'written';

export interface PreviewCell {
  readonly text: string;
  /** `unreadable` would be missing because it does not fit the column's kind; the text is as the file has it. */
  readonly state: 'value' | 'missing' | 'unreadable';
}

/** The cells of some columns, a list a column, as they would count or as the file has them. */
export function previewCells(
  { read, written }: ReadingProposal,
  columns: readonly ProposedColumn[],
  showing: Showing,
): readonly (readonly PreviewCell[])[] {
  return columns.map((column) => {
    const { position, setAside } = column;
    const unreadable = new Set(column.unreadableRows);
    const asWritten = written.map((row) => row[position] ?? '');
    const values = read.map((row) => row[position] ?? null);
    // What is set aside counts as nothing; what goes is shown as it is.
    if (setAside) return asWritten.map((text): PreviewCell => ({ text, state: 'value' }));
    const texts = showing === 'read' ? readTexts(values, column) : asWritten;
    return texts.map((text, row): PreviewCell => {
      if (unreadable.has(row + 1)) return { text: asWritten[row], state: 'unreadable' };
      return values[row] === null && text.trim() === '' ? { text: '', state: 'missing' } : { text, state: 'value' };
    });
  });
}

/** Figures line up by their decimals, unless conversion gave some of them more than were ever written. */
function readTexts(
  values: readonly (string | number | null)[],
  { kind, unitsInCells }: ProposedColumn,
): readonly string[] {
  const isConverted = unitsInCells.some(({ factor }) => factor !== null && factor !== 1);
  return isConverted ? values.map((value) => cellOf(value, kind)) : cellsOf(values, kind);
}
