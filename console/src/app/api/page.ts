import { HttpParams } from '@angular/common/http';
import { EMPTY, Observable, expand, map, reduce } from 'rxjs';

/** The most rows that one call answers. */
export const GREATEST_LIMIT = 200;

export interface Page {
  readonly limit?: number;
  readonly offset?: number;
}

export interface Paged<Item> {
  readonly items: readonly Item[];
  readonly total: number;
}

/** Query parameters of the fields that have a value. */
export function queryOf(fields: object): HttpParams {
  const given = Object.entries(fields).filter(([, value]) => value !== undefined && value !== null && value !== '');
  return new HttpParams({ fromObject: Object.fromEntries(given.map(([name, value]) => [name, String(value)])) });
}

/**
 * Reads a list to its end, a page at a time, so that sorting and filtering on screen cover all of it.
 * For lists that people keep by hand (record sets, estimators, partners); never for the journal or estimates.
 */
export function everyItem<Item>(read: (page: Page) => Observable<Paged<Item>>): Observable<readonly Item[]> {
  let offset = 0;
  return read({ limit: GREATEST_LIMIT, offset }).pipe(
    expand((page) => {
      offset += page.items.length;
      return page.items.length === 0 || offset >= page.total ? EMPTY : read({ limit: GREATEST_LIMIT, offset });
    }),
    map((page) => page.items),
    reduce((all, items) => [...all, ...items], [] as readonly Item[]),
  );
}
