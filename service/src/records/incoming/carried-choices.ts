import type { ColumnChoice, ReadingChoices } from '../reading/reading-choices';
import type { Reading } from '../records-store';

type EarlierReading = Pick<Reading, 'choices' | 'setAside'>;

/** Columns that were set aside because a revision had no such column were not chosen one by one, but aside they stay. */
function columnChoices({ choices, setAside }: EarlierReading): readonly ColumnChoice[] {
  const chosen = choices.columns ?? [];
  const others = setAside.filter((name) => !chosen.some((column) => column.name === name));
  return [...chosen, ...others.map((name) => ({ name, setAside: true }))];
}

export const hasChoices = (reading: EarlierReading): boolean =>
  columnChoices(reading).length > 0 || (reading.choices.missingMarks ?? []).length > 0;

/**
 * What was chosen for an earlier file, for a newer one of the same kind: its marks, and what concerns columns that the
 * newer file has. How the file is laid out is found out anew.
 */
export function carriedChoices(reading: EarlierReading, columnNames: ReadonlySet<string>): ReadingChoices {
  const columns = columnChoices(reading).filter(({ name }) => columnNames.has(name));
  const { missingMarks } = reading.choices;
  return { ...(missingMarks && { missingMarks }), ...(columns.length > 0 && { columns }) };
}
