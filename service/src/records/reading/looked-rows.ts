import { readHeader } from './header';
import { guessRows } from './limits';
import { headerBeyondFile, type RowSource } from './row-source';
import type { ReadingChoices } from './reading-choices';
import { TableProblem } from './table-problem';

/** Cells that are held as text at the most while a file is looked at; a wide table is judged from fewer rows. */
const lookedCells = 600_000;
/** Rows that are shown as written and as read. */
export const shownRows = 200;

export interface LookedRows {
  readonly names: readonly string[];
  readonly rows: readonly (readonly string[])[];
  /** Whether these are all rows of the file. */
  readonly complete: boolean;
}

/** Ends a reading of which enough has been seen. */
class EnoughRows extends Error {}

/** The file's first rows. */
export async function lookAtRows(source: RowSource, choices: ReadingChoices): Promise<LookedRows> {
  const { headerLine } = source.format;
  let names: readonly string[] | null = null;
  let most = guessRows;
  const rows: (readonly string[])[] = [];
  const take = (cells: readonly string[]): void => {
    if (names === null) {
      names = readHeader(cells, headerLine);
      most = Math.max(shownRows, Math.min(guessRows, Math.floor(lookedCells / names.length)));
    } else if (rows.length === most) throw new EnoughRows();
    else rows.push(cells);
  };
  const complete = await source.read(take).then(
    () => true,
    (error: unknown) => {
      if (error instanceof EnoughRows) return false;
      throw error;
    },
  );
  if (names === null && choices.headerLine !== undefined) throw headerBeyondFile(choices.headerLine);
  if (names === null || rows.length === 0)
    throw new TableProblem(
      'file-empty',
      'The file has a header but no rows. Send a table with at least one row.',
      headerLine,
    );
  return { names, rows, complete };
}
