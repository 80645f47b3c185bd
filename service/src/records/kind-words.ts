import type { ColumnKind } from './cell-blocks';

/** The kinds as the screens call them, for sentences that people read. */
export const kindWords: Readonly<Record<ColumnKind, string>> = {
  numeric: 'Number',
  category: 'Category',
  date: 'Date',
  text: 'Text',
};
