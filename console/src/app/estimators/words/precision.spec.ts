import { decimalsOf, figureToStep, roundTo, signed, significant, stepOf, withUnit } from './precision';

describe('figures with the digits they deserve', () => {
  it.each([
    [75, 1],
    [150, 10],
    [40, 1],
    [0.34, 0.01],
    [2200, 100],
    [1, 0.1],
  ])('a spread of %d earns steps of %d', (spread, step) => {
    expect(stepOf(spread)).toBeCloseTo(step, 12);
  });

  it('never sets 512.3781 beside a spread of 40', () => {
    expect(figureToStep(512.3781, stepOf(40))).toBe('512');
  });

  it('rounds the ends of an interval 150 wide to tens', () => {
    expect(figureToStep(437.61, stepOf(150))).toBe('440');
    expect(figureToStep(588.4, stepOf(150))).toBe('590');
  });

  it('keeps trailing zeros that the step earns', () => {
    expect(figureToStep(3.4, 0.01)).toBe('3.40');
    expect(decimalsOf(0.001)).toBe(3);
  });

  it('leaves a figure alone when nothing says how far it is off', () => {
    expect(roundTo(12.3456, stepOf(0))).toBe(12.3456);
    expect(stepOf(Number.NaN)).toBe(0);
  });

  it('never shows minus zero', () => {
    expect(figureToStep(-0.2, 1)).toBe('0');
  });

  it('writes significant digits and a true minus sign', () => {
    expect(significant(0.012345)).toBe('0.0123');
    expect(significant(-1234.5)).toBe('−1,235');
    expect(significant(0.0000123)).toBe('1.23e−5');
    expect(significant(0)).toBe('0');
  });

  it('writes the sign of all but zero', () => {
    expect(signed('12')).toBe('+12');
    expect(signed('−12')).toBe('−12');
    expect(signed('0.0')).toBe('0.0');
  });

  it('ties a figure to its unit', () => {
    expect(withUnit('512', 'h')).toBe('512\u00a0h');
    expect(withUnit('512', '')).toBe('512');
  });
});
