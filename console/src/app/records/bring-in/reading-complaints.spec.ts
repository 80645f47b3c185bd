import type { Problem } from '../../api/problem';
import { complaintsOf } from './reading-complaints';

const PROBLEM: Problem = { code: 'choices-invalid', status: 422, title: 'They do not fit', detail: 'Why.', errors: [] };
const SENT = {
  columns: [
    { name: 'crew', unit: 'x' },
    { name: 'a/b', kind: 'date' as const },
  ],
};

describe('complaintsOf', () => {
  const entries = (problem: Problem | undefined, last?: 'headerLine'): unknown =>
    [...complaintsOf(problem, SENT, last)].map(([place, words]) => `${place}: ${words}`);

  it('stand where the service points, a column by the name that was sent', () => {
    const errors = [
      { field: 'columns/0/unit', detail: 'Not known' },
      { field: 'choices/columns/1/kind', detail: 'No dates' },
      { field: 'decimal', detail: 'Not this' },
    ];
    expect(entries({ ...PROBLEM, errors })).toEqual([
      'columns/crew/unit: Not known',
      'columns/a/b/kind: No dates',
      'decimal: Not this',
    ]);
  });

  it('stand beside the last change when nothing is pointed at, with the line of the file', () => {
    expect(entries({ ...PROBLEM, code: 'file-ragged', line: 48 }, 'headerLine')).toEqual([
      'headerLine: Line 48 of the file: Why.',
    ]);
  });

  it('blame no choice for a desk that does not work', () => {
    expect(entries({ ...PROBLEM, code: 'unreachable' }, 'headerLine')).toEqual([]);
    expect(entries(undefined, 'headerLine')).toEqual([]);
  });
});
