import { antifoulingRows } from './antifouling-records';
import { craneRows, newCraneDay } from './crane-records';
import { asReceived, notTaken } from './refit-faults';
import { refitRows } from './refit-records';
import { toCsv, type TableRow } from './table';

const numbers = (rows: readonly TableRow[], column: string): number[] =>
  rows.map((row) => row[column]).filter((value) => typeof value === 'number');
const mean = (values: readonly number[]): number => values.reduce((sum, value) => sum + value, 0) / values.length;

function correlation(rows: readonly TableRow[], first: string, second: string): number {
  const whole = rows.filter((row) => typeof row[first] === 'number' && typeof row[second] === 'number');
  const [xs, ys] = [numbers(whole, first).map(Math.log), numbers(whole, second).map(Math.log)];
  const [xMean, yMean] = [mean(xs), mean(ys)];
  const product = (as: readonly number[], aMean: number, bs: readonly number[], bMean: number): number =>
    mean(as.map((a, at) => (a - aMean) * (bs[at] - bMean)));
  return product(xs, xMean, ys, yMean) / Math.sqrt(product(xs, xMean, xs, xMean) * product(ys, yMean, ys, yMean));
}

describe('the demonstration’s records', () => {
  const refits = refitRows(2400);

  it('come out the same every time', () => {
    expect(toCsv(refitRows(50))).toBe(toCsv(refitRows(50)));
    expect(toCsv(antifoulingRows(50))).toBe(toCsv(antifoulingRows(50)));
    expect(toCsv(craneRows(50))).toBe(toCsv(craneRows(50)));
  });

  it('hold six years of refits from nine yards, in order', () => {
    const days = refits.map((row) => String(row['finished']));
    expect(days).toEqual([...days].sort());
    expect([days[0].slice(0, 7), days[days.length - 1].slice(0, 7)]).toEqual(['2020-09', '2026-08']);
    expect(new Set(refits.map((row) => row['yard'])).size).toBe(9);
  });

  it('measure the size of a boat in several ways that overlap', () => {
    for (const column of ['waterline length (m)', 'beam (m)', 'displacement (t)', 'ballast (t)']) {
      expect(correlation(refits, 'length overall (m)', column)).toBeGreaterThan(0.9);
    }
    expect(correlation(refits, 'length overall (m)', 'labour (h)')).toBeLessThan(0.8);
  });

  it('keep within what boats measure', () => {
    for (const row of refits) {
      expect(row['waterline length (m)']).toBeLessThan(Number(row['length overall (m)']));
      if (row['ballast (t)'] !== null) expect(row['ballast (t)']).toBeLessThan(0.62 * Number(row['displacement (t)']));
      expect(row['labour (h)']).toBeGreaterThan(0);
    }
  });

  it('as received hide other units, other spellings, a mark for what was not taken, and rows entered twice', () => {
    const received = asReceived(refits, { inFeet: 6, inKilograms: 4, spelledOtherwise: 60, duplicates: 12 });
    expect(received).toHaveLength(2412);
    const single = new Map(received.map((row) => [row['reference'], row]));
    expect(single.size).toBe(2400);
    const changed = (column: string): number =>
      refits.filter((row) => single.get(row['reference'])?.[column] !== row[column]).length;
    expect([changed('length overall (m)'), changed('displacement (t)'), changed('labour (h)')]).toEqual([6, 4, 0]);
    expect(changed('hull material')).toBeGreaterThan(20);
    expect(changed('draught (m)')).toBe(refits.filter((row) => row['draught (m)'] === null).length);
    expect(received.filter((row) => row['draught (m)'] === notTaken).length).toBeGreaterThan(40);
  });

  it('show a crane that became slower for light boats and quicker for heavy ones', () => {
    const lifts = craneRows(1500);
    const meanTime = (heavy: boolean, after: boolean): number =>
      mean(
        numbers(
          lifts.filter(
            (row) => Number(row['displacement (t)']) > 12 === heavy && String(row['lifted']) >= newCraneDay === after,
          ),
          'crane time (min)',
        ),
      );
    expect(meanTime(false, true)).toBeGreaterThan(meanTime(false, false) + 3);
    expect(meanTime(true, true)).toBeLessThan(meanTime(true, false));
  });
});
