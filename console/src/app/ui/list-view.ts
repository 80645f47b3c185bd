import { Signal, computed, linkedSignal, signal } from '@angular/core';
import type { Sort } from '@angular/material/sort';
import { ROWS_A_PAGE } from './pager';

type SortKey = string | number | boolean | null | undefined;

export interface ListViewOptions<Item> {
  /** What a column sorts by, under the column's name. */
  readonly sortKeys: Readonly<Record<string, (item: Item) => SortKey>>;
  readonly firstSort: Sort;
  /** The words of an item that the filter looks in. */
  readonly words?: (item: Item) => string;
}

/** A whole list held by the screen: filtered, then sorted, then cut into pages. */
export interface ListView<Item> {
  readonly rows: Signal<readonly Item[]>;
  /** How many pass the filter. */
  readonly total: Signal<number>;
  readonly offset: Signal<number>;
  readonly sort: Signal<Sort>;
  readonly filter: Signal<string>;
  sortBy(sort: Sort): void;
  filterBy(text: string): void;
  moveTo(offset: number): void;
}

export function listView<Item>(items: () => readonly Item[], options: ListViewOptions<Item>): ListView<Item> {
  const sort = signal(options.firstSort);
  const filter = signal('');
  const passing = computed(() => items().filter((item) => passes(item, filter(), options)));
  const sorted = computed(() => sortedBy(passing(), sort(), options));
  // Whatever changes the list starts it again from the top.
  const offset = linkedSignal<unknown, number>({
    source: () => [filter(), sort(), items().length],
    computation: () => 0,
  });
  return {
    rows: computed(() => sorted().slice(offset(), offset() + ROWS_A_PAGE)),
    total: computed(() => passing().length),
    offset: offset.asReadonly(),
    sort: sort.asReadonly(),
    filter: filter.asReadonly(),
    sortBy: (wanted) => sort.set(wanted.direction === '' ? options.firstSort : wanted),
    filterBy: (text) => filter.set(text),
    moveTo: (wanted) => offset.set(wanted),
  };
}

function passes<Item>(item: Item, filter: string, { words }: ListViewOptions<Item>): boolean {
  if (words === undefined) return true;
  const text = words(item).toLowerCase();
  return filter
    .toLowerCase()
    .split(/\s+/)
    .every((word) => text.includes(word));
}

function sortedBy<Item>(items: readonly Item[], sort: Sort, options: ListViewOptions<Item>): readonly Item[] {
  const key = options.sortKeys[sort.active];
  if (key === undefined) return items;
  const sign = sort.direction === 'desc' ? -1 : 1;
  return [...items].sort((a, b) => compare(key(a), key(b), sign));
}

/** Rows without a value come last, whichever way the column is sorted. */
function compare(a: SortKey, b: SortKey, sign: number): number {
  if (isMissing(a) || isMissing(b)) return Number(isMissing(a)) - Number(isMissing(b));
  if (typeof a === 'string' && typeof b === 'string') return sign * a.localeCompare(b, 'en-GB', { numeric: true });
  return sign * (Number(a) - Number(b));
}

function isMissing(key: SortKey): boolean {
  return key === null || key === undefined;
}
