import type { RecordRevision, Role } from '../../api/contract';
import { wordsOf } from '../../ui/testing/queries';
import { Room } from '../../ui/testing/room';
import { recordsRoutes } from '../records.routes';
import { FEET_EFFECT, MENDED, RENAME_EFFECT, SET_WITH_MENDED } from '../testing/mending';
import { REVISION } from '../testing/refits';

async function openAt(revision: RecordRevision, role: Role = 'analyst'): Promise<Room> {
  const address = `/records/revisions/${revision.id}`;
  const room = await Room.open({ path: 'records', routes: recordsRoutes, address, person: { roles: [role] } });
  await room.answer(`/api/record-revisions/${revision.id}`, revision);
  return room;
}

const section = (room: Room): HTMLElement => room.page.querySelector('#mending') as HTMLElement;
const links = (room: Room): (readonly [string, string | null])[] =>
  [...section(room).querySelectorAll('.ways a')].map((link) => [wordsOf(link), link.getAttribute('href')]);

describe('how a revision was made', () => {
  it('is told step by step, with who made it from what', async () => {
    const room = await openAt(MENDED, 'viewer');
    expect(wordsOf(section(room))).toContain('Made from revision 2 by Ines Caldwell, 21 Oct 2026');
    expect([...section(room).querySelectorAll('ol li')].map((item) => wordsOf(item))).toEqual([
      FEET_EFFECT.told,
      RENAME_EFFECT.told,
    ]);
    expect(links(room)).toEqual([]);
  });

  it('can be changed by an analyst, from the revision that it was made from', async () => {
    const room = await openAt(MENDED);
    await room.answer('/api/record-sets/records1', SET_WITH_MENDED);
    expect(links(room)).toEqual([
      ['Change these steps', '/records/revisions/revision2/mend?from=revision3'],
      ['Mend this revision', '/records/revisions/revision3/mend'],
    ]);
  });

  it('says when the revision that it was made from is gone, and offers no change', async () => {
    const room = await openAt({ ...MENDED, basedOn: null });
    await room.answer('/api/record-sets/records1', SET_WITH_MENDED);
    expect(wordsOf(section(room))).toContain('Made from a revision that has since been deleted');
    expect(links(room).map(([words]) => words)).toEqual(['Mend this revision']);
  });

  it('is not told to a viewer of a file', async () => {
    const room = await openAt(REVISION, 'viewer');
    expect(section(room)).toBeNull();
  });
});

describe('the steps of other revisions', () => {
  it('are offered where they were not applied, newest first, three before the rest', async () => {
    const mended = [3, 4, 5, 6, 7].map((number) => ({
      ...MENDED,
      id: `revision${number}`,
      number,
      basedOn: number === 7 ? { id: 'revision2', number: 2 } : { id: 'revision1', number: 1 },
    }));
    const room = await openAt(REVISION);
    await room.answer('/api/record-sets/records1', { ...SET_WITH_MENDED, revisions: mended });
    expect(links(room).slice(1)).toEqual([
      ['Apply the steps of revision 6 here', '/records/revisions/revision2/mend?from=revision6'],
      ['Apply the steps of revision 5 here', '/records/revisions/revision2/mend?from=revision5'],
      ['Apply the steps of revision 4 here', '/records/revisions/revision2/mend?from=revision4'],
    ]);
    await room.press('Show 1 more');
    expect(links(room).at(-1)?.[0]).toBe('Apply the steps of revision 3 here');
  });

  it('are looked for, and what goes wrong there is said', async () => {
    const room = await openAt(REVISION);
    expect(wordsOf(section(room))).toContain('Looking for mended revisions of this set');
    await room.refuse('/api/record-sets/records1', {
      status: 503,
      code: 'unavailable',
      detail: 'Try again in a minute.',
    });
    expect(wordsOf(section(room).querySelector('[role="alert"]') as HTMLElement)).toContain('Try again in a minute.');
    await room.press('Try again');
    await room.answer('/api/record-sets/records1', SET_WITH_MENDED);
    expect(section(room).querySelector('[role="alert"]')).toBeNull();
  });
});
