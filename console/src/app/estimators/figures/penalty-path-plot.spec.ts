import { result } from '../testing/refit-labour';
import { penaltyPathFrame, penaltyPathPlot, spreadLabels, weightName } from './penalty-path-plot';

describe('the penalty path', () => {
  it('draws one line a weight, the largest first', () => {
    const plot = penaltyPathPlot(result)!;
    expect(plot.lines.map((line) => line.name)).toEqual(['displacement', 'length', 'hull: steel', 'hull: GRP']);
    expect(plot.leftOut).toBe(0);
  });

  it('ends each line above zero for a positive weight and below for a negative one', () => {
    const plot = penaltyPathPlot(result)!;
    expect(plot.lines[0].endAt).toBeLessThan(plot.zeroAt);
    expect(plot.lines[3].endAt).toBeGreaterThan(plot.zeroAt);
  });

  it('marks the chosen degrees of freedom between its neighbours on the path', () => {
    const plot = penaltyPathPlot(result)!;
    const usable = penaltyPathFrame.width - penaltyPathFrame.left - penaltyPathFrame.right;
    expect(plot.chosenAt).toBeCloseTo(penaltyPathFrame.left + usable * ((2.5 - 0.8) / (4.2 - 0.8)), 6);
  });

  it('leaves out a weight that is zero along the whole path', () => {
    const path = result.path.map((point) => ({ ...point, standardised: [point.standardised[0], 0, 0, 0] }));
    expect(penaltyPathPlot({ ...result, path })!.lines.map((line) => line.name)).toEqual(['length']);
  });

  it('labels nine at most and says how many lines it leaves out', () => {
    const weights = Array.from({ length: 70 }, (_, i) => ({ input: `x${i}`, value: 1, standardised: 70 - i }));
    const path = [1, 2, 3].map((df) => ({
      ...result.path[0],
      effectiveDegreesOfFreedom: df,
      standardised: weights.map((weight) => weight.standardised * df),
    }));
    const plot = penaltyPathPlot({ ...result, weights, path })!;
    expect(plot.lines.filter((line) => line.labelled)).toHaveLength(9);
    expect(plot.leftOut).toBe(10);
  });

  it('keeps labels apart and inside the frame', () => {
    const at = spreadLabels(
      [100, 101, 102, 199, 200].map((wanted, position) => ({ position, wanted })),
      [0, 200],
    );
    const heights = [...at.values()].sort((left, right) => left - right);
    for (let i = 1; i < heights.length; i += 1) expect(heights[i] - heights[i - 1]).toBeGreaterThanOrEqual(15 - 1e-9);
    expect(heights[heights.length - 1]).toBeLessThanOrEqual(200);
  });

  it('names a level or term with its input', () => {
    expect(weightName({ input: 'length', term: 'basis 2', value: 1, standardised: 1 })).toBe('length: basis 2');
  });
});
