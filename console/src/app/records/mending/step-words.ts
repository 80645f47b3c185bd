import type { ColumnKind, DateOrder, MendStep } from '../../api/contract';
import { countOf, formatCount } from '../../ui/figure';
import { factorText } from './unit-conversions';

export type StepKind = MendStep['kind'];

export interface StepChoice {
  readonly kind: StepKind;
  readonly name: string;
  readonly explanation: string;
}

/** What can be done to records, in the order in which it is mostly done. */
export const STEP_CHOICES: readonly StepChoice[] = [
  {
    kind: 'convert-unit',
    name: 'Convert the unit',
    explanation: 'Multiplies a column by a factor, in every row or in some.',
  },
  { kind: 'set-missing', name: 'Set to missing', explanation: 'Empties a column in some rows; the rows stay.' },
  { kind: 'map-levels', name: 'Map levels', explanation: 'Gives levels of a category another name, or the same one.' },
  {
    kind: 'join-rare-levels',
    name: 'Join rare levels',
    explanation: 'Puts levels with too few rows together into one.',
  },
  { kind: 'drop-rows', name: 'Drop rows', explanation: 'Leaves some rows out.' },
  {
    kind: 'drop-repeated-rows',
    name: 'Drop repeated rows',
    explanation: 'Leaves out rows that repeat an earlier one in every column.',
  },
  { kind: 'rename', name: 'Rename a column', explanation: 'Gives a column another name.' },
  {
    kind: 'set-kind',
    name: 'Set the kind',
    explanation: 'Reads a column as numbers, a category, dates or text. What cannot be read so becomes missing.',
  },
  {
    kind: 'set-unit',
    name: 'Set the unit',
    explanation: 'Says what a column was measured in; the figures stay as they are.',
  },
  { kind: 'derive', name: 'Derive a column', explanation: 'Adds a column of numbers worked out from others.' },
  { kind: 'set-aside', name: 'Set a column aside', explanation: 'Leaves a column out of the new revision.' },
];

const NAMES = new Map(STEP_CHOICES.map(({ kind, name }) => [kind, name]));

export function nameOfStep({ kind }: MendStep): string {
  return NAMES.get(kind) ?? kind;
}

export const KIND_AIMS: Readonly<Record<ColumnKind, string>> = {
  numeric: 'numbers',
  category: 'a category',
  date: 'dates',
  text: 'text',
};

export const DATE_ORDERS: readonly { readonly value: DateOrder; readonly name: string }[] = [
  { value: 'year-first', name: 'year first, as 2026-03-25' },
  { value: 'day-first', name: 'day first, as 25/03/2026' },
  { value: 'month-first', name: 'month first, as 03/25/2026' },
];

/** Row numbers that are written out; more are counted. */
const ROWS_WRITTEN = 5;

interface RowChoice {
  readonly where?: string;
  readonly rows?: readonly number[];
}

/** Which rows a step is about, or nothing where it is about all of them. */
function rowWords({ where, rows }: RowChoice): string {
  const condition = where === undefined ? '' : ` where ${where}`;
  if (rows === undefined) return condition;
  if (rows.length > ROWS_WRITTEN) return ` in ${formatCount(rows.length)} rows given by number${condition}`;
  return ` in ${rows.length === 1 ? 'row' : 'rows'} ${rows.join(', ')}${condition}`;
}

function droppedWords(choice: RowChoice): string {
  const { rows } = choice;
  if (rows === undefined) return `Drop the rows${rowWords(choice)}`;
  if (rows.length > ROWS_WRITTEN) return `Drop ${countOf(rows.length, 'row')} given by number${whereWords(choice)}`;
  return `Drop ${rows.length === 1 ? 'row' : 'rows'} ${rows.join(', ')}${whereWords(choice)}`;
}

const whereWords = ({ where }: RowChoice): string => (where === undefined ? '' : ` where ${where}`);

function levelWords(levels: Readonly<Record<string, string>>): string {
  return Object.entries(levels)
    .map(([from, to]) => `“${from}” to “${to}”`)
    .join(', ');
}

/** A step as it is to be done, in words and without a full stop. */
export function wordsOfStep(step: MendStep): string {
  switch (step.kind) {
    case 'rename':
      return `Rename ${step.column} to ${step.to}`;
    case 'set-aside':
      return `Set ${step.column} aside`;
    case 'set-unit':
      return step.unit === null
        ? `Take the unit of ${step.column} away`
        : `Set the unit of ${step.column} to ${step.unit}`;
    case 'set-kind':
      return `Read ${step.column} as ${KIND_AIMS[step.to]}`;
    case 'convert-unit':
      return `Multiply ${step.column} by ${factorText(step.factor)}${rowWords(step)}${unitWords(step.unit)}`;
    case 'map-levels':
      return `Map levels of ${step.column}: ${levelWords(step.levels)}`;
    case 'set-missing':
      return `Set ${step.column} to missing${rowWords(step)}`;
    case 'drop-rows':
      return droppedWords(step);
    case 'drop-repeated-rows':
      return 'Drop the rows that repeat an earlier one';
    case 'join-rare-levels':
      return `Join levels of ${step.column} with fewer than ${formatCount(step.fewerThan)} rows into “${step.into}”`;
    case 'derive':
      return `Add ${step.name}${step.unit ? `, in ${step.unit},` : ''} = ${step.formula}`;
  }
}

function unitWords(unit: string | null | undefined): string {
  if (unit === undefined) return '';
  return unit === null ? '; it has no unit afterwards' : `; its unit is ${unit} afterwards`;
}
