import type { Room } from '../../ui/testing/room';
import { RECORD_SET, REVISION } from '../testing/refits';
import { INCOMING, PROPOSAL, appendingProposal, bringInTask } from './testing/incoming';
import {
  BRING_IN_PATH,
  FILE_PATH,
  TASK_PATH,
  enter,
  openProposal,
  propose,
  readyProposal,
} from './testing/proposal-room';

const REVISION_PATH = `/api/record-revisions/${REVISION.id}`;
const SET_PATH = '/api/record-sets/records1';

afterEach(() => sessionStorage.clear());

async function startBringIn(room: Room): Promise<unknown> {
  await room.press('Bring in');
  return (await room.answer(BRING_IN_PATH, bringInTask({}), 'POST')).request.body;
}

describe('bringing in from the proposal', () => {
  it('sends the choices with what the set is called, and follows the work to the revision', async () => {
    const room = await readyProposal();
    expect(room.valueOf('Name')).toBe('marl point jobs');
    await room.press('Take 999 as missing');
    await propose(room, PROPOSAL);
    await room.type('Description', 'One row a job');
    await enter(room, 'Keep the rows until', '2999-12-31');
    expect(await startBringIn(room)).toEqual({
      choices: { columns: [{ name: 'crew', missingMarks: ['999'] }] },
      as: { kind: 'record-set', name: 'marl point jobs', description: 'One row a job', retainUntil: '2999-12-31' },
    });
    expect(room.address).toBe('/records/bring-in/incoming1?task=task1');
    await room.answer(TASK_PATH, bringInTask({ state: 'done', revisionId: 'revision9' }));
    expect(room.address).toBe('/records/revisions/revision9');
    expect(sessionStorage.getItem('tarebeam.bring-in.incoming1')).toBeNull();
  });

  it('goes on following after a reload, by the address alone', async () => {
    const room = await openProposal('?task=task1');
    room.expectNoCall(FILE_PATH);
    const progress = { stage: 'reading', done: 120e6, total: 250e6 } as const;
    await room.answer(TASK_PATH, bringInTask({ progress }));
    expect(room.text).toMatch(/Reading the file, 120 of 250\sMB/);
    expect(document.activeElement?.textContent).toContain('Reading');
    await room.press('Cancel');
    await room.answer(`${TASK_PATH}/cancel`, bringInTask({ progress }), 'POST');
    expect(room.text).toContain('Cancelling');
  });

  it('comes back to the file when the work was cancelled', async () => {
    const room = await openProposal('?task=task1');
    await room.answer(TASK_PATH, bringInTask({ state: 'cancelled' }));
    expect(room.address).toBe('/records/bring-in/incoming1');
    await room.answer(FILE_PATH, INCOMING);
    expect(room.text).toContain('How marl-point_jobs.csv would be read');
  });

  it('says why the work failed, with the line, and has the choices still', async () => {
    const room = await readyProposal();
    await room.choose('Decimal mark', '.');
    await propose(room, PROPOSAL);
    await startBringIn(room);
    const problem = { code: 'file-ragged', detail: 'Put values that hold a comma into quotes.', line: 48 } as const;
    await room.answer(TASK_PATH, bringInTask({ state: 'failed', problem }));
    await room.answer(FILE_PATH, INCOMING);
    expect(room.text).toMatch(/The file was not brought in\s*Line 48 of the file\s*Put values that hold a comma/);
    expect(room.valueOf('Decimal mark')).toBe('.');
    expect(room.address).toBe('/records/bring-in/incoming1');
  });

  it('complains beside the name when it is taken, before the work or by it', async () => {
    const room = await readyProposal();
    const errors = [{ detail: 'Another record set has this name', pointer: '#/as/name' }];
    await room.press('Bring in');
    await room.refuse(BRING_IN_PATH, { code: 'name-taken', status: 409, errors }, 'POST');
    expect(room.complaintOf('Name')).toContain('Another record set has this name');
    await startBringIn(room);
    const problem = { code: 'name-taken', detail: 'Choose another name.', errors } as const;
    await room.answer(TASK_PATH, bringInTask({ state: 'failed', problem }));
    await room.answer(FILE_PATH, INCOMING);
    expect(room.complaintOf('Name')).toContain('Another record set has this name');
  });

  it('complains about words that cannot be sent', async () => {
    const room = await readyProposal();
    await room.type('Name', ' ');
    await enter(room, 'Keep the rows until', '2020-01-01');
    await room.press('Bring in');
    expect(room.complaintOf('Name')).toContain('Enter a name for the record set');
    expect(room.complaintOf('Keep the rows until')).toContain('Choose today or a later day');
    room.expectNoCall(BRING_IN_PATH);
  });

  it('does not bring in while the preview is being read again', async () => {
    const room = await readyProposal();
    await room.choose('Decimal mark', '.');
    await room.press('Bring in');
    expect(room.text).toContain('The preview is being read again: look at it');
    room.expectNoCall(BRING_IN_PATH);
    await propose(room, PROPOSAL);
  });

  it('leads back when the file ran out meanwhile', async () => {
    const room = await readyProposal();
    await room.press('Bring in');
    await room.refuse(BRING_IN_PATH, { code: 'not-found', status: 404 }, 'POST');
    await room.refuse(FILE_PATH, { code: 'not-found', status: 404 });
    expect(room.text).toContain('This file is no longer here');
  });

  it('lets the file go after a question', async () => {
    const room = await readyProposal();
    await room.press('Let the file go');
    expect(room.text).toContain('Let marl-point_jobs.csv go?');
    (room.page.querySelector('mat-dialog-actions .tb-danger-button') as HTMLElement).click();
    await room.settle();
    await room.answer(FILE_PATH, null, 'DELETE');
    expect(room.address).toBe('/records');
  });
});

describe('the proposal for a record set that is there', () => {
  async function appending(outlook: Parameters<typeof appendingProposal>[0]): Promise<Room> {
    const room = await openProposal(`?appendTo=${REVISION.id}`);
    await room.answer(FILE_PATH, INCOMING);
    await room.answer(REVISION_PATH, REVISION);
    await room.answer(SET_PATH, RECORD_SET);
    const { params } = await propose(room, appendingProposal(outlook));
    expect(params.get('appendTo')).toBe(REVISION.id);
    return room;
  }

  it('brings it in as the next revision, unless somebody was first', async () => {
    const room = await openProposal('?recordSet=records1');
    await room.answer(FILE_PATH, INCOMING);
    await room.answer(SET_PATH, RECORD_SET);
    expect(room.text).toContain('It becomes revision 3 of Refits, nine yards');
    await room.press('Bring in as revision 3');
    const detail = 'Tom Arkle added revision 3. Look at it first.';
    await room.refuse(BRING_IN_PATH, { code: 'record-set-changed', status: 409, detail }, 'POST');
    expect(room.text).toContain(detail);
    await room.press('Read the record set again');
    await room.answer(SET_PATH, { ...RECORD_SET, lastNumber: 3, revision: { ...REVISION, number: 3 } });
    await room.press('Bring in as revision 4');
    const { request } = await room.answer(BRING_IN_PATH, bringInTask({}), 'POST');
    expect(request.body).toEqual({
      choices: {},
      as: { kind: 'revision', recordSetId: 'records1', expectedNewest: 3 },
    });
  });

  it('begins with what was chosen for the newest revision, and warns of what was set aside and would be stored', async () => {
    const reading = {
      ...REVISION.reading,
      choices: { missingMarks: ['k.A.'] },
      setAside: ['owner', 'no longer there'],
    };
    const room = await openProposal('?recordSet=records1');
    await room.answer(FILE_PATH, INCOMING);
    await room.answer(SET_PATH, { ...RECORD_SET, revision: { ...REVISION, reading } });
    const { body } = await propose(room, PROPOSAL);
    expect(body).toEqual({ missingMarks: ['k.A.'], columns: [{ name: 'owner', setAside: true }] });
    expect(room.text).toContain('What was chosen for revision 2');
    expect(room.text).not.toContain('and stored now');
    await room.press('Back to what was found');
    await propose(room, PROPOSAL);
    expect(room.text).toContain('Set aside in revision 2, and stored now: owner');
  });

  it('appends the rows to a revision, whose kinds and units cannot be chosen', async () => {
    const room = await appending({ additional: ['owner'], differing: ['crew'] });
    expect(room.text).toContain(
      'The rows of revision 2 of Refits, nine yards and then those of this file become revision 3',
    );
    expect(room.text).toContain('Only the file has “owner”');
    expect(room.text).toContain('By itself the file would be read otherwise in “crew”');
    expect(room.page.querySelector('[aria-label="Kind of crew"]')).toBeNull();
    await room.press('Append as revision 3');
    const { request } = await room.answer(BRING_IN_PATH, bringInTask({}), 'POST');
    expect(request.body).toEqual({
      choices: {},
      as: { kind: 'appended', revisionId: REVISION.id, expectedNewest: 2 },
    });
  });

  it('says what to do when the file lacks columns of the revision', async () => {
    const room = await appending({ lacking: ['Hull material'] });
    expect(room.text).toContain('The file cannot be appended');
    expect(room.text).toContain('“Hull material”');
    await room.press('Append as revision 3');
    expect(room.text).toContain('The file lacks columns of the revision');
    room.expectNoCall(BRING_IN_PATH);
  });

  it('says what it is when the revision to append to is not there', async () => {
    const room = await openProposal('?appendTo=revision2');
    await room.refuse(REVISION_PATH, { code: 'not-found', status: 404, detail: 'There is no revision of that name.' });
    expect(room.text).toContain('There is no revision of that name.');
  });
});
