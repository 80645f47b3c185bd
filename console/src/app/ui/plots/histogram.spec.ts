import { ComponentFixture, TestBed } from '@angular/core/testing';
import { Histogram } from './histogram';

describe('Histogram', () => {
  async function draw(
    edges: number[],
    counts: number[],
    inputs: Record<string, unknown> = {},
  ): Promise<ComponentFixture<Histogram>> {
    const fixture = TestBed.createComponent(Histogram);
    Object.entries({ counts: { edges, counts }, label: 'Displacement', ...inputs }).forEach(([name, value]) =>
      fixture.componentRef.setInput(name, value),
    );
    await fixture.whenStable();
    return fixture;
  }

  const heights = (fixture: ComponentFixture<Histogram>): number[] =>
    [...(fixture.nativeElement as HTMLElement).querySelectorAll('rect')].map((bar) =>
      Number(bar.getAttribute('height')),
    );

  it('makes area the share, so that a wide bar does not look fuller than it is', async () => {
    const [narrow, wide] = heights(await draw([0, 1, 3], [10, 10]));
    expect(wide).toBeCloseTo(narrow / 2);
  });

  it('keeps a single row visible beside thousands, and draws nothing for none', async () => {
    const [, one, none] = heights(await draw([0, 1, 2, 3], [100_000, 1, 0]));
    expect(one).toBeGreaterThanOrEqual(1);
    expect(none).toBe(0);
  });

  it('says in words what it shows', async () => {
    const fixture = await draw([0, 5, 10], [3, 9], { unit: 't' });
    const text = (fixture.nativeElement as HTMLElement).querySelector('desc')?.textContent?.replace(/\u00a0/g, ' ');
    expect(text).toBe('12 rows between 0 t and 10 t; the fullest bar, 5 t to 10 t, holds 9 rows.');
  });

  it('writes the ends of a date column as days', async () => {
    const fixture = await draw([0, 20_760], [4], { dates: true });
    expect((fixture.nativeElement as HTMLElement).querySelector('.ends')?.textContent).toContain('3 Nov 2026');
  });

  it('draws a column that holds one value only', async () => {
    const fixture = await draw([7, 7], [12]);
    expect(heights(fixture).every((height) => Number.isFinite(height))).toBe(true);
  });
});
