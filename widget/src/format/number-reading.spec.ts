import { readNumber } from './number-reading';

const NARROW_NO_BREAK = '\u202f';
const ZERO_WIDTH = '\u200b';

describe('readNumber', () => {
  it.each([
    ['30', 30],
    ['12.6', 12.6],
    ['12,6', 12.6],
    [' 12.6 ', 12.6],
    ['1234.5678', 1234.5678],
    ['1234,567', 1234.567],
    ['0.123', 0.123],
    ['0,123', 0.123],
    ['1,234.5', 1234.5],
    ['1.234,5', 1234.5],
    ['1,234,567', 1234567],
    ['1.234.567', 1234567],
    ['1 234', 1234],
    [`1${NARROW_NO_BREAK}234,5`, 1234.5],
    ['1’234.5', 1234.5],
    [`12${ZERO_WIDTH}.6`, 12.6],
    ['.5', 0.5],
    ['5.', 5],
    ['-3.2', -3.2],
    ['−3,2', -3.2],
    ['+3', 3],
    ['-0', 0],
    ['１２', 12],
  ])('reads %j as %d, whatever the language', (text, value) => {
    for (const locale of [undefined, 'en-GB', 'de-DE']) {
      expect(readNumber(text, { locale })).toEqual({ ok: true, value });
    }
  });

  it.each([
    ['12.6 m', 'm'],
    ['12.6m', 'm'],
    ['12.6 Metres', 'm'],
    ['m 12.6', 'm'],
    ['£12.6', '£'],
    ['12.6 knots', 'knots'],
  ])('ignores the typed unit in %j', (text, unit) => {
    expect(readNumber(text, { unit })).toEqual({ ok: true, value: 12.6 });
  });

  it.each([
    ['41 ft', 'm', 'ft'],
    ["41'", 'm', "'"],
    ['9800 kg', 't', 'kg'],
    ['12.6 m', undefined, 'm'],
  ])('refuses %j where the unit is %s, because it may mean another length', (text, unit, typedUnit) => {
    expect(readNumber(text, { unit })).toEqual({ ok: false, reason: 'other-unit', typedUnit });
  });

  it.each(['1,234', '1.234', '100,000', '-1,234'])('refuses %j, which two languages read apart', (text) => {
    expect(readNumber(text)).toMatchObject({ ok: false, reason: 'ambiguous' });
  });

  it.each([
    ['1.234', 'en-GB', 1.234],
    ['1,234', 'de-DE', 1.234],
  ])("reads %j in %s by that language's decimal separator", (text, locale, value) => {
    expect(readNumber(text, { locale })).toEqual({ ok: true, value });
  });

  it.each([
    ['1,234', 'en-GB'],
    ['1.234', 'de-DE'],
  ])('still refuses %j in %s, where it could be a thousand or a foreign decimal', (text, locale) => {
    expect(readNumber(text, { locale })).toMatchObject({ ok: false, reason: 'ambiguous' });
  });

  it.each([
    ['1,234', undefined],
    ['-1.234', undefined],
    ['100,000', undefined],
    ['1,234', 'en-GB'],
    ['-1.234', 'de-DE'],
  ])('offers two ways to write %j (%s) that are both accepted', (text, locale) => {
    const reading = readNumber(text, { locale });
    if (reading.ok || reading.reason !== 'ambiguous') {
      throw new Error('expected an ambiguous reading');
    }
    const digits = Number(text.replace(/[.,]/, ''));
    expect(readNumber(reading.asWhole, { locale })).toEqual({ ok: true, value: digits });
    expect(readNumber(reading.asDecimal, { locale })).toEqual({ ok: true, value: digits / 1000 });
  });

  it.each(['', '   ', ZERO_WIDTH])('finds %j empty', (text) => {
    expect(readNumber(text)).toEqual({ ok: false, reason: 'empty' });
  });

  it.each(['about 12', '12..6', '1,2,3', '1,23,456', '12 6', '1.234.5', '1,234,5', '--3', '.', ',', '1.2.3'])(
    'refuses %j',
    (text) => {
      expect(readNumber(text, { unit: 'm' })).toMatchObject({ ok: false, reason: 'not-a-number' });
    },
  );

  it('refuses digits beyond what a number can hold', () => {
    expect(readNumber('9'.repeat(400))).toEqual({ ok: false, reason: 'not-a-number' });
  });
});
