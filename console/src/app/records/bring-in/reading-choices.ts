import type { ColumnChoice, ReadingChoices } from '../../api/contract';

/** What is chosen of the file as a whole. Undefined goes back to what is found out from the file. */
export type FileChange = { readonly [Field in keyof Omit<ReadingChoices, 'columns'>]?: ReadingChoices[Field] };
/** What is chosen of one column. Undefined goes back to what is found out. */
export type ColumnChange = { readonly [Field in keyof Omit<ColumnChoice, 'name'>]?: ColumnChoice[Field] };

/** Where a choice stands, as a pointer into the choices has it; columns by their name instead of their place. */
export type ChoicePlace = keyof FileChange | `columns/${string}/${keyof ColumnChange}`;

export function columnPlace(name: string, field: keyof ColumnChange): ChoicePlace {
  return `columns/${name}/${field}`;
}

export function withFileChange(choices: ReadingChoices, change: FileChange): ReadingChoices {
  return chosenOnly({ ...choices, ...change });
}

export function withColumnChange(choices: ReadingChoices, name: string, change: ColumnChange): ReadingChoices {
  const others = (choices.columns ?? []).filter((column) => column.name !== name);
  const { name: _, ...changed } = { ...columnChoice(choices, name), ...change };
  const chosen = chosenOnly(changed);
  const columns = Object.keys(chosen).length === 0 ? others : [...others, { name, ...chosen }];
  return chosenOnly({ ...choices, columns: columns.length === 0 ? undefined : columns });
}

export function withoutColumn(choices: ReadingChoices, name: string): ReadingChoices {
  const columns = (choices.columns ?? []).filter((column) => column.name !== name);
  return chosenOnly({ ...choices, columns: columns.length === 0 ? undefined : columns });
}

export function columnChoice(choices: ReadingChoices, name: string): ColumnChoice | undefined {
  return choices.columns?.find((column) => column.name === name);
}

/** How many things a person has chosen otherwise than they were found. */
export function countChoices({ columns = [], ...file }: ReadingChoices): number {
  return Object.keys(file).length + columns.reduce((count, column) => count + Object.keys(column).length - 1, 0);
}

/**
 * The choices as they can be sent: of the columns that the file has as it is read now, and without a unit for a column
 * that was made words or an order of dates for one that is none. What is left out is kept for when it fits again.
 */
export function fittingChoices(choices: ReadingChoices, names: ReadonlySet<string>): ReadingChoices {
  const columns = (choices.columns ?? []).filter(({ name }) => names.has(name)).map(fittingColumn);
  return chosenOnly({ ...choices, columns: columns.length === 0 ? undefined : columns });
}

function fittingColumn({ unit, dateOrder, ...column }: ColumnChoice): ColumnChoice {
  const { kind } = column;
  return chosenOnly({
    ...column,
    unit: kind === undefined || kind === 'numeric' ? unit : undefined,
    dateOrder: kind === undefined || kind === 'date' ? dateOrder : undefined,
  });
}

/** What decides which columns the file has: when it is the same, so are their names. */
export function layoutOf({ sheet, delimiter, headerLine }: ReadingChoices): string {
  return JSON.stringify([sheet, delimiter, headerLine]);
}

function chosenOnly<Choices extends object>(choices: Choices): Choices {
  return Object.fromEntries(Object.entries(choices).filter(([, value]) => value !== undefined)) as Choices;
}
