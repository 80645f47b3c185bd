import { countWords } from './task-words';

describe('words about work on records', () => {
  it('count bytes in the unit of the whole, and columns and steps by number', () => {
    expect(countWords({ stage: 'reading', done: 120e6, total: 250e6 })).toBe('120 of 250\u00a0MB');
    expect(countWords({ stage: 'reading', done: 900e3, total: 250e6 })).toBe('900\u00a0kB of 250\u00a0MB');
    expect(countWords({ stage: 'measuring', done: 12, total: 30 })).toBe('12 of 30 columns');
    expect(countWords({ stage: 'storing', done: 3, total: 9 })).toBe('');
    expect(countWords({ stage: 'reading', done: 3, total: 0 })).toBe('');
  });
});
