import { ComponentFixture, TestBed } from '@angular/core/testing';
import { CorrelationMap, Pair, figureOf } from './correlation-map';

describe('CorrelationMap', () => {
  async function draw(size: number): Promise<ComponentFixture<CorrelationMap>> {
    const columns = Array.from({ length: size }, (_, index) => `column ${index + 1}`);
    const correlations = columns.map((_, row) => columns.map((_column, column) => (row === column ? 1 : -0.5)));
    const fixture = TestBed.createComponent(CorrelationMap);
    fixture.componentRef.setInput('grid', { columns, correlations });
    fixture.componentRef.setInput('description', 'how they go together');
    await fixture.whenStable();
    return fixture;
  }

  const drawing = (fixture: ComponentFixture<CorrelationMap>): SVGSVGElement =>
    (fixture.nativeElement as HTMLElement).querySelector('svg') as SVGSVGElement;

  it('writes figures while there is room, and none where the squares are too many', async () => {
    expect(drawing(await draw(3)).querySelectorAll('.figure')).toHaveLength(6);
    const crowded = drawing(await draw(31));
    expect(crowded.querySelectorAll('.figure')).toHaveLength(0);
    expect(crowded.querySelectorAll('.opposite')).toHaveLength(31 * 30);
  });

  it('chooses the pair under the press, and nothing for a column with itself or beside the squares', async () => {
    const fixture = await draw(3);
    const chosen: Pair[] = [];
    fixture.componentInstance.choose.subscribe((pair) => chosen.push(pair));
    const press = (clientX: number, clientY: number): boolean =>
      drawing(fixture).dispatchEvent(new MouseEvent('click', { bubbles: true, clientX, clientY }));
    press(160, 160);
    press(20, 20);
    press(150 + 38 * 2 + 5, 160);
    expect(chosen).toEqual([{ x: 'column 3', y: 'column 1' }]);
  });

  it.each([
    [0.874, '.87'],
    [-0.32, '\u2212.32'],
    [-0.3, '\u2212.30'],
    [1, '1.00'],
    [-0.001, '.00'],
    [null, '–'],
  ])('writes a correlation of %s as %s', (correlation, figure) => {
    expect(figureOf(correlation)).toBe(figure);
  });
});
