import fc from 'fast-check';
import { bindCondition } from '../mending/formula-evaluation';
import { boundsAround, oneOfTexts, shortestBetween } from './conditions';

const names = fc.constantFrom('length', 'beam (m)', 'x]y', 'and', 'draught [m]');
const readings = fc.array(
  fc.oneof(fc.double({ noDefaultInfinity: true, noNaN: true }), fc.constant(NaN), fc.integer()),
  {
    minLength: 1,
    maxLength: 30,
  },
);

describe('bounds around chosen readings', () => {
  it('hold for these and for no others, where there are any', () => {
    fc.assert(
      fc.property(names, readings, fc.array(fc.boolean(), { minLength: 30, maxLength: 30 }), (name, given, chosen) => {
        const values = Float64Array.from(given);
        const rows = given.flatMap((value, row) => (chosen[row] && !Number.isNaN(value) ? [row] : []));
        const where = boundsAround(name, values, rows);
        if (where === undefined) return;
        const holds = bindCondition(where, { rowCount: values.length, columns: [{ name, kind: 'numeric', values }] });
        expect(given.flatMap((_, row) => (holds(row) ? [row] : []))).toEqual(rows);
      }),
      { numRuns: 2000 },
    );
  });

  it.each([
    ['readings above the rest', [5, 6, 7, 30], [3], 'length > 20'],
    ['readings below the rest', [5, 6, 7, -30], [3], 'length < -10'],
    ['readings on both sides', [5, 6, 70, 0.1], [2, 3], 'length < 3 or length > 40'],
    ['a stretch between others', [1, 10, 11, 100], [1, 2], 'length >= 6 and length <= 60'],
  ])('are short for %s', (_what, values, rows, where) => {
    expect(boundsAround('length', Float64Array.from(values), rows)).toBe(where);
  });

  it('are none where other readings lie among the chosen, or where none is chosen', () => {
    expect(boundsAround('length', Float64Array.of(1, 2, 3, 4), [0, 2])).toBeUndefined();
    expect(boundsAround('length', Float64Array.of(1, 2), [])).toBeUndefined();
    expect(boundsAround(' length', Float64Array.of(1, 2), [1])).toBeUndefined();
  });
});

describe('the shortest number between two others', () => {
  it('lies between them, with the one of the two that it may be', () => {
    fc.assert(
      fc.property(
        fc.double({ noNaN: true, noDefaultInfinity: true }),
        fc.double({ noNaN: true, noDefaultInfinity: true }),
        (a, b) => {
          fc.pre(a < b);
          expect(shortestBetween(a, b, true)).toBeGreaterThanOrEqual(a);
          expect(shortestBetween(a, b, true)).toBeLessThan(b);
          expect(shortestBetween(a, b, false)).toBeGreaterThan(a);
          expect(shortestBetween(a, b, false)).toBeLessThanOrEqual(b);
        },
      ),
    );
  });
});

describe('a condition for some levels', () => {
  it('is none when it would be longer than a formula may be', () => {
    expect(oneOfTexts('hull', ['a"b'])).toBe('hull = "a""b"');
    expect(oneOfTexts('hull', new Array<string>(40).fill('glass fibre'))).toBeUndefined();
  });
});
