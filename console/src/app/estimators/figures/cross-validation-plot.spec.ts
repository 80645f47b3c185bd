import { result } from '../testing/refit-labour';
import { crossValidationFrame, crossValidationPlot } from './cross-validation-plot';

describe('the cross-validation curve', () => {
  it('draws the root of the mean squared error, with the band carried through the root', () => {
    const plot = crossValidationPlot(result, 'log-lambda');
    const scale = (error: number): number => {
      // The axis runs from the first to the last tick in equal steps: two of them fix it.
      const [low, high] = [plot!.up[0], plot!.up[plot!.up.length - 1]];
      return low.at + ((error - Number(low.text)) / (Number(high.text) - Number(low.text))) * (high.at - low.at);
    };
    const least = plot!.points[1]; // λ = 0.1, the second from the left
    expect(least.height).toBeCloseTo(scale(Math.sqrt(1440)), 6);
    expect(least.low).toBeCloseTo(scale(Math.sqrt(1440 - 70)), 6);
    expect(least.high).toBeCloseTo(scale(Math.sqrt(1440 + 70)), 6);
  });

  it('marks both rules and the chosen penalty', () => {
    const marks = crossValidationPlot(result, 'log-lambda')!.marks;
    expect(marks.map((mark) => mark.kind)).toEqual(['chosen', 'minimum', 'one-standard-error']);
    expect(marks[0].at).toBeCloseTo(marks[2].at, 9);
    expect(marks[1].at).toBeLessThan(marks[0].at);
  });

  it('turns round over degrees of freedom: the stronger penalty stands on the left', () => {
    const marks = crossValidationPlot(result, 'degrees-of-freedom')!.marks;
    expect(marks[1].at).toBeGreaterThan(marks[2].at);
  });

  it('keeps inside its frame', () => {
    const plot = crossValidationPlot(result, 'log-lambda')!;
    for (const point of plot.points) {
      expect(point.at).toBeGreaterThanOrEqual(crossValidationFrame.left);
      expect(point.at).toBeLessThanOrEqual(crossValidationFrame.width - crossValidationFrame.right);
      expect(point.high).toBeGreaterThanOrEqual(crossValidationFrame.top);
    }
  });

  it('passes over a penalty of nothing on the log axis, and over points without an error', () => {
    const path = [...result.path, { ...result.path[0], lambda: 0 }, { ...result.path[0], lambda: 5, cvError: null }];
    expect(crossValidationPlot({ ...result, path }, 'log-lambda')!.points).toHaveLength(result.path.length);
  });

  it('is not drawn from fewer than two points', () => {
    expect(crossValidationPlot({ ...result, path: result.path.slice(0, 1) }, 'log-lambda')).toBeNull();
  });
});
