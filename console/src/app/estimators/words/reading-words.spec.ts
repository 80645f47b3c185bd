import { readingWords, termWords } from './reading-words';

describe('how a reading enters the formula', () => {
  it.each([
    ['none', 'length'],
    ['log', 'the natural logarithm of length'],
    ['square-root', 'the square root of length'],
  ] as const)('%s', (transform, words) => {
    expect(readingWords('length', [{ column: 'length', transform }])).toBe(words);
  });

  it('stands as it is where nothing was said', () => {
    expect(readingWords('length', [])).toBe('length');
  });

  it('names basis columns and the sign of a missing reading', () => {
    expect(termWords('length', 'basis 2')).toBe('basis column 2 of the spline of length');
    expect(termWords('length', 'missing')).toBe('1 when length is missing, else 0');
  });
});
