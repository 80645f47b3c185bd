import type { Correlations, RecordColumn, Scatter } from '../../api/contract';
import { RecordsScreen } from '../testing/records-screen';
import { HULL, LENGTH, REVISION } from '../testing/refits';

const PATH = '/api/record-revisions/revision2';
const BEAM: RecordColumn = { ...LENGTH, name: 'Beam', position: 3 };
const DRAUGHT: RecordColumn = { ...LENGTH, name: 'Draught', position: 4 };

const FOUND: Correlations = {
  columns: ['Beam', 'Length overall', 'Draught'],
  correlations: [
    [1, 0.874, -0.3],
    [0.874, 1, null],
    [-0.3, null, 1],
  ],
  counts: [
    [2002, 1990, 1980],
    [1990, 1990, 1970],
    [1980, 1970, 1980],
  ],
  leftOut: [],
};

const SCATTER: Scatter = {
  x: 'Beam',
  y: 'Length overall',
  total: 24_310,
  points: [
    { x: 3.2, y: 10.4, row: 18 },
    { x: 4.1, y: 13.9, row: 5 },
  ],
};

async function openWith(...columns: RecordColumn[]): Promise<RecordsScreen> {
  const screen = await RecordsScreen.open('/records/revisions/revision2', 'viewer');
  await screen.answer(PATH, { ...REVISION, columns });
  return screen;
}

async function choose(screen: RecordsScreen, label: string, name: string): Promise<void> {
  const control = screen.control(label);
  control.value = name;
  control.dispatchEvent(new Event('change'));
  await screen.stable();
}

describe('Pairs of columns', () => {
  const asked = 'Show how the columns go together';

  it('are not to be had from fewer than two columns of numbers or dates', async () => {
    const screen = await openWith(LENGTH, HULL);
    expect(screen.text).toContain('Only one column holds numbers or dates, so there is no pair to look at.');
    expect(screen.page.querySelector('tb-pairs-section button')).toBeNull();
  });

  it('are worked out only when asked for', async () => {
    const screen = await openWith(LENGTH, BEAM, DRAUGHT);
    screen.http.expectNone((request) => request.url === `${PATH}/correlations`);
    await screen.press(asked);
    expect(screen.text).toContain('Working out how the columns go together');
    expect(document.activeElement?.textContent).toContain('Working out');
    screen.call(`${PATH}/correlations`);
  });

  it('say what went wrong and are asked for again', async () => {
    const screen = await openWith(LENGTH, BEAM);
    await screen.press(asked);
    await screen.refuse(`${PATH}/correlations`, 503, { code: 'unavailable', detail: 'Try again in a minute.' });
    expect(screen.page.querySelector('tb-pairs-section [role="alert"]')?.textContent).toContain(
      'Try again in a minute.',
    );
    await screen.press('Try again');
    await screen.answer(`${PATH}/correlations`, FOUND);
    expect(screen.page.querySelector('tb-correlation-map')).not.toBeNull();
  });

  it('are drawn as figures in the service’s order, opposite ones round', async () => {
    const screen = await openWith(LENGTH, BEAM, DRAUGHT);
    await screen.press(asked);
    await screen.answer(`${PATH}/correlations`, FOUND);
    const map = screen.page.querySelector('tb-correlation-map') as HTMLElement;
    expect([...map.querySelectorAll('.name[text-anchor="end"]')].map((name) => name.textContent)).toEqual(
      FOUND.columns,
    );
    expect([...map.querySelectorAll('.figure')].map((figure) => figure.textContent?.trim())).toEqual([
      '.87',
      '−.30',
      '.87',
      '–',
      '−.30',
      '–',
    ]);
    expect(map.querySelectorAll('.opposite')).toHaveLength(2);
    expect(map.querySelector('desc')?.textContent).toBe(
      '3 columns; the two that go together most closely are Beam and Length overall, 0.87.',
    );
  });

  it('can be read as a table, the closest first, and chosen there', async () => {
    const screen = await openWith(LENGTH, BEAM, DRAUGHT);
    await screen.press(asked);
    await screen.answer(`${PATH}/correlations`, FOUND);
    (screen.page.querySelector('tb-pairs-section tb-figure-frame button') as HTMLElement).click();
    await screen.stable();
    const rows = [...screen.page.querySelectorAll('tb-pairs-table tbody tr')];
    expect(rows.map((row) => row.children[2].textContent)).toEqual([
      '0.87',
      '−0.30',
      'none: one of them does not vary',
    ]);
    rows[0].querySelector('button')?.click();
    await screen.stable();
    const call = screen.call(`${PATH}/scatter`);
    expect(call.request.params.toString()).toBe('x=Beam&y=Length%20overall');
  });

  it('open from a press on the map to the scatter of the two', async () => {
    const screen = await openWith(LENGTH, BEAM, DRAUGHT);
    await screen.press(asked);
    await screen.answer(`${PATH}/correlations`, FOUND);
    const drawing = screen.page.querySelector('tb-correlation-map svg') as SVGSVGElement;
    // jsdom lays nothing out, so the drawing stands at its own scale from the corner; cells are 38 wide after 150.
    drawing.dispatchEvent(new MouseEvent('click', { bubbles: true, clientX: 150 + 10, clientY: 150 + 38 + 10 }));
    await screen.stable();
    const call = screen.call(`${PATH}/scatter`);
    expect([call.request.params.get('x'), call.request.params.get('y')]).toEqual(['Beam', 'Length overall']);
  });

  it('name the columns that the map leaves out', async () => {
    const screen = await openWith(LENGTH, BEAM, DRAUGHT);
    await screen.press(asked);
    await screen.answer(`${PATH}/correlations`, { ...FOUND, leftOut: ['Ballast'] });
    expect(screen.text).toContain('Not in it: Ballast.');
  });

  it('are chosen freely; the scatter says how many rows it draws and leads from a point to its row', async () => {
    const screen = await openWith(LENGTH, BEAM, DRAUGHT);
    await choose(screen, 'Across', 'Beam');
    await choose(screen, 'Upward', 'Length overall');
    expect(screen.text).toContain('Reading the two columns');
    await screen.answer(`${PATH}/scatter`, SCATTER);
    expect(screen.text).toContain('2 of 24,310 rows, drawn by lot.');
    const drawing = screen.page.querySelector('tb-scatter-plot svg') as SVGSVGElement;
    expect(drawing.getAttribute('aria-label')).toContain('Length overall, m against Beam, m');
    const [, second] = [...drawing.querySelectorAll('circle')];
    const [clientX, clientY] = [Number(second.getAttribute('cx')) + 3, Number(second.getAttribute('cy')) - 3];
    drawing.dispatchEvent(new MouseEvent('click', { bubbles: true, clientX, clientY }));
    await screen.stable();
    const link = screen.page.querySelector('tb-scatter-figure a');
    expect(link?.textContent).toBe('show row 5');
    expect(link?.getAttribute('href')).toBe('/records/revisions/revision2?numbers=5#rows');
  });

  it('have no scatter where no row holds both, and say so', async () => {
    const screen = await openWith(LENGTH, BEAM);
    await choose(screen, 'Across', 'Beam');
    await choose(screen, 'Upward', 'Length overall');
    await screen.answer(`${PATH}/scatter`, { ...SCATTER, total: 0, points: [] });
    expect(screen.text).toContain('No row has a value in both Beam and Length overall.');
  });

  it('are two different columns', async () => {
    const screen = await openWith(LENGTH, BEAM);
    await choose(screen, 'Across', 'Beam');
    await choose(screen, 'Upward', 'Beam');
    expect(screen.text).toContain('Choose two different columns');
    screen.http.expectNone((request) => request.url === `${PATH}/scatter`);
  });
});
