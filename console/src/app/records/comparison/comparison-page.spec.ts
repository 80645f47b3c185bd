import type { RevisionComparison } from '../../api/contract';
import { RecordsScreen } from '../testing/records-screen';
import { HULL, LENGTH, RECORD_SET, REVISION, revisionSummary } from '../testing/refits';

const PATH = '/api/record-revisions/revision2';
const COMPARISON = `${PATH}/comparison`;
const ADDRESS = '/records/revisions/revision2/compare';

const FOUND: RevisionComparison = {
  from: revisionSummary(1),
  to: revisionSummary(2),
  key: 'Job',
  keys: ['Job', 'Berth'],
  rows: { added: 2, removed: 1, changed: 120, unchanged: 1880 },
  changes: [
    {
      fromRow: 3,
      toRow: 2,
      cells: [
        { column: 'Hull material', from: 'Wood', to: 'wood' },
        { column: 'Length overall', from: 12_100, to: null },
      ],
    },
  ],
  added: [2001, 2002],
  removed: [17],
  columns: [
    { name: 'Job', formerName: null, state: 'same', changedCount: 0, from: HULL, to: HULL, shape: null },
    {
      name: 'Length overall',
      formerName: null,
      state: 'changed',
      changedCount: 12,
      from: { ...LENGTH, mean: 13.2, missingCount: 0 },
      to: LENGTH,
      shape: { edges: [5, 10, 25], levels: [], from: [900, 1101], to: [900, 1090] },
    },
    {
      name: 'Hull material',
      formerName: 'Hull',
      state: 'changed',
      changedCount: 108,
      from: HULL,
      to: HULL,
      shape: { edges: [], levels: ['GRP', 'wood'], from: [1500, 192], to: [1500, 300] },
    },
    { name: 'Yard', formerName: null, state: 'added', changedCount: null, from: null, to: HULL, shape: null },
  ],
};

async function openReady(found = FOUND): Promise<RecordsScreen> {
  const screen = await RecordsScreen.open(ADDRESS, 'viewer');
  await screen.answer(PATH, REVISION);
  await screen.answer('/api/record-sets/records1', RECORD_SET);
  await screen.answer(COMPARISON, found);
  return screen;
}

async function choose(screen: RecordsScreen, label: string, value: string): Promise<void> {
  const control = screen.control(label);
  control.value = value;
  control.dispatchEvent(new Event('change'));
  await screen.stable();
}

describe('ComparisonPage', () => {
  it('says what it is reading, then what it compares', async () => {
    const screen = await RecordsScreen.open(ADDRESS, 'viewer');
    expect(screen.text).toContain('Reading the revisions');
    await screen.answer(PATH, REVISION);
    await screen.answer('/api/record-sets/records1', RECORD_SET);
    expect(screen.text).toContain('Comparing the two revisions');
    screen.call(COMPARISON);
  });

  it('says what went wrong with the revision, and with the comparison alone', async () => {
    const screen = await RecordsScreen.open(ADDRESS, 'viewer');
    await screen.refuse(PATH, 503, { code: 'unavailable', detail: 'Try again in a minute.' });
    await screen.press('Try again');
    await screen.answer(PATH, REVISION);
    await screen.answer('/api/record-sets/records1', RECORD_SET);
    await screen.refuse(COMPARISON, 410, { code: 'records-erased', detail: 'The rows of revision 1 were erased.' });
    expect(screen.page.querySelector('[role="alert"]')?.textContent).toContain('The rows of revision 1 were erased.');
    expect(screen.control('Compare with')).not.toBeNull();
  });

  it('takes the revision before unless another is named, and lets a key be found', async () => {
    const screen = await RecordsScreen.open(ADDRESS, 'viewer');
    await screen.answer(PATH, REVISION);
    await screen.answer('/api/record-sets/records1', RECORD_SET);
    const call = await screen.answer(COMPARISON, FOUND);
    expect(call.request.params.toString()).toBe('with=revision1');
    expect(screen.control('Match rows by').value).toBe('Job');
  });

  it('takes the revision that it is based on before its forerunner', async () => {
    const screen = await RecordsScreen.open('/records/revisions/revision3/compare', 'viewer');
    const third = { ...revisionSummary(3), origin: 'mended' as const, basedOn: { id: 'revision1', number: 1 } };
    await screen.answer('/api/record-revisions/revision3', { ...REVISION, ...third });
    await screen.answer('/api/record-sets/records1', { ...RECORD_SET, revisions: [...RECORD_SET.revisions, third] });
    expect(screen.call('/api/record-revisions/revision3/comparison').request.params.get('with')).toBe('revision1');
  });

  it('has nothing to compare with where no other revision has rows', async () => {
    const screen = await RecordsScreen.open(ADDRESS, 'viewer');
    await screen.answer(PATH, REVISION);
    const erased = { ...revisionSummary(1), erasedAt: '2026-11-02T03:00:00Z' };
    await screen.answer('/api/record-sets/records1', { ...RECORD_SET, revisions: [erased, revisionSummary(2)] });
    expect(screen.text).toContain('Nothing to compare with');
    screen.http.expectNone((request) => request.url === COMPARISON);
  });

  it('matches rows by another column, or by their order, as the address says', async () => {
    const screen = await openReady();
    await choose(screen, 'Match rows by', 'Berth');
    const byBerth = await screen.answer(COMPARISON, { ...FOUND, key: 'Berth' });
    expect(byBerth.request.params.toString()).toBe('with=revision1&key=Berth');
    await choose(screen, 'Match rows by', '');
    const byOrder = await screen.answer(COMPARISON, { ...FOUND, key: null });
    expect(byOrder.request.params.get('key')).toBe('');
    expect(screen.text).toContain('Rows were matched by their order, as you asked.');
  });

  it('says so when no column names the rows', async () => {
    const screen = await openReady({ ...FOUND, key: null, keys: [] });
    expect(screen.text).toContain('no column names them in both revisions without gaps and repetitions');
  });

  it('counts the rows in words', async () => {
    const screen = await openReady();
    expect(screen.text).toContain('2 rows added, 1 row removed, 120 rows changed and 1,880 rows unchanged.');
  });

  it('shows each changed cell from what to what, with the rows in both revisions', async () => {
    const screen = await openReady();
    expect(screen.text).toContain('The first 1 of 120 rows that changed, cell by cell.');
    const rows = [...screen.page.querySelectorAll('tb-changed-cells tbody tr')];
    expect(rows.map((row) => [...row.children].slice(2).map((cell) => cell.textContent?.trim()))).toEqual([
      ['Hull material', 'Wood', 'wood'],
      ['Length overall', '12,100', 'missing'],
    ]);
    expect([...rows[0].querySelectorAll('a')].map((link) => link.getAttribute('href'))).toEqual([
      '/records/revisions/revision1?numbers=3#rows',
      '/records/revisions/revision2?numbers=2#rows',
    ]);
  });

  it('leads to rows that only one revision has, in that revision', async () => {
    const screen = await openReady();
    const links = [...screen.page.querySelectorAll('tb-rows-on-one-side a.tb-plain-button')];
    expect(
      links.map((link) => [link.textContent?.trim(), decodeURIComponent(link.getAttribute('href') ?? '')]),
    ).toEqual([
      ['Show 2 rows in revision 2', '/records/revisions/revision2?numbers=2001,2002#rows'],
      ['Show 1 row in revision 1', '/records/revisions/revision1?numbers=17#rows'],
    ]);
  });

  it('lists columns that differ first, with their state and what they were called', async () => {
    const screen = await openReady();
    const rows = [...screen.page.querySelectorAll('tb-compared-columns tbody tr')];
    const said = (cell: Element): string => (cell.textContent ?? '').replace(/\s+/g, ' ').trim();
    expect(rows.map((row) => [said(row.children[0]), said(row.children[1])])).toEqual([
      ['Length overall', 'changed'],
      ['Hull material Hull in revision 1', 'changed'],
      ['Yard', 'added'],
      ['Job', 'same'],
    ]);
  });

  it('sets the figures and both distributions of a column side by side', async () => {
    const screen = await openReady();
    await screen.press('Length overall');
    const figures = [...screen.page.querySelectorAll('tb-compared-column tbody tr')].map((row) =>
      [...row.children].map((cell) => cell.textContent?.replace(/\u00a0/g, ' ')),
    );
    expect(figures).toEqual([
      ['Missing', 'none', '12 (1%)'],
      ['Mean', '13.2 m', '11.8 m'],
      ['Median', '11.6 m', '11.6 m'],
      ['Range', '5.2 to 24.6 m', '5.2 to 24.6 m'],
    ]);
    const words = screen.page.querySelector('tb-compared-column desc')?.textContent?.replace(/\u00a0/g, ' ');
    expect(words).toBe(
      'Between 5 m and 25 m: 2,001 rows of revision 1 below the line, 1,990 rows of revision 2 above it.',
    );
    await screen.press('Hull material');
    const levels = [...screen.page.querySelectorAll('tb-compared-column table:last-of-type tbody tr')].at(-1);
    expect(levels?.textContent).toContain('192 (10%)');
  });
});
