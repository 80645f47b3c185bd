import { DateForm, DateReader, dateText } from './date-cell';

const reader = new DateReader();
const day = (year: number, month: number, date: number): number => Date.UTC(year, month - 1, date) / 86_400_000;

describe('reading a date', () => {
  it.each([
    ['2024-02-29', DateForm.iso, day(2024, 2, 29)],
    ['2024/2/9', DateForm.iso, day(2024, 2, 9)],
    ['2024-05-01T06:00:00Z', DateForm.iso, day(2024, 5, 1) + 0.25],
    ['2024-05-01 01:00+02:00', DateForm.iso, day(2024, 4, 30) + 23 / 24],
    ['31/12/2023', DateForm.dayFirst, day(2023, 12, 31)],
    ['12/31/2023', DateForm.monthFirst, day(2023, 12, 31)],
    ['05.04.2023', DateForm.dayFirst, day(2023, 4, 5)],
    ['3.4.25', DateForm.dayFirst, day(2025, 4, 3)],
    ['31/12/68', DateForm.dayFirst, day(2068, 12, 31)],
    ['12/31/69', DateForm.monthFirst, day(1969, 12, 31)],
    ['2024-07', DateForm.isoMonth, day(2024, 7, 1)],
    ['3-Sep-2021', DateForm.named, day(2021, 9, 3)],
    ['12 March 2020', DateForm.named, day(2020, 3, 12)],
  ])('takes %s', (text, form, days) => {
    expect(reader.read(text)).toBe(form);
    expect(reader.valueOf(form)).toBeCloseTo(days, 9);
  });

  it('leaves the order of day and month open where both are possible', () => {
    expect(reader.read('04/05/2023')).toBe(DateForm.dayFirst | DateForm.monthFirst);
  });

  it.each([
    '2023-02-29',
    '31/04/2023',
    '13/13/2023',
    '2024-1',
    '01-02-23',
    '1.2.345',
    '12 Mai 2020',
    '2024-05-01 25:00',
    '20240501',
    'hull 7',
  ])('does not take %s', (text) => {
    expect(reader.read(text)).toBe(DateForm.none);
  });

  it('writes every day back as it was read', () => {
    for (let days = -100_000; days < 100_000; days += 37) {
      reader.read(dateText(days));
      expect(reader.valueOf(DateForm.iso)).toBe(days);
    }
  });
});
