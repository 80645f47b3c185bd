import { INCOMING, PROPOSAL, WORKBOOK, proposedColumn } from './testing/incoming';
import {
  BRING_IN_PATH,
  FILE_PATH,
  PROPOSAL_PATH,
  controlNamed,
  enter,
  openProposal,
  propose,
  readyProposal,
  tickOf,
} from './testing/proposal-room';

afterEach(() => sessionStorage.clear());

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
