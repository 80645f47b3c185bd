import { formatFactor, formatReading, formatSigned, formatStepped, knownLocale, withUnit } from './number-format';

const NO_BREAK = '\u00a0';

describe('formatStepped', () => {
  it.each([
    [512.3781, 1, 'en-GB', '512'],
    [51237.81, 10, 'en-GB', '51,240'],
    [51237.81, 10, 'de-DE', '51.240'],
    [12.3456, 0.1, 'de-DE', '12,3'],
    [12, 0.1, 'en-GB', '12.0'],
    [-3.4, 1, 'en-GB', '−3'],
    [-0.2, 1, 'en-GB', '0'],
  ])('writes %d in steps of %d in %s as %s', (value, step, locale, expected) => {
    expect(formatStepped(value, step, locale)).toBe(expected);
  });
});

describe('formatSigned', () => {
  it.each([
    [48.2, 1, '+48'],
    [-11.4, 1, '−11'],
    [0.3, 1, '0'],
    [-0.3, 1, '0'],
    [1.44, 0.1, '+1.4'],
  ])('writes the sign of %d in steps of %d: %s', (value, step, expected) => {
    expect(formatSigned(value, step, 'en-GB')).toBe(expected);
  });
});

describe('formatFactor', () => {
  it.each([
    [1.1772, '1.18'],
    [0.9832, '0.98'],
    [0.0123, '0.012'],
    [12.34, '12.3'],
    [123.4, '123'],
  ])('writes %d as × %s', (factor, figure) => {
    expect(formatFactor(factor, 'en-GB').replace(/\s/u, ' ')).toBe(`× ${figure}`);
  });
});

describe('formatReading', () => {
  it('puts no separator into a year', () => {
    expect(formatReading(1974, 'en-GB')).toBe('1974');
  });
  it('groups from five digits on', () => {
    expect(formatReading(12500, 'en-GB')).toBe('12,500');
  });
  it('adds no digit', () => {
    expect(formatReading(9.8, 'en-GB')).toBe('9.8');
  });
});

describe('withUnit', () => {
  it.each([
    ['512', 'hours', `512${NO_BREAK}hours`],
    ['12', '%', '12%'],
    ['12', '', '12'],
    ['12', null, '12'],
  ])('joins %s and %s', (figure, unit, expected) => {
    expect(withUnit(figure, unit)).toBe(expected);
  });
});

describe('knownLocale', () => {
  it.each([
    ['en-GB', 'en-GB'],
    ['not a tag', undefined],
    ['', undefined],
    [null, undefined],
  ])('takes %s as %s', (tag, expected) => {
    expect(knownLocale(tag)).toBe(expected);
  });
});
