import type { RevisionDeletion, RevisionSummary } from '../../api/contract';
import { Room } from '../../ui/testing/room';
import { recordsRoutes } from '../records.routes';
import { RECORD_SET, revisionSummary } from '../testing/refits';

const SET = '/api/record-sets/records1';
const REVISION_PATH = '/api/record-revisions/revision2';

const DELETION: RevisionDeletion = {
  revisionNumber: 2,
  rowCount: 2002,
  byteCount: 184_320,
  editions: [],
  fits: [
    { id: 'fit1', estimatorSlug: 'refit-labour', estimatorName: 'Refit labour' },
    { id: 'fit2', estimatorSlug: 'crane-time', estimatorName: 'Crane time' },
  ],
  goesWithSet: false,
  originalGoes: true,
  basedOnIt: [],
};

async function openSet(revisions: RevisionSummary[] = RECORD_SET.revisions, roles: 'viewer' | 'analyst' = 'analyst') {
  const room = await Room.open({
    path: 'records',
    routes: recordsRoutes,
    address: '/records/records1',
    person: { roles: [roles] },
  });
  await room.answer(SET, { ...RECORD_SET, revisions });
  return room;
}

async function askToDelete(room: Room): Promise<void> {
  await room.press('More about revision 2');
  await room.press('Delete revision 2');
}

describe('A record set’s revisions', () => {
  it('say where each came from and what is not kept of it', async () => {
    const base = { id: 'revision1', number: 1 };
    const room = await openSet([
      { ...revisionSummary(1), erasedAt: '2026-11-02T03:00:00Z' },
      { ...revisionSummary(2), origin: 'mended', basedOn: base, originalKept: false },
      { ...revisionSummary(3), origin: 'appended', basedOn: { id: 'revision2', number: 2 }, fileName: 'March.csv' },
      { ...revisionSummary(4), origin: 'mended' },
    ]);
    expect(room.cells(1, 'Revisions')).toEqual([
      'Mended from a revision that has been deleted',
      'March.csv appended to revision 2',
      'Mended from revision 1 Original file not kept',
      'Brought in from refits-1.csv Rows erased on 2 November 2026',
    ]);
  });

  it('offer in their menu only what can be done with them', async () => {
    const room = await openSet(
      [
        { ...revisionSummary(1), erasedAt: '2026-11-02T03:00:00Z' },
        { ...revisionSummary(2), originalKept: false },
      ],
      'viewer',
    );
    expect(room.has('button', 'More about revision 1')).toBe(false);
    await room.press('More about revision 2');
    const items = [...room.page.querySelectorAll('[role="menuitem"]')].map((item) => item.textContent?.trim());
    expect(items).toEqual(['Compare with another revision', 'Export as CSV']);
  });

  it('are fetched as their original file and as CSV', async () => {
    const fetched: string[] = [];
    const click = jest.spyOn(HTMLAnchorElement.prototype, 'click').mockImplementation(function (
      this: HTMLAnchorElement,
    ) {
      fetched.push(`${this.getAttribute('href')} ${this.download}`);
    });
    const room = await openSet();
    await room.press('More about revision 2');
    await room.press('Download the original file');
    await room.press('More about revision 2');
    await room.press('Export as CSV');
    click.mockRestore();
    expect(fetched).toEqual([`${REVISION_PATH}/original refits-2.csv`, `${REVISION_PATH}/csv `]);
  });

  it('lead to a comparison', async () => {
    const room = await openSet();
    await room.press('More about revision 2');
    await room.press('Compare with another revision');
    expect(room.address).toBe('/records/revisions/revision2/compare');
  });
});

describe('Deleting a revision', () => {
  it('asks the service first, and says what goes by name before it goes', async () => {
    const room = await openSet();
    await askToDelete(room);
    expect(room.text).toContain('Finding out what would go with it');
    await room.answer(`${REVISION_PATH}/deletion`, DELETION);
    expect(room.text).toContain('Its 2,002 rows and what is known of its columns.');
    expect(room.text).toContain('The original file refits-2.csv (184 kB): no other revision came from it.');
    expect(room.link('A fit of Crane time').getAttribute('href')).toBe('/estimators/crane-time/fits/fit2');
    await room.press('Delete revision 2 and 2 fits');
    await room.answer(REVISION_PATH, null, 'DELETE');
    await room.answer(SET, { ...RECORD_SET, revisions: [revisionSummary(1)] });
    expect(room.cells(0, 'Revisions')).toEqual(['Revision 1']);
  });

  it('says what stays', async () => {
    const room = await openSet();
    await askToDelete(room);
    await room.answer(`${REVISION_PATH}/deletion`, { ...DELETION, originalGoes: false, basedOnIt: [3, 5], fits: [] });
    expect(room.text).toContain('The original file refits-2.csv: another revision came from it too.');
    expect(room.text).toContain('Revisions 3 and 5, which were made from it.');
    expect(room.has('mat-dialog-actions button', 'Delete revision 2')).toBe(true);
  });

  it('takes the record set along when it is the only one, and goes to the list', async () => {
    const room = await openSet();
    await askToDelete(room);
    await room.answer(`${REVISION_PATH}/deletion`, { ...DELETION, goesWithSet: true });
    expect(room.text).toContain('The record set Refits, nine yards, since this is its only revision.');
    await room.press('Delete revision 2, 2 fits and the record set');
    await room.answer(REVISION_PATH, null, 'DELETE');
    expect(room.address).toBe('/records');
  });

  it('is not offered while an edition rests on it, which is named and linked', async () => {
    const room = await openSet();
    await askToDelete(room);
    const edition = { id: 'edition4', estimatorSlug: 'refit-labour', estimatorName: 'Refit labour' };
    await room.answer(`${REVISION_PATH}/deletion`, { ...DELETION, editions: [{ ...edition, number: 4 }] });
    expect(room.text).toContain('Revision 2 of Refits, nine yards cannot be deleted');
    expect(room.link('Refit labour, edition 4').getAttribute('href')).toBe(
      '/estimators/refit-labour/editions/edition4',
    );
    expect(room.has('mat-dialog-actions button', 'Delete')).toBe(false);
  });

  it('says why it was refused after all, and asks anew what would go', async () => {
    const room = await openSet();
    await askToDelete(room);
    await room.answer(`${REVISION_PATH}/deletion`, DELETION);
    await room.press('Delete revision 2 and 2 fits');
    const refusal = { code: 'revision-in-use' as const, status: 409, detail: 'Edition 5 of Refit labour rests on it.' };
    await room.refuse(REVISION_PATH, refusal, 'DELETE');
    expect(room.text).toContain('Edition 5 of Refit labour rests on it.');
    await room.answer(`${REVISION_PATH}/deletion`, { ...DELETION, fits: [] });
    expect(room.has('mat-dialog-actions button', 'Delete revision 2')).toBe(true);
  });

  it('deletes nothing when the person thinks better of it', async () => {
    const room = await openSet();
    await askToDelete(room);
    await room.answer(`${REVISION_PATH}/deletion`, DELETION);
    await room.press('Cancel');
    room.expectNoCall(REVISION_PATH);
  });
});

describe('A record set’s words and retention day', () => {
  it('are sent only where they differ, with the time they were read', async () => {
    const room = await openSet();
    await room.type('Keep rows until', '2031-03-31');
    await room.press('Save changes');
    const call = await room.answer(SET, { ...RECORD_SET, retainUntil: '2031-03-31' }, 'PATCH');
    expect(call.request.body).toEqual({ retainUntil: '2031-03-31', changedAt: RECORD_SET.changedAt });
    expect(room.text).toContain('Rows kept until 31 Mar 2031, then erased.');
  });

  it('explain what the day does, and can do without one', async () => {
    const room = await Room.open({
      path: 'records',
      routes: recordsRoutes,
      address: '/records/records1',
      person: { roles: ['analyst'] },
    });
    await room.answer(SET, { ...RECORD_SET, retainUntil: '2031-03-31' });
    expect(room.text).toContain('After this day the rows of every revision are erased');
    expect(room.text).toContain('Editions made from them keep answering.');
    await room.press('Keep rows without a day');
    await room.press('Save changes');
    const call = await room.answer(SET, RECORD_SET, 'PATCH');
    expect(call.request.body).toMatchObject({ retainUntil: null });
  });

  it('are complained about before they are sent', async () => {
    const room = await openSet();
    await room.type('Name', ' ');
    await room.type('Keep rows until', '2001-03-31');
    await room.press('Save changes');
    expect(room.complaintOf('Name')).toBe('Enter a name for the record set');
    expect(room.complaintOf('Keep rows until')).toContain('Choose today or a later day');
    room.expectNoCall(SET);
  });

  it('say who was faster, and keep what was typed when the set is read again', async () => {
    const room = await openSet();
    await room.type('Description', 'One row a finished job, with its yard.');
    await room.press('Save changes');
    const detail = 'Somebody changed the record set. Owen Pryce changed it on 2026-12-01.';
    await room.refuse(SET, { code: 'record-set-changed', status: 409, detail }, 'PATCH');
    expect(room.text).toContain('Owen Pryce changed it');
    await room.press('Read the record set again');
    const newer = {
      ...RECORD_SET,
      name: 'Refits of nine yards',
      description: 'Jobs.',
      changedAt: '2026-12-01T10:00:00Z',
    };
    await room.answer(SET, newer);
    expect(room.valueOf('Name')).toBe('Refits of nine yards');
    expect(room.valueOf('Description')).toBe('One row a finished job, with its yard.');
    expect(room.text.match(/Kept now: \S+/g)).toEqual(['Kept now: Jobs.Keep']);
    await room.press('Save changes');
    const call = await room.answer(SET, { ...newer, description: 'One row a finished job, with its yard.' }, 'PATCH');
    expect(call.request.body).toEqual({
      description: 'One row a finished job, with its yard.',
      changedAt: '2026-12-01T10:00:00Z',
    });
  });

  it('are for analysts to change', async () => {
    const room = await openSet(RECORD_SET.revisions, 'viewer');
    expect(room.text).not.toContain('Keep rows until');
  });
});
