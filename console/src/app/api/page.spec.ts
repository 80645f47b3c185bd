import { Observable, of, toArray } from 'rxjs';
import { Page, Paged, everyItem, queryOf } from './page';

describe('everyItem', () => {
  function listOf(total: number): {
    read: (page: Page) => Observable<Paged<number>>;
    asked: Page[];
  } {
    const all = Array.from({ length: total }, (_, index) => index);
    const asked: Page[] = [];
    const read = (page: Page) => {
      asked.push(page);
      const start = page.offset ?? 0;
      return of({ items: all.slice(start, start + (page.limit ?? 50)), total });
    };
    return { read, asked };
  }

  it.each([0, 1, 200, 201, 450])('reads a list of %d to its end, in order, in one answer', (total) => {
    const { read } = listOf(total);
    const answers: (readonly number[])[] = [];
    everyItem(read)
      .pipe(toArray())
      .subscribe((all) => answers.push(...all));
    expect(answers).toEqual([Array.from({ length: total }, (_, index) => index)]);
  });

  it('asks no more often than it needs to', () => {
    const { read, asked } = listOf(400);
    everyItem(read).subscribe();
    expect(asked.map(({ offset }) => offset)).toEqual([0, 200]);
  });

  it('stops when rows have gone while it reads', () => {
    const read = ({ offset }: Page) => of({ items: offset === 0 ? [1] : [], total: 5 });
    const answers: (readonly number[])[] = [];
    everyItem(read).subscribe((items) => answers.push(items));
    expect(answers).toEqual([[1]]);
  });
});

describe('queryOf', () => {
  it('leaves out what has no value', () => {
    expect(queryOf({ limit: 25, offset: 0, action: '', from: undefined }).toString()).toBe('limit=25&offset=0');
  });
});
