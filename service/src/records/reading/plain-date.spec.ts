import { DateForm, DateReader } from './date-cell';
import { plainDays } from './plain-date';

const reader = new DateReader();
const theLongWay = (text: string): number => {
  reader.read(text);
  return reader.valueOf(DateForm.iso);
};
const two = (value: number): string => String(value).padStart(2, '0');

describe('a plainly written date', () => {
  it('is the day that the long way of reading finds, in leap years, other years and at the ends of months', () => {
    for (const year of [1000, 1582, 1600, 1700, 1899, 1900, 1968, 1970, 1999, 2000, 2023, 2024, 2100, 2400, 9999]) {
      for (let month = 0; month <= 13; month++) {
        for (let day = 0; day <= 32; day++) {
          const text = `${year}-${two(month)}-${two(day)}`;
          if (!Object.is(plainDays(text), theLongWay(text))) throw new Error(`${text} differs.`);
        }
      }
    }
    // Day 0, and a leap day: 54 years with 13 leap years, 31 days and 28 days after it.
    expect(plainDays('1970-01-01')).toBe(0);
    expect(plainDays('2024-02-29')).toBe(54 * 365 + 13 + 31 + 28);
  });

  it.each(['', '2026-3-01', '2026/03/01', '2026-03-01T10:00', ' 2026-03-0', '0999-12-31', '2o26-03-01', '2026-03-0x'])(
    'is not “%s”, which is left to the long way',
    (text) => {
      expect(plainDays(text)).toBeNaN();
    },
  );
});
