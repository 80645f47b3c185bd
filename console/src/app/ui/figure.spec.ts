import { countOf, formatBytes, formatFigure, formatShare } from './figure';

const plain = (text: string): string => text.replace(/\u00a0/g, ' ');

describe('formatFigure', () => {
  it.each([
    [512.3781, 38, '512'],
    [512.3781, 3.8, '512.4'],
    [512.3781, 380, '510'],
    [-0.51234, 0.038, '−0.512'],
  ])('cuts %d with an uncertainty of %d to %s', (value, uncertainty, expected) => {
    expect(formatFigure(value, { uncertainty })).toBe(expected);
  });

  it.each([
    [12.345678, '12.35'],
    [2391, '2,391'],
    [12345.678, '12,346'],
    [0.00012345, '0.0001235'],
    [0, '0'],
  ])('gives %d four significant digits where no uncertainty is known: %s', (value, expected) => {
    expect(formatFigure(value)).toBe(expected);
  });

  it('joins the unit so that the line does not break between', () => {
    expect(formatFigure(9.8, { unit: 't' })).toBe('9.8\u00a0t');
  });

  it('adds noughts only where the digits are known to count', () => {
    expect(formatFigure(2.04, { significant: 2 })).toBe('2.0');
    expect(formatFigure(0.9)).toBe('0.9');
    expect(formatFigure(-1234.6)).toBe('−1,235');
  });

  it('writes the sign only when asked and only where there is one', () => {
    expect(formatFigure(35.2, { signed: true, uncertainty: 12 })).toBe('+35');
    expect(formatFigure(0.2, { signed: true, uncertainty: 12 })).toBe('0');
  });

  it.each([null, undefined, Number.NaN, Number.POSITIVE_INFINITY])(
    'puts a dash where there is no figure (%s)',
    (value) => {
      expect(formatFigure(value)).toBe('–');
    },
  );
});

describe('counts, shares and sizes', () => {
  it('agrees the noun with the count', () => {
    expect(countOf(1, 'row')).toBe('1 row');
    expect(countOf(2391, 'row')).toBe('2,391 rows');
    expect(countOf(0, 'entry', 'entries')).toBe('0 entries');
  });

  it.each([
    [0, '0%'],
    [0.001, 'under 1%'],
    [0.5, '50%'],
    [0.999, 'over 99%'],
    [1, '100%'],
  ])('never rounds a share of %d to none or all: %s', (share, expected) => {
    expect(formatShare(share)).toBe(expected);
  });

  it.each([
    [900, '900 bytes'],
    [184320, '184 kB'],
    [2_560_000, '2.56 MB'],
  ])('writes %d bytes as %s', (bytes, expected) => {
    expect(plain(formatBytes(bytes))).toBe(expected);
  });
});
