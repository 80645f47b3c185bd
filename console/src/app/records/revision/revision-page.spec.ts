import { RecordsScreen } from '../testing/records-screen';
import { LENGTH, REVISION, ROWS } from '../testing/refits';

const PATH = '/api/record-revisions/revision2';
const ROWS_PATH = `${PATH}/rows`;

describe('RevisionPage', () => {
  async function openReady(...roles: Parameters<typeof RecordsScreen.open>[1][]): Promise<RecordsScreen> {
    const screen = await RecordsScreen.open('/records/revisions/revision2', ...roles);
    await screen.answer(PATH, REVISION);
    await screen.answer(ROWS_PATH, ROWS);
    return screen;
  }

  it('says what it is reading while it waits', async () => {
    const screen = await RecordsScreen.open('/records/revisions/revision2', 'viewer');
    expect(screen.text).toContain('Reading the revision');
    screen.call(PATH);
  });

  it('says what went wrong', async () => {
    const screen = await RecordsScreen.open('/records/revisions/revision2', 'viewer');
    await screen.refuse(PATH, 404, { code: 'not-found', detail: 'Nothing is kept at this address.' });
    expect(screen.page.querySelector('[role="alert"]')?.textContent).toContain('Nothing is kept at this address.');
  });

  it('tells of each column its kind, unit, gaps, range and mean, with honest digits', async () => {
    const screen = await openReady('viewer');
    const cells = [...screen.page.querySelectorAll('tb-columns-table tbody tr')].map((row) =>
      [...row.children].slice(0, 7).map((cell) => cell.textContent?.trim()),
    );
    expect(cells).toEqual([
      ['Length overall', 'Number', 'm', '12 (1%)', '312', '5.2 to 24.6', '11.8'],
      ['Finished', 'Date', '–', 'none', '312', '15 Oct 2020 to 14 Oct 2026', '–'],
      ['Hull material', 'Category', '–', '2 (under 1%)', '4', '–', '–'],
    ]);
  });

  it('draws the shape of each column and says it in words', async () => {
    const screen = await openReady('viewer');
    const svg = screen.page.querySelector('tb-columns-table svg[role="img"]');
    expect(svg?.querySelector('title')?.textContent).toBe('Length overall');
    expect(svg?.querySelector('desc')?.textContent).toContain('1,990 rows between');
    expect(screen.page.querySelector('tb-level-bars')?.textContent).toContain(
      'GRP 75%, wood 15%, steel 8% and 1 other',
    );
  });

  it('opens a column to its figures, which can be read as a table', async () => {
    const screen = await openReady('viewer');
    await screen.press('Length overall');
    expect(screen.button('Length overall').getAttribute('aria-expanded')).toBe('true');
    expect(screen.text).toContain('Lower quartileRows up to 9.4 m');
    expect(screen.text).toContain(
      '3 readings lie further than 5 scaled median absolute deviations from the median: below 2.1 m or above 21.1 m.',
    );
    await screen.press('Show as table');
    const firstBin = screen.page.querySelector('figure tbody tr');
    expect([...(firstBin?.children ?? [])].map((cell) => cell.textContent?.trim())).toEqual(['5', '10', '900']);
  });

  it('leads from every figure of a column to the rows behind it', async () => {
    const screen = await openReady('viewer');
    await screen.press('Length overall');
    const conditions = [...screen.page.querySelectorAll('tb-column-detail a')].map((link) =>
      new URL(link.getAttribute('href') ?? '', 'http://desk.example').searchParams.get('where'),
    );
    expect(conditions).toEqual([
      '[Length overall] is missing',
      '[Length overall] = 5.2',
      '[Length overall] = 24.6',
      '[Length overall] < 2.1 or [Length overall] > 21.1',
      '[Length overall] <= 9.4',
      '[Length overall] <= 11.6',
      '[Length overall] <= 14.1',
      '[Length overall] >= 5 and [Length overall] < 10',
      '[Length overall] >= 10 and [Length overall] <= 25',
    ]);
  });

  it('leads from a level to its rows', async () => {
    const screen = await openReady('viewer');
    await screen.press('Hull material');
    const hrefs = [...screen.page.querySelectorAll('tb-column-detail table a')].map((link) =>
      decodeURIComponent(link.getAttribute('href') ?? ''),
    );
    expect(hrefs[1]).toBe('/records/revisions/revision2?where=[Hull material] = "wood"#rows');
  });

  it('says how many cells were not readable as the kind of their column', async () => {
    const screen = await RecordsScreen.open('/records/revisions/revision2', 'viewer');
    const reading = { ...REVISION.reading, unreadable: [{ column: 'Length overall', count: 4 }] };
    await screen.answer(PATH, { ...REVISION, reading });
    await screen.press('Length overall');
    expect(screen.text).toContain('4 cells of the file were not readable as a number and count as missing.');
    screen.call(ROWS_PATH);
  });

  it('says where the revision came from', async () => {
    const screen = await RecordsScreen.open('/records/revisions/revision2', 'viewer');
    await screen.answer(PATH, { ...REVISION, origin: 'appended', basedOn: { id: 'revision1', number: 1 } });
    expect(screen.text).toContain('refits-2.csv appended to revision 1 by Ines Caldwell');
    screen.call(ROWS_PATH);
  });

  it('says what is left once the rows were erased, and asks for none', async () => {
    const screen = await RecordsScreen.open('/records/revisions/revision2', 'analyst');
    await screen.answer(PATH, { ...REVISION, erasedAt: '2026-11-02T03:00:00Z' });
    expect(screen.text).toContain('The rows were erased on 2 November 2026');
    expect(screen.page.querySelector('tb-rows-table, tb-pairs-section, tb-findings-list, tb-start-fit')).toBeNull();
    expect(screen.page.querySelector('a[download]')).toBeNull();
    await screen.press('Length overall');
    expect(screen.page.querySelector('tb-column-detail a')).toBeNull();
  });

  it('says why there is no original file to download', async () => {
    const screen = await RecordsScreen.open('/records/revisions/revision2', 'viewer');
    const reading = { ...REVISION.reading, setAside: ['Owner'] };
    await screen.answer(PATH, { ...REVISION, originalKept: false, reading });
    expect(screen.page.querySelector('a[download]')).toBeNull();
    expect(screen.text).toContain('Not kept, because columns of it were set aside before anything was stored.');
    expect(screen.text).toContain('Never storedOwner');
    screen.call(ROWS_PATH);
  });

  it('shows rows with the gaps named and the figures lined up', async () => {
    const screen = await openReady('viewer');
    const cells = [...screen.page.querySelectorAll('tb-rows-table tbody tr')].map((row) =>
      [...row.children].map((cell) => cell.textContent?.trim()),
    );
    expect(cells).toEqual([
      ['1', '12.25', '15 Oct 2020', 'GRP'],
      ['2', '9.00', '22 Oct 2020', 'missing'],
    ]);
  });

  it('writes a unit beside a column only where its name does not say it', async () => {
    const screen = await RecordsScreen.open('/records/revisions/revision2', 'viewer');
    const named = { ...LENGTH, name: 'draught (m)' };
    await screen.answer(PATH, { ...REVISION, columns: [LENGTH, named] });
    await screen.answer(ROWS_PATH, {
      total: 1,
      offset: 0,
      columns: [LENGTH.name, named.name],
      numbers: [1],
      rows: [[12, 2]],
    });
    const heads = [...screen.page.querySelectorAll('tb-rows-table th[scope="col"]')].map((head) =>
      head.textContent?.trim().replace(/\s+/g, ' '),
    );
    expect(heads).toEqual(['Row', 'Length overall m', 'draught (m)']);
  });

  it('asks for the next page of rows', async () => {
    const screen = await openReady('viewer');
    await screen.press('Next');
    const call = screen.call(ROWS_PATH);
    expect(call.request.params.toString()).toBe('limit=25&offset=25');
  });

  it('lets the rows fail without taking the columns along', async () => {
    const screen = await RecordsScreen.open('/records/revisions/revision2', 'viewer');
    await screen.answer(PATH, REVISION);
    await screen.refuse(ROWS_PATH, 503, { code: 'unavailable', detail: 'Try again in a minute.' });
    expect(screen.page.querySelector('tb-rows-table [role="alert"]')).not.toBeNull();
    expect(screen.page.querySelector('tb-columns-table')).not.toBeNull();
  });

  it('gives the checksum and the way to the file as it was brought in', async () => {
    const screen = await openReady('viewer');
    expect(screen.text).toContain(REVISION.sha256);
    const link = screen.page.querySelector('a[download]');
    expect(link?.getAttribute('href')).toBe('/api/record-revisions/revision2/original');
    expect(screen.text).toContain('UTF-8, separated by semicolon, decimal comma');
  });

  it('leads an analyst to a fit of an estimator on these records', async () => {
    const screen = await openReady('analyst');
    await screen.answer('/api/estimators', {
      items: [{ slug: 'refit-labour', name: 'Refit labour', targetName: 'Labour', unit: 'h' }],
      total: 1,
    });
    const link = screen.page.querySelector('tb-start-fit a');
    expect(link?.getAttribute('href')).toBe('/estimators/refit-labour/new-fit?fromSet=records1&fromRevision=revision2');
  });

  it('sends an analyst without an estimator to name one', async () => {
    const screen = await openReady('analyst');
    await screen.answer('/api/estimators', { items: [], total: 0 });
    expect(screen.text).toContain('No estimator to fit for yet');
  });
});
