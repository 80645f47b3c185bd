import { heldOutFrame, heldOutPlot } from './held-out-plot';

const records = [
  { recorded: 100, estimate: 120 },
  { recorded: 300, estimate: 280 },
  { recorded: 210, estimate: 200 },
];

describe('held-out estimates against records', () => {
  it('puts a record above the line where it came to more than estimated', () => {
    const plot = heldOutPlot(records, 'record')!;
    const lineAt = (at: number): number => {
      const { x1, y1, x2, y2 } = plot.agreement;
      return y1 + ((at - x1) / (x2 - x1)) * (y2 - y1);
    };
    expect(plot.points[0].height).toBeGreaterThan(lineAt(plot.points[0].at));
    expect(plot.points[1].height).toBeLessThan(lineAt(plot.points[1].at));
  });

  it('lays the line level for residuals', () => {
    const plot = heldOutPlot(records, 'residual')!;
    expect(plot.agreement.y1).toBe(plot.agreement.y2);
    expect(plot.points[2].height).toBeLessThan(plot.agreement.y1);
  });

  it('keeps every point inside its frame', () => {
    for (const { at, height } of heldOutPlot(records, 'record')!.points) {
      expect(at).toBeGreaterThanOrEqual(heldOutFrame.left);
      expect(height).toBeGreaterThanOrEqual(heldOutFrame.top);
      expect(height).toBeLessThanOrEqual(heldOutFrame.height - heldOutFrame.bottom);
    }
  });

  it('is not drawn from one record', () => {
    expect(heldOutPlot(records.slice(0, 1), 'record')).toBeNull();
  });
});
