import { estimatorExample } from '../api/examples.fixture';
import { outsideNotice, rangeHint, readingText, unitForReaders } from './field-words';
import { fieldsFrom } from './fields-from-schema';
import { FormField } from './form-field';
import { readCase, readField } from './read-case';

const fields = fieldsFrom(estimatorExample().inputs);
const [length, displacement, hull, , winter, booked] = fields;

function errorOf(field: FormField, typed: string, locale = 'en-GB'): string {
  const reading = readField(field, typed, locale);
  return reading.ok ? `read as ${String(reading.value)}` : reading.error.replace(/[\u00a0\u202f]/g, ' ');
}

describe('readCase', () => {
  it('sends numbers, levels, truth values and days as what they are, and leaves out what is blank and optional', () => {
    const typed = {
      length_overall: '12,6 m',
      displacement: '9.8',
      hull: 'steel',
      scope: 'deck',
      winter: 'false',
      booked: '',
    };
    expect(readCase(fields, typed, 'en-GB')).toEqual({
      ok: true,
      inputs: { length_overall: 12.6, displacement: 9.8, hull: 'steel', scope: 'deck', winter: false },
    });
  });

  it('sends null where the input must be present but may be blank', () => {
    const nullable = fieldsFrom({ properties: { draught: { type: ['number', 'null'] } }, required: ['draught'] });
    expect(readCase(nullable, {})).toEqual({ ok: true, inputs: { draught: null } });
  });

  it('names every entry that is wrong at once', () => {
    const reading = readCase(fields, { displacement: 'heavy' }, 'en-GB');
    expect(reading.ok ? [] : Object.keys(reading.errors)).toEqual(['length_overall', 'displacement', 'hull', 'scope']);
  });
});

describe('readField', () => {
  it.each([
    ['', 'Length overall: enter a number in metres.'],
    ['long', 'Length overall: “long” is not a number. Write it like 10.9.'],
    ['41 ft', 'Length overall: give it in metres, not in “ft”.'],
    ['1,234', 'Length overall: “1,234” can be read in two ways. Write 1234 or 1.234.'],
    ['0', 'Length overall: it must be more than 0 m.'],
    ['-3', 'Length overall: it must be more than 0 m.'],
  ])('says what to do about %j', (typed, error) => {
    expect(errorOf(length, typed)).toBe(error);
  });

  it('asks for one of the levels', () => {
    expect(errorOf(hull, '')).toBe('Hull material: choose one.');
    expect(errorOf(hull, 'cork')).toBe('Hull material: choose one.');
  });

  it('wants a day of the calendar', () => {
    expect(errorOf(booked, '2026-02-30')).toBe('Booked: give a day that exists, like 2026-03-31.');
    expect(errorOf(booked, '2026-02-28')).toBe('read as 2026-02-28');
  });

  it('keeps to the bounds of the schema', () => {
    const year = fieldsFrom({
      properties: { built: { type: 'integer', title: 'Built', minimum: 1900, maximum: 2026 } },
    })[0];
    expect(errorOf(year, '1899')).toBe('Built: it must be 1900 or more.');
    expect(errorOf(year, '2027')).toBe('Built: it must be 2026 or less.');
    expect(errorOf(year, '1974.5')).toBe('Built: give a whole number.');
    expect(errorOf(year, '1974')).toBe('read as 1974');
  });

  it('accepts what lies outside the records', () => {
    expect(readField(displacement, '30', 'en-GB')).toEqual({ ok: true, value: 30 });
  });
});

describe('the words of a field', () => {
  const plain = (text: string | null): string | null => text?.replace(/[\u00a0\u202f]/g, ' ') ?? null;

  it('hint at what the records cover', () => {
    expect(plain(rangeHint(length, 'en-GB'))).toBe('The records run from 6.2 to 18.4 m.');
    expect(plain(rangeHint(length, 'de-DE'))).toBe('The records run from 6,2 to 18,4 m.');
    expect(plain(rangeHint(booked, 'en-GB'))).toBe('The records run from 2 January 2020 to 30 June 2026.');
    expect(rangeHint(hull, 'en-GB')).toBeNull();
  });

  it('remark on a reading outside the records, and on no other', () => {
    expect(plain(outsideNotice(displacement, 30, 'en-GB'))).toBe(
      '30 t lies outside the records; the estimate will be marked.',
    );
    expect(outsideNotice(displacement, 24, 'en-GB')).toBeNull();
    expect(outsideNotice(booked, '2026-07-01', 'en-GB')).toContain('1 July 2026 lies outside the records');
    expect(outsideNotice(booked, '2026-06-30', 'en-GB')).toBeNull();
    expect(outsideNotice(length, null, 'en-GB')).toBeNull();
  });

  it('show an answer as it was meant', () => {
    expect(plain(readingText(length, 12.6, 'en-GB'))).toBe('12.6 m');
    expect(readingText(winter, false, 'en-GB')).toBe('No');
    expect(readingText(booked, '2026-03-31', 'en-GB')).toBe('31 March 2026');
    expect(readingText(winter, undefined, 'en-GB')).toBe('not given');
  });

  it('read the unit with the label', () => {
    expect(unitForReaders(length)).toBe(' (in metres)');
    expect(unitForReaders(hull)).toBe('');
  });
});
