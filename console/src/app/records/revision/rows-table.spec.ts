import { TestBed } from '@angular/core/testing';
import { Announcer } from '../../ui/announcer';
import { RecordsScreen } from '../testing/records-screen';
import { REVISION, ROWS } from '../testing/refits';

const PATH = '/api/record-revisions/revision2';
const ROWS_PATH = `${PATH}/rows`;
const LONG = '[Length overall] > 20';

async function openWith(query: string): Promise<RecordsScreen> {
  const screen = await RecordsScreen.open(`/records/revisions/revision2${query}`, 'viewer');
  await screen.answer(PATH, REVISION);
  return screen;
}

const where = (condition: string): string => `?where=${encodeURIComponent(condition)}#rows`;

describe('Rows of a revision', () => {
  it('are those that the address asks for, with their own numbers and the condition in words', async () => {
    const screen = await openWith(where(LONG));
    const call = await screen.answer(ROWS_PATH, { ...ROWS, total: 2, numbers: [7, 1912] });
    expect(call.request.params.get('where')).toBe(LONG);
    expect(screen.page.querySelector('tb-rows-filter .shown')?.textContent).toContain(
      'Only rows where Length overall above 20: 2 rows.',
    );
    const numbers = [...screen.page.querySelectorAll('tb-rows-table tbody th')].map((cell) => cell.textContent?.trim());
    expect(numbers).toEqual(['7', '1912']);
    expect(TestBed.inject(Announcer).text()).toBe('2 rows found.');
  });

  it('are brought into view once they have come, and not again when a person pages through them', async () => {
    const moved = jest.spyOn(Element.prototype, 'scrollIntoView');
    const jumps = (): number => moved.mock.calls.filter(([how]) => typeof how === 'object').length;
    const screen = await openWith(where(LONG));
    expect(jumps()).toBe(0);
    await screen.answer(ROWS_PATH, ROWS);
    expect(jumps()).toBe(1);
    await screen.press('Next');
    await screen.answer(ROWS_PATH, { ...ROWS, offset: 25 });
    expect(jumps()).toBe(1);
    moved.mockRestore();
  });

  it('are those of the numbers in the address', async () => {
    const screen = await openWith('?numbers=1,5,9#rows');
    const call = await screen.answer(ROWS_PATH, { ...ROWS, total: 3 });
    expect(call.request.params.get('numbers')).toBe('1,5,9');
    expect(screen.text).toContain('Only rows 1, 5 and 9: 3 rows.');
  });

  it('are all of them again when asked', async () => {
    const screen = await openWith(where(LONG));
    await screen.answer(ROWS_PATH, { ...ROWS, total: 2 });
    (screen.page.querySelector('tb-rows-filter .shown a') as HTMLElement).click();
    await screen.stable();
    const call = await screen.answer(ROWS_PATH, ROWS);
    expect(call.request.params.has('where')).toBe(false);
    expect(screen.address).toBe('/records/revisions/revision2#rows');
    expect(screen.page.querySelector('.shown')).toBeNull();
  });

  it('follow a condition that a person types, from the first page', async () => {
    const screen = await openWith('');
    await screen.answer(ROWS_PATH, ROWS);
    await screen.press('Next');
    await screen.answer(ROWS_PATH, { ...ROWS, offset: 25 });
    await screen.type('Rows where', ` ${LONG} `);
    screen.page.querySelector('tb-rows-filter form')?.dispatchEvent(new Event('submit', { cancelable: true }));
    await screen.stable();
    const call = await screen.answer(ROWS_PATH, { ...ROWS, total: 2 });
    expect(call.request.params.get('where')).toBe(LONG);
    expect(call.request.params.get('offset')).toBe('0');
  });

  it('keep what was typed and show the place where a condition is wrong', async () => {
    const screen = await openWith(where(LONG));
    await screen.answer(ROWS_PATH, { ...ROWS, total: 2 });
    await screen.type('Rows where', '[Lenght] > 20');
    screen.page.querySelector('tb-rows-filter form')?.dispatchEvent(new Event('submit', { cancelable: true }));
    await screen.stable();
    await screen.refuse(ROWS_PATH, 422, {
      code: 'request-invalid',
      errors: [{ pointer: '#/where', detail: 'There is no column Lenght (at character 1)' }],
    });
    expect(screen.control('Rows where').value).toBe('[Lenght] > 20');
    expect(screen.control('Rows where').getAttribute('aria-invalid')).toBe('true');
    expect(screen.text).toContain('There is no column Lenght');
    expect(screen.page.querySelector('.shown')?.textContent).not.toContain('2 rows');
    expect(screen.page.querySelector('tb-rows-filter mark')?.textContent).toBe('[');
    expect(screen.page.querySelector('tb-rows-table [role="alert"]')).toBeNull();
    expect(TestBed.inject(Announcer).text()).toContain('There is no column Lenght');
  });

  it('may be none', async () => {
    const screen = await openWith(where(LONG));
    await screen.answer(ROWS_PATH, { ...ROWS, total: 0, numbers: [], rows: [] });
    expect(screen.text).toContain('No row is like this.');
  });
});
