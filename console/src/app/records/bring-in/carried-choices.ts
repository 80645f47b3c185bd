import type { ColumnChoice, ReadingChoices } from '../../api/contract';
import type { Destination } from './destination';

/**
 * What was chosen for the set's newest revision, to begin with for a newer file: marks, and what concerns single
 * columns. How the file is laid out is found out anew. Columns appended to have their kinds and units already.
 */
export function carriedChoices({ kind, set }: Destination): ReadingChoices {
  const { choices, setAside } = set.revision.reading;
  const chosen = choices.columns ?? [];
  const aside = setAside.filter((name) => !chosen.some((column) => column.name === name));
  const columns = [...chosen, ...aside.map((name): ColumnChoice => ({ name, setAside: true }))];
  const fitting = kind === 'appended' ? columns.flatMap(marksOnly) : columns;
  return {
    ...(choices.missingMarks && { missingMarks: choices.missingMarks }),
    ...(fitting.length > 0 && { columns: fitting }),
  };
}

/** Columns that the revision does not have are set aside by themselves. */
function marksOnly({ name, missingMarks }: ColumnChoice): readonly ColumnChoice[] {
  return missingMarks ? [{ name, missingMarks }] : [];
}

/** Columns that the newest revision set aside and that this file would store. */
export function broughtBack({ kind, set }: Destination, stored: readonly string[]): readonly string[] {
  if (kind === 'appended') return [];
  return set.revision.reading.setAside.filter((name) => stored.includes(name));
}
