import { TestBed } from '@angular/core/testing';
import { Router } from '@angular/router';
import type { Finding } from '../../api/contract';
import { RecordsScreen } from '../testing/records-screen';
import { REVISION } from '../testing/refits';

const PATH = '/api/record-revisions/revision2';
const FINDINGS_PATH = `${PATH}/findings`;

const MIX_UP: Finding = {
  kind: 'unit-mix-up',
  columns: ['Length overall'],
  message: '12 rows of Length overall are about 3.2808 times larger than the rest leads to expect.',
  remedy: 'Look at the rows; where the unit was wrong, divide by 3.2808.',
  rowCount: 12,
  rows: [3, 14, 25, 36, 47, 58, 69, 80, 91, 102, 1113, 1124],
  where: null,
  steps: [],
};

const ALIKE: Finding = {
  kind: 'columns-alike',
  columns: ['Length overall', 'Beam'],
  message: 'Length overall and Beam say nearly the same.',
  remedy: 'Use one of the two as an input.',
  rowCount: null,
  rows: [],
  where: null,
  steps: [],
};

describe('FindingsList', () => {
  async function openPage(): Promise<RecordsScreen> {
    const screen = await RecordsScreen.open('/records/revisions/revision2', 'viewer');
    await screen.answer(PATH, REVISION);
    return screen;
  }

  async function openWith(...items: Finding[]): Promise<RecordsScreen> {
    const screen = await openPage();
    await screen.answer(FINDINGS_PATH, { revisionId: 'revision2', target: null, items });
    return screen;
  }

  const section = (screen: RecordsScreen): HTMLElement => screen.page.querySelector('#findings') as HTMLElement;
  const textOf = (screen: RecordsScreen): string => (section(screen).textContent ?? '').replace(/\s+/g, ' ');
  const fact = (screen: RecordsScreen, name: string): string | undefined =>
    [...section(screen).querySelectorAll('dt')]
      .find((term) => term.textContent === name)
      ?.nextElementSibling?.textContent?.replace(/\s+/g, ' ')
      .trim();

  it('stands after the columns and before the rows', async () => {
    const screen = await openWith();
    const heads = [...screen.page.querySelectorAll('section > .head h2')].map((head) => head.textContent);
    const stands = ['Columns', 'Findings', 'Rows'].map((heading) => heads.indexOf(heading));
    expect(stands).toEqual([...stands].sort((a, b) => a - b));
    expect(stands).not.toContain(-1);
  });

  it('says that it is looking while it waits', async () => {
    const screen = await openPage();
    expect(textOf(screen)).toContain('Looking through the records. A large revision can take a minute.');
    screen.call(FINDINGS_PATH);
  });

  it('breaks the search off when the page is left', async () => {
    const screen = await openPage();
    const call = screen.call(FINDINGS_PATH);
    await TestBed.inject(Router).navigateByUrl('/elsewhere');
    expect(call.cancelled).toBe(true);
  });

  it('says quietly that nothing was found', async () => {
    const screen = await openWith();
    expect(textOf(screen)).toContain('Nothing found');
    expect(section(screen).querySelector('li')).toBeNull();
  });

  it('says what went wrong, and looks again when asked', async () => {
    const screen = await openPage();
    await screen.refuse(FINDINGS_PATH, 503, { code: 'unavailable', detail: 'Try again in a minute.' });
    expect(section(screen).querySelector('[role="alert"]')?.textContent).toContain('Try again in a minute.');
    expect(screen.page.querySelector('tb-columns-table')).not.toBeNull();
    await screen.press('Try again');
    await screen.answer(FINDINGS_PATH, { revisionId: 'revision2', target: null, items: [ALIKE] });
    expect(textOf(screen)).toContain('1 finding to look at');
  });

  it('gives each finding its name, words, columns and remedy', async () => {
    const screen = await openWith(MIX_UP, ALIKE);
    expect(textOf(screen)).toContain('2 findings to look at');
    const names = [...section(screen).querySelectorAll('li h3')].map((head) => head.textContent);
    expect(names).toEqual(['Units mixed up', 'Columns alike']);
    expect(textOf(screen)).toContain(MIX_UP.message);
    expect(fact(screen, 'Column')).toBe('Length overall');
    expect(fact(screen, 'Columns')).toBe('Length overall, Beam');
    expect(fact(screen, 'Proposed')).toBe(MIX_UP.remedy);
  });

  it('leaves the rows out where a finding concerns columns as a whole', async () => {
    const screen = await openWith(ALIKE);
    expect(fact(screen, 'Rows')).toBeUndefined();
  });

  it('shows ten row numbers, and the others on demand', async () => {
    const screen = await openWith(MIX_UP);
    expect(fact(screen, 'Rows')).toMatch(/^3, 14, 25, 36, 47, 58, 69, 80, 91, 102 Show 2 more.* Look at them/);
    await screen.press('Show 2 more');
    expect(screen.button('Show fewer').getAttribute('aria-expanded')).toBe('true');
    expect(fact(screen, 'Rows')).toContain('102, 1113, 1124');
  });

  it('says where the service lists only the first of the rows', async () => {
    const screen = await openWith({ ...MIX_UP, rowCount: 1240 });
    expect(fact(screen, 'Rows')).toContain('The first 12 of 1,240: 3, 14');
  });
});
