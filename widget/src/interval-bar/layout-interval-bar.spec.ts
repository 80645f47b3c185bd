import { precisionFor } from '../format/precision';
import { IntervalBarLayout, layoutIntervalBar } from './layout-interval-bar';

function layout(value: number, low: number | null, high: number | null): IntervalBarLayout {
  const drawn = layoutIntervalBar({ value, low, high }, precisionFor({ value, low, high }));
  if (!drawn) {
    throw new Error('expected a bar');
  }
  return drawn;
}

describe('layoutIntervalBar', () => {
  it('places the ends and the estimate to one scale', () => {
    const drawn = layout(512, 440, 590);
    const perUnit = (drawn.to - drawn.from) / 150;
    expect((drawn.value - drawn.from) / perUnit).toBeCloseTo(72, 8);
    expect(drawn.from).toBeGreaterThan(0.15);
    expect(drawn.to).toBeLessThan(0.85);
  });

  it('marks both ends of the interval and of the axis', () => {
    expect(layout(512, 440, 590).marks.map(({ kind, value }) => [kind, value])).toEqual([
      ['end', 440],
      ['end', 590],
      ['axis', 330],
      ['axis', 700],
    ]);
  });

  it('does not run below nought what cannot be negative', () => {
    const drawn = layout(3, 0.5, 9);
    expect(drawn.from).toBeGreaterThanOrEqual(0);
    expect(Math.min(...drawn.marks.map(({ value }) => value))).toBeGreaterThanOrEqual(0);
  });

  it('runs below nought where the interval does', () => {
    expect(layout(0, -3, 3).from).toBeGreaterThan(0.15);
  });

  it.each([
    [440, null],
    [null, 590],
  ])('runs to the end of the axis where the records set no bound (%s, %s)', (low, high) => {
    const drawn = layout(512, low, high);
    expect([drawn.openLow, drawn.openHigh]).toEqual([low === null, high === null]);
    expect(drawn.openHigh ? drawn.to : drawn.from).toBe(drawn.openHigh ? 1 : 0);
    expect(drawn.value).toBeGreaterThan(0);
    expect(drawn.value).toBeLessThan(1);
  });

  it('draws nothing without any bound', () => {
    expect(layoutIntervalBar({ value: 1, low: null, high: null }, { step: 1, endStep: 1 })).toBeNull();
  });
});
