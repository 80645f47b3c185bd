import { exact } from './exact';

describe('a figure as it was typed', () => {
  it.each([
    [0.5, '0.5'],
    [-1234.25, '−1,234.25'],
    [30, '30'],
    [0.000001, '0.000001'],
  ])('%d', (value, text) => {
    expect(exact(value)).toBe(text);
  });
});
