import { Remembered } from './remembered';

const memory = () => new Remembered<number>(10, (weight) => weight);

describe('what is remembered', () => {
  it('is worked out once, even when asked for twice at a time', async () => {
    const known = memory();
    const work = jest.fn(() => Promise.resolve(3));
    expect(await Promise.all([known.get(['a'], work), known.get(['a'], work)])).toEqual([3, 3]);
    expect(work).toHaveBeenCalledTimes(1);
  });

  it('gives way, the least lately used first, when there is too much of it', async () => {
    const known = memory();
    const work = jest.fn(() => Promise.resolve(5));
    for (const key of ['a', 'b', 'a', 'c']) await known.get([key], work);
    expect(work).toHaveBeenCalledTimes(3);
    await known.get(['a'], work);
    expect(work).toHaveBeenCalledTimes(3);
    await known.get(['b'], work);
    expect(work).toHaveBeenCalledTimes(4);
  });

  it('is never a failure', async () => {
    const known = memory();
    await expect(known.get(['a'], () => Promise.reject(new Error('no')))).rejects.toThrow('no');
    expect(await known.get(['a'], () => Promise.resolve(1))).toBe(1);
  });
});
