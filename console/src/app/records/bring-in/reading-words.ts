import type { DateOrder, ReadingChoices } from '../../api/contract';

interface Option<Value> {
  readonly value: Value;
  readonly words: string;
}

export const DELIMITERS: readonly Option<NonNullable<ReadingChoices['delimiter']>>[] = [
  { value: ',', words: 'Comma ,' },
  { value: ';', words: 'Semicolon ;' },
  { value: '\t', words: 'Tab' },
  { value: '|', words: 'Upright bar |' },
];

export const DECIMAL_MARKS: readonly Option<NonNullable<ReadingChoices['decimal']>>[] = [
  { value: '.', words: 'Point, as in 12.5' },
  { value: ',', words: 'Comma, as in 12,5' },
];

export const DATE_ORDERS: readonly Option<DateOrder>[] = [
  { value: 'year-first', words: 'Year first, 2026-03-04' },
  { value: 'day-first', words: 'Day first, 4.3.2026' },
  { value: 'month-first', words: 'Month first, 3/4/2026' },
];
