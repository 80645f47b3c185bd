import { pairMoments } from '../findings/robust';
import { PairSums } from './pair-sums';

describe('sums gathered block by block', () => {
  it('give the correlation of the whole, however large the offset', () => {
    const near = Float64Array.from({ length: 1000 }, (_, row) => (row % 7 === 0 ? NaN : (row * 37) % 101));
    const y = near.map((value, row) => value / 2 + ((row * 53) % 89));
    const x = near.map((value) => value + 1e9);
    const sums = new PairSums();
    for (let start = 0; start < 1000; start += 130)
      sums.addBlock(x.subarray(start, start + 130), y.subarray(start, start + 130));
    expect(sums.count).toBe(857);
    expect(sums.correlation).toBeCloseTo(pairMoments(near, y).correlation, 9);
  });

  it('give none where a column does not vary', () => {
    const sums = new PairSums();
    sums.addBlock(Float64Array.of(0.1, 0.1, 0.1), Float64Array.of(1, 2, 3));
    sums.addBlock(Float64Array.of(0.1, NaN, 0.1), Float64Array.of(1, 2, 4));
    expect(sums.correlation).toBeNull();
  });
});
