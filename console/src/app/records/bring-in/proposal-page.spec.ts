import { controlOf } from '../../ui/testing/queries';
import type { Room } from '../../ui/testing/room';
import { RECORD_SET, REVISION } from '../testing/refits';
import { INCOMING, PROPOSAL, WORKBOOK, appendingProposal, bringInTask, proposedColumn } from './testing/incoming';
import {
  BRING_IN_PATH,
  FILE_PATH,
  PROPOSAL_PATH,
  TASK_PATH,
  openProposal,
  propose,
  readyProposal,
} from './testing/proposal-room';

const REVISION_PATH = `/api/record-revisions/${REVISION.id}`;
const SET_PATH = '/api/record-sets/records1';

afterEach(() => sessionStorage.clear());

/** Changes a control, by its label or its accessible name, and leaves it. */
async function enter(room: Room, name: string, value: string): Promise<void> {
  const control = controlNamed(room, name);
  control.value = value;
  control.dispatchEvent(new Event('change'));
  await room.settle();
}

async function tickOf(room: Room, name: string): Promise<void> {
  controlNamed(room, name).click();
  await room.settle();
}

function controlNamed({ page }: Room, name: string): HTMLInputElement {
  return page.querySelector<HTMLInputElement>(`[aria-label="${name}"]`) ?? controlOf(page, name);
}

async function startBringIn(room: Room): Promise<unknown> {
  await room.press('Bring in');
  return (await room.answer(BRING_IN_PATH, bringInTask({}), 'POST')).request.body;
}

describe('ProposalPage, before it can show how the file would be read', () => {
  it('says what it waits for', async () => {
    const room = await openProposal();
    expect(room.text).toContain('Reading how the file would be read');
    await room.answer(FILE_PATH, INCOMING);
    expect(room.text).toContain('How marl-point_jobs.csv would be read');
  });

  it('leads back when the file has run out', async () => {
    const room = await openProposal();
    await room.refuse(FILE_PATH, { code: 'not-found', status: 404 });
    expect(room.text).toContain('This file is no longer here');
    expect(room.link('Send the file again').getAttribute('href')).toBe('/records/bring-in');
  });

  it('offers to try again when the desk failed', async () => {
    const room = await openProposal();
    await room.refuse(FILE_PATH, { code: 'internal', status: 500, title: 'The service failed' });
    await room.press('Try again');
    await room.answer(FILE_PATH, INCOMING);
    expect(room.text).toContain('How marl-point_jobs.csv would be read');
  });
});

describe('ProposalPage, what was found', () => {
  it('tells of each column what was seen in its cells', async () => {
    const room = await readyProposal();
    expect(room.cells(0, 'Columns of the file')).toEqual([
      'length',
      'crew ?, wants a look',
      'finished ?, wants a look',
      'owner',
    ]);
    const seen = room.cells(5, 'Columns of the file');
    expect(seen[0]).toContain('“ft” stands behind 3 numbers: multiplied by 0.3048 to give m.');
    expect(seen[1]).toContain('4 missing. 1 cell cannot be read as a number and would be missing.');
    expect(seen[2]).toContain('Days and months cannot be told apart in any row.');
    expect(room.text).toContain('2 want a look');
  });

  it('marks in the preview what cannot be read, by words as well, and what is missing', async () => {
    const room = await readyProposal();
    expect(room.cells(1, 'Preview')).toEqual(['12.5', '12.4968', 'missing']);
    expect(room.cells(2, 'Preview')[1]).toMatch(/cannot be read: ✕ see plan/);
    await room.tick('as they are written');
    expect(room.cells(1, 'Preview')).toEqual(['12,5 m', '41 ft', 'empty']);
  });

  it('asks for the sheet of a workbook, and for the delimiter of text', async () => {
    const room = await readyProposal(WORKBOOK);
    expect(room.valueOf('Sheet')).toBe('Jobs');
    expect(room.has('label', 'Between the cells')).toBe(false);
    await room.choose('Sheet', 'Notes');
    expect((await propose(room, WORKBOOK)).body).toEqual({ sheet: 'Notes' });
  });
});

describe('ProposalPage, changing how the file is read', () => {
  it('asks again with every choice made so far, and shows the answer', async () => {
    const room = await readyProposal();
    await room.choose('Decimal mark', '.');
    await propose(room, PROPOSAL);
    await enter(room, 'Kind of crew', 'text');
    const { body } = await propose(room, {
      ...PROPOSAL,
      columns: [proposedColumn('crew', 0, { kind: 'text', doubts: ['Now it is text.'] })],
    });
    expect(body).toEqual({ decimal: '.', columns: [{ name: 'crew', kind: 'text' }] });
    expect(room.text).toContain('Now it is text.');
    expect(room.text).toContain('2 choices by you');
  });

  it('takes a suspect mark as missing at a press', async () => {
    const room = await readyProposal();
    await room.press('Take 999 as missing');
    const { body } = await propose(room, PROPOSAL);
    expect(body).toEqual({ columns: [{ name: 'crew', missingMarks: ['999'] }] });
    expect(document.activeElement?.getAttribute('aria-label')).toContain('Also missing in crew');
  });

  it('sets a column aside and says what that means', async () => {
    const room = await readyProposal();
    await tickOf(room, 'Set owner aside');
    await propose(room, {
      ...PROPOSAL,
      columns: PROPOSAL.columns.map((c) => ({ ...c, setAside: c.name === 'owner' })),
    });
    expect(room.text).toContain('1 column set aside: “owner”');
    expect(room.text).toContain('never stored, and the original file is not kept either, because it holds it');
    expect(room.page.querySelector('tb-reading-preview th s')?.textContent).toBe('owner');
  });

  it('asks for the columns’ names first when another line names them, and keeps what fits them', async () => {
    const room = await readyProposal();
    await room.press('Take 999 as missing');
    await propose(room, PROPOSAL);
    await enter(room, 'Header line', '4');
    expect((await propose(room, PROPOSAL)).body).toEqual({ headerLine: 4 });
    const crew = [{ name: 'crew', missingMarks: ['999'] }];
    expect((await propose(room, PROPOSAL)).body).toEqual({ headerLine: 4, columns: crew });
    await enter(room, 'Header line', '1');
    const others = { ...PROPOSAL, columns: [proposedColumn('Marl Point Yard', 0)] };
    expect((await propose(room, others)).body).toEqual({ headerLine: 1 });
    room.expectNoCall(PROPOSAL_PATH);
    await enter(room, 'Header line', '4');
    await propose(room, PROPOSAL);
    expect((await propose(room, PROPOSAL)).body).toEqual({ headerLine: 4, columns: crew });
  });

  it('goes back to what was found', async () => {
    const room = await readyProposal();
    await room.choose('Decimal mark', '.');
    await propose(room, PROPOSAL);
    await room.press('Back to what was found');
    expect((await propose(room, PROPOSAL)).body).toEqual({});
    expect(room.valueOf('Decimal mark')).toBe(',');
  });

  it('puts a refusal beside the choice that caused it, and leaves the last good preview', async () => {
    const room = await readyProposal();
    await enter(room, 'Header line', '700');
    await room.refuse(PROPOSAL_PATH, { code: 'file-header', detail: 'The file ends before line 700.' }, 'POST');
    expect(room.complaintOf('Header line')).toContain('The file ends before line 700.');
    expect(room.cells(1, 'Preview')[0]).toBe('12.5');
    await room.press('Bring in');
    expect(room.text).toContain('The file cannot be read with these choices (The file ends before line 700): change');
    expect((document.activeElement as HTMLInputElement).value).toBe('700');
    room.expectNoCall(BRING_IN_PATH);
  });

  it('puts a refusal that points into the columns beside that column', async () => {
    const room = await readyProposal();
    await enter(room, 'Unit of length', 'furlong');
    const errors = [{ detail: 'This unit is not known', pointer: '#/columns/0/unit' }];
    await room.refuse(PROPOSAL_PATH, { code: 'choices-invalid', errors }, 'POST');
    expect(room.cells(5, 'Columns of the file')[0]).toContain('This unit is not known');
  });

  it('leaves a unit to be changed when it made words of the column', async () => {
    const room = await readyProposal();
    await enter(room, 'Unit of length', 'kg');
    const columns = [proposedColumn('length', 0, { kind: 'text' })];
    await propose(room, { ...PROPOSAL, columns });
    expect(controlNamed(room, 'Kind of length').value).toBe('text');
    expect(controlNamed(room, 'Unit of length').value).toBe('kg');
  });

  it('says itself what no line number can be', async () => {
    const room = await readyProposal();
    await enter(room, 'Header line', '0');
    expect(room.complaintOf('Header line')).toContain('Enter a whole number from 1 to 1000');
    room.expectNoCall(PROPOSAL_PATH);
  });

  it('offers to try again when no answer came, and keeps the choices', async () => {
    const room = await readyProposal();
    await room.choose('Decimal mark', '.');
    await room.refuse(PROPOSAL_PATH, { code: 'unavailable', status: 503, title: 'Not just now' }, 'POST');
    await room.press('Try again');
    expect((await propose(room, PROPOSAL)).body).toEqual({ decimal: '.' });
  });

  it('has the choices again after a reload', async () => {
    sessionStorage.setItem(
      'tarebeam.bring-in.incoming1',
      JSON.stringify({ choices: { decimal: '.' }, words: { name: 'Jobs', description: '', retainUntil: '' } }),
    );
    const room = await readyProposal();
    expect((await propose(room, PROPOSAL)).body).toEqual({ decimal: '.' });
    expect(room.valueOf('Name')).toBe('Jobs');
  });
});

describe('ProposalPage, a wide file', () => {
  const names = Array.from({ length: 2000 }, (_, index) => `column ${index + 1}`);
  const wide = {
    ...PROPOSAL,
    columns: names.map((name, position) => proposedColumn(name, position)),
    written: [names.map((_, index) => `${index}`)],
    read: [names.map((_, index) => index)],
  };

  it('shows two thousand columns by the page', async () => {
    const room = await readyProposal(wide);
    expect(room.cells(0, 'Columns of the file')).toHaveLength(25);
    expect(room.page.querySelectorAll('tb-reading-preview td')).toHaveLength(12);
    await room.type('Filter columns by name', 'column 1999');
    expect(room.cells(0, 'Columns of the file')).toEqual(['column 1999']);
  });
});

describe('ProposalPage, bringing in', () => {
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

describe('ProposalPage, for a record set that is there', () => {
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
