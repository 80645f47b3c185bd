import { Room } from '../ui/testing/room';
import { journalRoutes } from './journal.routes';

const PATH = '/api/journal';
const TOMAS = { id: 'person0tomas', name: 'Tomas Averill' };

function entry(id: number, change: object = {}) {
  const summary = `Entry ${id}`;
  return {
    id,
    at: '2026-11-30T14:22:00Z',
    actor: TOMAS,
    action: 'edition-put-in-force',
    subjectKind: 'edition',
    subjectId: 'edition00004',
    summary,
    ...change,
  };
}

function enter(address = '/journal'): Promise<Room> {
  return Room.open({ path: 'journal', routes: journalRoutes, address });
}

async function open(entries: readonly object[], total = entries.length, address?: string): Promise<Room> {
  const room = await enter(address);
  await room.answer(PATH, { items: entries, total });
  return room;
}

describe('JournalPage', () => {
  it('says what it is reading while it waits', async () => {
    expect((await enter()).text).toContain('Reading the journal');
  });

  it('says what is entered here when nothing has been done', async () => {
    expect((await open([])).text).toContain('Nothing has been done yet');
  });

  it('says what went wrong and reads again when asked', async () => {
    const room = await enter();
    await room.refuse(PATH, { status: 503, code: 'unavailable', detail: 'The database is busy.' });
    expect(room.text).toContain('The database is busy.');
    await room.press('Try again');
    await room.answer(PATH, { items: [entry(1)], total: 1 });
    expect(room.cells(3)).toEqual(['Entry 1']);
  });

  it('says who did what, and that the service itself did what nobody did', async () => {
    const room = await open([entry(2), entry(1, { actor: null, action: 'fit-done' })]);
    expect(room.cells(1)).toEqual(['Tomas Averill', 'The service']);
    expect(room.cells(2)).toEqual(['Edition put in force', 'Fit done']);
  });

  it('leads to what an entry is about, where that has a screen', async () => {
    const room = await open([
      entry(3, { subjectKind: 'partner', subjectId: 'partner0pell' }),
      entry(2, { subjectKind: 'setting', subjectId: null }),
      entry(1, { subjectKind: 'key', subjectId: 'key0000boats' }),
    ]);
    const links = [...room.page.querySelectorAll('tbody tr')].map((row) =>
      row.querySelector('a')?.getAttribute('href'),
    );
    expect(links).toEqual(['/partners/partner0pell', '/settings', undefined]);
  });

  it('moves through a long journal a page at a time, and keeps the page in the address', async () => {
    const room = await open([entry(60)], 60);
    expect(room.text).toContain('1 to 25 of 60 entries');
    await room.press('Next');
    const call = await room.answer(PATH, { items: [entry(35)], total: 60 });
    expect(call.request.params.get('offset')).toBe('25');
    expect(room.address).toBe('/journal?offset=25');
  });

  it('leads back from a page past the end', async () => {
    const room = await open([], 60, '/journal?offset=100');
    await room.press('Go to the newest entries');
    const call = await room.answer(PATH, { items: [entry(60)], total: 60 });
    expect(call.request.params.get('offset')).toBe('0');
  });
});

describe('filtering the journal', () => {
  it('asks for what was chosen, both days included, and keeps it in the address', async () => {
    const room = await open([entry(1)]);
    await room.answer('/api/people', { items: [TOMAS], total: 1 });
    await room.choose('Action', 'edition-put-in-force');
    await room.choose('Person', TOMAS.id);
    await room.choose('About', 'edition');
    await room.type('From', '2026-11-01');
    await room.type('To', '2026-11-30');
    await room.press('Show');
    const call = await room.answer(PATH, { items: [], total: 0 });
    const asked = Object.fromEntries(call.request.params.keys().map((name) => [name, call.request.params.get(name)]));
    expect(asked).toEqual({
      action: 'edition-put-in-force',
      actorId: TOMAS.id,
      subjectKind: 'edition',
      from: new Date(2026, 10, 1).toISOString(),
      to: new Date(2026, 11, 1).toISOString(),
      limit: '25',
      offset: '0',
    });
    expect(room.address).toContain('fromDay=2026-11-01');
    expect(room.text).toContain('No entry fits');
  });

  it('starts from the filter in the address, and takes it away when asked', async () => {
    const room = await open([], 0, '/journal?action=key-issued');
    expect(room.valueOf('Action')).toBe('key-issued');
    await room.press('Show every entry');
    const call = await room.answer(PATH, { items: [entry(1)], total: 1 });
    expect(call.request.params.has('action')).toBe(false);
    expect(room.address).toBe('/journal');
  });

  it('shows a name in the address that it does not know as what is looked for', async () => {
    const room = await open([], 0, '/journal?action=lock-changed');
    expect(room.valueOf('Action')).toBe('lock-changed');
  });

  it('asks for nothing when the days are the wrong way round, and says so', async () => {
    const room = await open([entry(1)]);
    await room.type('From', '2026-11-30');
    await room.type('To', '2026-11-01');
    await room.press('Show');
    expect(room.complaintOf('To')).toBe('The last day lies before the first');
    room.expectNoCall(PATH);
  });
});
