import type { SessionPerson } from '../api/contract';
import { Room } from '../ui/testing/room';
import { partnersRoutes } from './partners.routes';
import { partnerSummary, pellAndTarn } from './testing/pell-and-tarn';

const PATH = '/api/partners';

function open(person?: Partial<SessionPerson>): Promise<Room> {
  return Room.open({ path: 'partners', routes: partnersRoutes, address: '/partners', person });
}

function listOf(count: number) {
  return { items: Array.from({ length: count }, (_, index) => partnerSummary(index + 1)), total: count };
}

describe('PartnersPage', () => {
  it('says what it is reading while it waits', async () => {
    const room = await open();
    expect(room.text).toContain('Reading the partners');
  });

  it('says what belongs here when there is nothing, and offers an administrator the next step', async () => {
    const room = await open();
    await room.answer(PATH, { items: [], total: 0 });
    expect(room.text).toContain('No partner is entered yet');
    expect(room.has('button', 'Enter the first partner')).toBe(true);
  });

  it('offers nobody else to enter a partner', async () => {
    const room = await open({ roles: ['viewer'] });
    await room.answer(PATH, { items: [], total: 0 });
    expect(room.has('button', 'Enter')).toBe(false);
  });

  it('says what went wrong and reads again when asked', async () => {
    const room = await open();
    await room.refuse(PATH, { status: 503, code: 'unavailable', detail: 'The database is busy.' });
    expect(room.page.querySelector('[role="alert"]')?.textContent).toContain('The database is busy.');
    await room.press('Try again');
    await room.answer(PATH, listOf(1));
    expect(room.cells(0)).toEqual(['Partner 1']);
  });

  it('lists partners with their counts, and leads to each one’s sheet', async () => {
    const room = await open();
    await room.answer(PATH, listOf(2));
    expect(room.cells(4)).toEqual(['100', '200']);
    expect(room.cells(5)[1]).toBe('Never');
    expect(room.link('Partner 2').getAttribute('href')).toBe('/partners/partner00002');
  });

  it('sorts by the column that is pressed', async () => {
    const room = await open();
    await room.answer(PATH, listOf(12));
    room.page.querySelector<HTMLElement>('th[mat-sort-header="keyCount"] [role="button"]')?.click();
    await room.settle();
    expect(room.cells(3).slice(0, 3)).toEqual(['1', '2', '3']);
  });

  it('cuts a long list into pages and finds by name or address', async () => {
    const room = await open();
    await room.answer(PATH, listOf(30));
    expect(room.cells(0)).toHaveLength(25);
    await room.type('Find a partner', 'desk30@');
    expect(room.cells(0)).toEqual(['Partner 30']);
    await room.type('Find a partner', 'nobody of this name');
    expect(room.text).toContain('No partner has these words');
  });
});

describe('entering a partner', () => {
  async function fill(): Promise<Room> {
    const room = await open();
    await room.answer(PATH, listOf(1));
    await room.press('Enter a partner');
    await room.type('Name', ' Pell & Tarn Brokers ');
    await room.type('Contact e-mail', 'web@pellandtarn.example');
    return room;
  }

  it('opens at the first field', async () => {
    const room = await fill();
    expect(document.activeElement?.getAttribute('name')).toBe('name');
    expect(room.has('h2', 'Enter a partner')).toBe(true);
  });

  it('sends what was typed and leads to the new sheet', async () => {
    const room = await fill();
    await room.press('Enter the partner');
    const call = await room.answer(PATH, pellAndTarn, 'POST');
    expect(call.request.body).toEqual({ name: 'Pell & Tarn Brokers', contactEmail: 'web@pellandtarn.example' });
    expect(room.address).toBe('/partners/partner0pell');
  });

  it('sends nothing while a field is wrong, and says what is wrong beside it', async () => {
    const room = await fill();
    await room.type('Contact e-mail', 'web');
    await room.press('Enter the partner');
    expect(room.complaintOf('Contact e-mail')).toContain('Enter an e-mail address such as');
    expect(document.activeElement?.getAttribute('name')).toBe('contactEmail');
  });

  it('keeps what was typed when the service refuses, and says why beside the field', async () => {
    const room = await fill();
    await room.press('Enter the partner');
    const errors = [{ detail: 'A partner of this name is entered already.', pointer: '#/name' }];
    await room.refuse(PATH, { status: 409, code: 'name-taken', title: 'That name is taken', errors }, 'POST');
    expect(room.complaintOf('Name')).toBe('A partner of this name is entered already.');
    expect(room.valueOf('Name')).toBe(' Pell & Tarn Brokers ');
    expect(room.valueOf('Contact e-mail')).toBe('web@pellandtarn.example');
  });

  it('closes without sending when it is cancelled', async () => {
    const room = await fill();
    await room.press('Cancel');
    expect(room.has('h2', 'Enter a partner')).toBe(false);
  });
});
