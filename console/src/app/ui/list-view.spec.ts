import { signal } from '@angular/core';
import { listView } from './list-view';

interface Yard {
  readonly name: string;
  readonly berths: number | null;
}

const YARDS: readonly Yard[] = [
  { name: 'Tern Slip', berths: 12 },
  { name: 'Old Basin', berths: null },
  { name: 'Eastmark', berths: 40 },
];

describe('listView', () => {
  const options = {
    sortKeys: { name: (yard: Yard) => yard.name, berths: (yard: Yard) => yard.berths },
    firstSort: { active: 'name', direction: 'asc' as const },
    words: (yard: Yard) => yard.name,
  };
  const names = (view: { rows: () => readonly Yard[] }): string[] => view.rows().map(({ name }) => name);

  it('starts in the order that the list asks for', () => {
    expect(names(listView(() => YARDS, options))).toEqual(['Eastmark', 'Old Basin', 'Tern Slip']);
  });

  it.each([
    ['asc', ['Tern Slip', 'Eastmark', 'Old Basin']],
    ['desc', ['Eastmark', 'Tern Slip', 'Old Basin']],
  ] as const)('puts what has no value last when sorted %s', (direction, expected) => {
    const view = listView(() => YARDS, options);
    view.sortBy({ active: 'berths', direction });
    expect(names(view)).toEqual(expected);
  });

  it('sorts digits in names as numbers', () => {
    const view = listView(() => ['Berth 10', 'Berth 9'].map((name) => ({ name, berths: 1 })), options);
    expect(names(view)).toEqual(['Berth 9', 'Berth 10']);
  });

  it('passes what holds every word of the filter, in any order', () => {
    const view = listView(() => YARDS, options);
    view.filterBy('slip TERN');
    expect(names(view)).toEqual(['Tern Slip']);
    expect(view.total()).toBe(1);
  });

  it('starts from the top when the filter changes what is listed', () => {
    const many = signal(Array.from({ length: 60 }, (_, index) => ({ name: `Yard ${index}`, berths: index })));
    const view = listView(many, options);
    view.moveTo(50);
    expect(view.rows()).toHaveLength(10);
    view.filterBy('5');
    expect(view.offset()).toBe(0);
    expect(view.total()).toBe(15);
  });

  it('leaves the list that it was given as it was', () => {
    const list = [...YARDS];
    listView(() => list, options).rows();
    expect(list).toEqual(YARDS);
  });
});
