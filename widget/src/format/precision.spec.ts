import { decimalsOf, precisionFor, roundTo } from './precision';

describe('precisionFor', () => {
  it.each([
    [{ value: 512.3781, low: 440.2, high: 590.1 }, 1, 10],
    [{ value: 512.3781, low: 472.3781, high: 552.3781 }, 1, 5],
    [{ value: 5123.781, low: 4323, high: 5923 }, 10, 100],
    [{ value: 12.34567, low: 11.9, high: 12.8 }, 0.01, 0.05],
    [{ value: 0.0512, low: 0.04, high: 0.06 }, 0.001, 0.001],
    [{ value: 1000, low: 0, high: 2000 }, 100, 100],
  ])('rounds %j to the digits that its interval deserves', (measured, step, endStep) => {
    expect(precisionFor(measured)).toEqual({ step, endStep });
  });

  it('never keeps more than two significant digits of the half-width', () => {
    for (let exponent = -6; exponent <= 6; exponent++) {
      for (const lead of [1, 1.5, 2.2, 4.9, 7.5, 9.9]) {
        const half = lead * 10 ** exponent;
        const { step, endStep } = precisionFor({ value: 3 * half, low: 2 * half, high: 4 * half });
        expect(half / step).toBeLessThan(100);
        expect(half / step).toBeGreaterThanOrEqual(10 - 1e-9);
        expect(half / endStep).toBeGreaterThanOrEqual(7 - 1e-6);
      }
    }
  });

  it('takes the distance to the only end there is', () => {
    expect(precisionFor({ value: 512, low: 440, high: null }).step).toBe(1);
  });

  it.each([
    [512.3781, 1],
    [51237.81, 100],
    [0.0123456, 0.0001],
    [0, 1],
    [-512.3781, 1],
  ])('gives three significant digits to %d where there is no interval', (value, step) => {
    expect(precisionFor({ value, low: null, high: null })).toEqual({ step, endStep: step });
    expect(precisionFor({ value, low: value, high: value }).step).toBe(step);
  });
});

describe('roundTo', () => {
  it.each([
    [512.3781, 1, 512],
    [515, 10, 520],
    [0.30000000000000004, 0.1, 0.3],
    [-0.4, 1, 0],
    [590.1, 5, 590],
    [0.123, 0.05, 0.1],
  ])('rounds %d to a multiple of %d', (value, step, expected) => {
    expect(Object.is(roundTo(value, step), expected)).toBe(true);
  });
});

describe('decimalsOf', () => {
  it.each([
    [1, 0],
    [10, 0],
    [0.1, 1],
    [0.05, 2],
    [0.001, 3],
  ])('a multiple of %d needs %d decimals', (step, decimals) => {
    expect(decimalsOf(step)).toBe(decimals);
  });
});
