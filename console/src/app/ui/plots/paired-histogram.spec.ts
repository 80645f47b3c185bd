import { TestBed } from '@angular/core/testing';
import { PairedCounts, PairedHistogram } from './paired-histogram';

describe('PairedHistogram', () => {
  async function heights(counts: PairedCounts): Promise<{ from: number[]; to: number[] }> {
    const fixture = TestBed.createComponent(PairedHistogram);
    const inputs = { counts, label: 'Draught', fromName: 'revision 1', toName: 'revision 2' };
    Object.entries(inputs).forEach(([name, value]) => fixture.componentRef.setInput(name, value));
    await fixture.whenStable();
    const bars = (side: string): number[] =>
      [...(fixture.nativeElement as HTMLElement).querySelectorAll(`rect.${side}`)].map((bar) =>
        Number(bar.getAttribute('height')),
      );
    return { from: bars('from'), to: bars('to') };
  }

  it('draws shares, so that a revision with twice the rows of the same shape looks the same', async () => {
    const { from, to } = await heights({ edges: [0, 1, 2], from: [10, 30], to: [20, 60] });
    expect(from).toEqual(to);
  });

  it('measures both sides alike, the fullest bar of either filling its half', async () => {
    const { from, to } = await heights({ edges: [0, 1, 2], from: [5, 5], to: [10, 0] });
    expect(to).toEqual([60, 0]);
    expect(from).toEqual([30, 30]);
  });

  it('keeps a single row visible, and a side without rows empty', async () => {
    const { from, to } = await heights({ edges: [0, 1, 2], from: [0, 0], to: [100_000, 1] });
    expect(from).toEqual([0, 0]);
    expect(to[1]).toBe(1);
  });
});
