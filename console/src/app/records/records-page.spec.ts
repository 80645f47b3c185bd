import { RecordsScreen } from './testing/records-screen';
import { recordSetSummary } from './testing/refits';

const PATH = '/api/record-sets';

function listOf(count: number): object {
  const items = Array.from({ length: count }, (_, index) =>
    recordSetSummary(`records${index}`, `Set ${index + 1}`, 1000 - index),
  );
  return { items, total: count };
}

describe('RecordsPage', () => {
  it('says what it is reading while it waits', async () => {
    const screen = await RecordsScreen.open('/records', 'viewer');
    expect(screen.text).toContain('Reading record sets');
    screen.call(PATH);
  });

  it('says what belongs here when there is nothing, and offers an analyst the next step', async () => {
    const screen = await RecordsScreen.open('/records', 'analyst');
    await screen.answer(PATH, { items: [], total: 0 });
    expect(screen.text).toContain('No record sets yet');
    expect(screen.page.querySelector('tb-empty-state a')?.getAttribute('href')).toBe('/records/bring-in');
  });

  it('offers nobody else what only an analyst may do', async () => {
    const screen = await RecordsScreen.open('/records', 'viewer', 'reviewer');
    await screen.answer(PATH, { items: [], total: 0 });
    expect(screen.page.querySelector('a[href="/records/bring-in"]')).toBeNull();
  });

  it('says what went wrong and reads again when asked', async () => {
    const screen = await RecordsScreen.open('/records', 'viewer');
    await screen.refuse(PATH, 503, { code: 'unavailable', detail: 'The database is busy. Try again in a minute.' });
    expect(screen.page.querySelector('[role="alert"]')?.textContent).toContain('The database is busy');
    await screen.press('Try again');
    await screen.answer(PATH, listOf(1));
    expect(screen.column(0)).toEqual(['Set 1']);
  });

  it('says how long rows are kept where a day is set, and when they were erased', async () => {
    const screen = await RecordsScreen.open('/records', 'viewer');
    const plain = recordSetSummary('records2', 'Set 2', 10);
    const erased = { ...plain, revision: { ...plain.revision, erasedAt: '2026-11-02T03:00:00Z' } };
    const kept = { ...recordSetSummary('records1', 'Set 1', 10), retainUntil: '2031-03-31' };
    await screen.answer(PATH, { items: [kept, erased, recordSetSummary('records3', 'Set 3', 10)], total: 3 });
    const told = [...screen.page.querySelectorAll('.description')].map((each) => each.textContent);
    expect(told).toEqual(['Rows kept until 31 Mar 2031, then erased', 'Rows erased on 2 November 2026']);
  });

  it('sorts by the column that is pressed', async () => {
    const screen = await RecordsScreen.open('/records', 'viewer');
    await screen.answer(PATH, listOf(3));
    screen.page.querySelector<HTMLElement>('th[mat-sort-header="rows"] [role="button"]')?.click();
    await screen.stable();
    expect(screen.column(1)).toEqual(['998', '999', '1,000']);
    expect(screen.page.querySelector('th[mat-sort-header="rows"]')?.getAttribute('aria-sort')).toBe('ascending');
  });

  it('shows 25 at a time and moves on', async () => {
    const screen = await RecordsScreen.open('/records', 'viewer');
    await screen.answer(PATH, listOf(26));
    expect(screen.column(0)).toHaveLength(25);
    await screen.press('Next');
    expect(screen.column(0)).toHaveLength(1);
    expect(screen.text).toContain('26 to 26 of 26 record sets');
  });

  it('finds a set by the words in it, and says when nothing matches', async () => {
    const screen = await RecordsScreen.open('/records', 'viewer');
    await screen.answer(PATH, listOf(12));
    await screen.type('Filter', 'set 11');
    expect(screen.column(0)).toEqual(['Set 11']);
    await screen.type('Filter', 'keel');
    expect(screen.text).toContain('Nothing matches “keel”');
  });
});
