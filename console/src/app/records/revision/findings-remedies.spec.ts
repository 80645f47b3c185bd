import type { Finding, MendStep } from '../../api/contract';
import { wordsOf } from '../../ui/testing/queries';
import { Room } from '../../ui/testing/room';
import { recordsRoutes } from '../records.routes';
import { FEET, REPEATED, draftOfSteps } from '../testing/mending';
import { REVISION } from '../testing/refits';

const PATH = '/api/record-revisions/revision2';
const FINDINGS = `${PATH}/findings`;
const DRAFT = `${PATH}/mending-draft`;

const MIX_UP: Finding = {
  kind: 'unit-mix-up',
  columns: ['Length overall'],
  message: '12 rows are about 3.2808 times larger than the rest leads to expect.',
  remedy: 'Divide by 3.2808.',
  rowCount: 2,
  rows: [3, 14],
  where: '[Length overall] > 20',
  steps: [FEET],
};
const TWICE: Finding = {
  ...MIX_UP,
  kind: 'repeated-rows',
  columns: [],
  message: '2 rows repeat an earlier row.',
  remedy: 'Drop them.',
  where: null,
  steps: [REPEATED],
};
const ALIKE: Finding = {
  ...TWICE,
  kind: 'columns-alike',
  message: 'They say the same.',
  rowCount: null,
  rows: [],
  steps: [],
};

async function openWith(items: readonly Finding[], waiting: readonly MendStep[] = [], query = ''): Promise<Room> {
  const address = `/records/revisions/revision2${query}`;
  const room = await Room.open({ path: 'records', routes: recordsRoutes, address, person: { roles: ['analyst'] } });
  await room.answer(PATH, REVISION);
  await room.answer(FINDINGS, { revisionId: 'revision2', target: null, items });
  await room.answer(DRAFT, draftOfSteps(...waiting));
  return room;
}

const section = (room: Room): HTMLElement => room.page.querySelector('#findings') as HTMLElement;

async function kept(room: Room, ...answer: MendStep[]): Promise<unknown> {
  return (await room.answer(DRAFT, draftOfSteps(...answer), 'PUT')).request.body;
}

describe('the target of the findings', () => {
  it('is any numeric column, and stays in the address', async () => {
    const room = await openWith([]);
    const offered = [...section(room).querySelectorAll('select option')].map((option) => wordsOf(option));
    expect(offered).toEqual(['None', 'Length overall']);
    await room.choose('Target', 'Length overall');
    expect(room.address).toBe('/records/revisions/revision2?target=Length%20overall');
    expect(wordsOf(section(room))).toContain('Looking through the records again.');
    const call = await room.answer(FINDINGS, { revisionId: 'revision2', target: 'Length overall', items: [ALIKE] });
    expect(call.request.params.get('target')).toBe('Length overall');
    await room.choose('Target', '');
    expect(room.address).toBe('/records/revisions/revision2');
  });

  it('is taken from the address, unless the revision has no such column', async () => {
    const room = await openWith([], [], '?target=Beam');
    expect(room.valueOf('Target')).toBe('');
  });
});

describe('a finding’s remedy', () => {
  it('is told as steps, with a way to the rows behind it', async () => {
    const room = await openWith([MIX_UP, TWICE]);
    const [first, second] = [...section(room).querySelectorAll('li')];
    expect(wordsOf(first)).toContain('As a stepMultiply Length overall by 0.3048 where [Length overall] > 20');
    const linkOf = (entry: Element): string | null | undefined => entry.querySelector('a')?.getAttribute('href');
    expect(linkOf(first)).toBe('/records/revisions/revision2?where=%5BLength%20overall%5D%20%3E%2020#rows');
    expect(linkOf(second)).toBe('/records/revisions/revision2?numbers=3,14#rows');
  });

  it('is added to the steps that wait on the service at that moment', async () => {
    const room = await openWith([MIX_UP]);
    await room.press('Add to the mending');
    await room.answer(DRAFT, draftOfSteps(REPEATED));
    expect(await kept(room, FEET, REPEATED)).toEqual({ steps: [FEET, REPEATED] });
    expect(wordsOf(section(room))).toContain('2 steps wait in the mending.');
    expect(wordsOf(section(room).querySelector('li') as HTMLElement)).toContain('In the mending.');
    expect(document.activeElement?.textContent).toBe('In the mending.');
    expect(room.link('the mending').getAttribute('href')).toBe('/records/revisions/revision2/mend');
  });

  it('is not offered again once it waits', async () => {
    const room = await openWith([MIX_UP, TWICE], [FEET]);
    const buttons = [...section(room).querySelectorAll('li')].map((entry) => entry.querySelector('button') !== null);
    expect(buttons).toEqual([false, true]);
    expect(wordsOf(section(room))).toContain('1 step waits in the mending.');
  });

  it('is added with every other one, after a look at all of them', async () => {
    const room = await openWith([MIX_UP, TWICE, ALIKE]);
    await room.press('Add every proposed remedy');
    const dialog = room.page.querySelector('[role="dialog"]') as HTMLElement;
    expect(wordsOf(dialog)).toContain('Add 2 steps to the mending?');
    expect([...dialog.querySelectorAll('li')].map((item) => wordsOf(item))).toEqual([
      'Multiply Length overall by 0.3048 where [Length overall] > 20.',
      'Drop the rows that repeat an earlier one.',
    ]);
    await room.press('Add them');
    await room.answer(DRAFT, draftOfSteps());
    expect(await kept(room, FEET, REPEATED)).toEqual({ steps: [FEET, REPEATED] });
  });

  it('is left to a person where there are no steps', async () => {
    const room = await openWith([ALIKE]);
    expect(section(room).querySelector('li button')).toBeNull();
  });

  it('says when it could not be added', async () => {
    const room = await openWith([MIX_UP]);
    await room.press('Add to the mending');
    await room.refuse(DRAFT, { status: 503, code: 'unavailable', detail: 'Try again in a minute.' });
    expect(wordsOf(section(room).querySelector('[role="alert"]') as HTMLElement)).toContain('Try again in a minute.');
    expect(wordsOf(room.button('Add to the mending'))).toContain('Units mixed up');
  });

  it('says why rows cannot be dropped beside steps that name rows by number', async () => {
    const dropped: Finding = { ...TWICE, steps: [{ kind: 'drop-rows', rows: [3] }] };
    const room = await openWith([dropped]);
    await room.press('Add to the mending');
    await room.answer(DRAFT, draftOfSteps(REPEATED, { ...FEET, where: undefined, rows: [7] } as MendStep));
    expect(wordsOf(section(room).querySelector('[role="alert"]') as HTMLElement)).toContain(
      'The rows cannot be dropped beside the steps that wait',
    );
  });
});
