import { scatterSample } from './scatter-sample';

describe('the points of a scatter', () => {
  it('are all rows where both are present, while they are few', () => {
    expect(scatterSample(Float64Array.of(1, NaN, 3), Float64Array.of(4, 5, 6))).toEqual({
      total: 2,
      points: [
        { x: 1, y: 4, row: 1 },
        { x: 3, y: 6, row: 3 },
      ],
    });
  });

  it('are the same 2,000 different rows every time when there are more, from the whole length', () => {
    const x = Float64Array.from({ length: 50_000 }, (_, row) => (row % 10 === 0 ? NaN : row));
    const { total, points } = scatterSample(x, x);
    expect(total).toBe(45_000);
    expect(new Set(points.map((point) => point.row)).size).toBe(2000);
    expect(points.every((point) => point.x === point.row - 1)).toBe(true);
    // The mean of 2,000 uniform draws has a standard error of 323 rows: five of them either side.
    const mean = points.reduce((sum, point) => sum + point.row, 0) / 2000;
    expect(Math.abs(mean - 25_000)).toBeLessThan(1650);
    expect(scatterSample(x, x).points).toEqual(points);
  });
});
