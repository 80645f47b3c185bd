import { TestBed } from '@angular/core/testing';
import { wordsOf } from '../../ui/testing/queries';
import { Room } from '../../ui/testing/room';
import { recordsRoutes } from '../records.routes';
import { FEET, FEET_EFFECT, RENAME, RENAME_EFFECT, draftOfSteps, trialOf } from '../testing/mending';
import { RECORD_SET, REVISION } from '../testing/refits';
import { MENDING_PAUSES } from './mending-pauses';

const PATH = '/api/record-revisions/revision2';
const TRIAL = `${PATH}/mending-trial`;

const refusedAt = (index: number, detail: string): object => ({
  status: 400,
  errors: [{ pointer: `#/steps/${index}`, detail }],
});

async function openWith(...steps: Parameters<typeof draftOfSteps>): Promise<Room> {
  TestBed.overrideProvider(MENDING_PAUSES, { useValue: { betweenEditsMs: 0, beforeRetryMs: 0 } });
  const address = '/records/revisions/revision2/mend';
  const room = await Room.open({ path: 'records', routes: recordsRoutes, address, person: { roles: ['analyst'] } });
  await room.answer(PATH, REVISION);
  await room.answer(`${PATH}/mending-draft`, draftOfSteps(...steps));
  await room.answer('/api/record-sets/records1', RECORD_SET);
  return room;
}

async function openForm(kind: string): Promise<Room> {
  const room = await openWith();
  await room.press('Add a step');
  await room.choose('What to do', kind);
  return room;
}

async function submit(room: Room): Promise<void> {
  room.page.querySelector('form')?.dispatchEvent(new Event('submit', { cancelable: true }));
  await room.settle();
}

const words = (room: Room): readonly string[] =>
  [...room.page.querySelectorAll('tb-step-list .words')].map((each) => wordsOf(each));

describe('a step being filled in', () => {
  it('is tried before it counts, and asks the service no second time for what it does', async () => {
    const room = await openForm('rename');
    await room.choose('Column', 'Hull material');
    await room.type('New name', ' Hull ');
    await submit(room);
    const call = await room.answer(TRIAL, trialOf(RENAME_EFFECT), 'POST');
    expect(call.request.body).toEqual({ steps: [RENAME] });
    expect(words(room)).toEqual([RENAME_EFFECT.told]);
    expect(wordsOf(document.activeElement as HTMLElement)).toBe('Add a step');
    const kept = await room.answer(`${PATH}/mending-draft`, draftOfSteps(RENAME), 'PUT');
    expect(kept.request.body).toEqual({ steps: [RENAME] });
    room.expectNoCall(TRIAL);
  });

  it('says what is missing before anything is sent, with the focus on it', async () => {
    const room = await openForm('rename');
    await room.choose('Column', 'Hull material');
    await submit(room);
    expect(room.complaintOf('New name')).toBe('Enter the new name');
    expect(document.activeElement?.getAttribute('aria-invalid')).toBe('true');
    room.expectNoCall(TRIAL);
  });

  it('shows a formula’s error at its character, and stays open', async () => {
    const room = await openForm('derive');
    await room.type('Name of the new column', 'Area');
    await room.type('Formula', '[Length overall] * * 2');
    await submit(room);
    await room.refuse(TRIAL, refusedAt(0, '“*” does not fit here (at character 20)'), 'POST');
    expect(room.complaintOf('Formula')).toBe('“*” does not fit here');
    expect(room.text).toContain('Character 20: [Length overall] * * 2');
    expect(room.page.querySelector('mark')?.textContent).toBe('*');
    const field = document.activeElement as HTMLTextAreaElement;
    expect([field.selectionStart, field.selectionEnd]).toEqual([19, 20]);
  });

  it('says why the records do not take a step', async () => {
    const room = await openForm('rename');
    await room.choose('Column', 'Hull material');
    await room.type('New name', 'Finished');
    await submit(room);
    await room.refuse(TRIAL, refusedAt(0, 'A column is called Finished already.'), 'POST');
    expect(wordsOf(room.page.querySelector('form [role="alert"]') as HTMLElement)).toBe(
      'A column is called Finished already.',
    );
  });

  it('explains the language of formulas, and puts a column in where the cursor stands', async () => {
    const room = await openForm('drop-rows');
    expect(room.text).toContain('How to write it');
    await room.type('Condition', ' > 3');
    const field = room.page.querySelector('textarea') as HTMLTextAreaElement;
    field.setSelectionRange(0, 0);
    const chooser = room.page.querySelector('select[aria-label="Put in a column"]') as HTMLSelectElement;
    chooser.value = 'Length overall';
    chooser.dispatchEvent(new Event('change'));
    await submit(room);
    const call = await room.answer(TRIAL, trialOf({ told: 'Dropped 1 row.', rowsConcerned: 1 }), 'POST');
    expect(call.request.body).toEqual({ steps: [{ kind: 'drop-rows', where: '[Length overall] > 3' }] });
  });

  it('converts by the name of a conversion, in every row', async () => {
    const room = await openForm('convert-unit');
    await room.choose('Column', 'Length overall');
    expect(room.valueOf('Unit of the column afterwards')).toBe('m');
    await room.choose('Conversion', 'inches to millimetres');
    expect(room.valueOf('Factor')).toBe('25.4');
    expect(room.valueOf('Conversion')).toBe('inches to millimetres');
    await submit(room);
    const call = await room.answer(TRIAL, trialOf(FEET_EFFECT), 'POST');
    expect(call.request.body).toEqual({
      steps: [{ kind: 'convert-unit', column: 'Length overall', factor: 25.4, unit: 'mm' }],
    });
  });

  it('offers a category’s levels with their counts, and maps several to different names', async () => {
    const room = await openForm('map-levels');
    await room.choose('Column', 'Hull material');
    const offered = [...room.page.querySelectorAll('tb-level-choice .levels label')].map((label) => wordsOf(label));
    expect(offered).toEqual(['GRP 1,500 rows', 'wood 300 rows', 'steel 150 rows', 'aluminium 50 rows']);
    await room.tick('wood');
    await room.type('They become', 'timber');
    await room.press('And map others');
    await room.tick('steel');
    await room.tick('aluminium');
    await room.type('They become', 'metal');
    await submit(room);
    const call = await room.answer(TRIAL, trialOf(), 'POST');
    const levels = { wood: 'timber', steel: 'metal', aluminium: 'metal' };
    expect(call.request.body).toEqual({ steps: [{ kind: 'map-levels', column: 'Hull material', levels }] });
  });

  it('takes a level that is not listed', async () => {
    const joined = { kind: 'join-rare-levels', column: 'Hull material', fewerThan: 60, into: 'rare' } as const;
    const room = await openWith(joined);
    await room.answer(TRIAL, trialOf({ told: 'Joined.', rowsConcerned: 50 }), 'POST');
    await room.press('Add a step');
    await room.choose('What to do', 'map-levels');
    await room.choose('Column', 'Hull material');
    expect(room.text).toContain('The levels at this point are not known here.');
    const typed = room.page.querySelector('tb-level-choice .typed input') as HTMLInputElement;
    typed.value = 'rare';
    await room.press('Tick it too');
    await room.type('They become', 'other');
    await submit(room);
    const call = await room.answer(TRIAL, trialOf(), 'POST');
    expect((call.request.body as { steps: object[] }).steps[1]).toMatchObject({ levels: { rare: 'other' } });
  });

  it('shows the columns as they stand before the step that is changed', async () => {
    const room = await openWith(RENAME, FEET);
    const columns = trialOf().columns.map((column) =>
      column.name === 'Hull material' ? { ...column, name: 'Hull' } : column,
    );
    await room.answer(TRIAL, { ...trialOf(RENAME_EFFECT, FEET_EFFECT), columns }, 'POST');
    await room.press('Change step 2');
    const call = await room.answer(TRIAL, { ...trialOf(RENAME_EFFECT), columns }, 'POST');
    expect(call.request.body).toEqual({ steps: [RENAME] });
    expect([room.valueOf('Factor'), room.valueOf('Conversion')]).toEqual(['0.3048', 'feet to metres']);
    const names = [...room.page.querySelectorAll('select[aria-label="Put in a column"] option')].map(
      (o) => o.textContent,
    );
    expect(names).toContain('Hull');
    await room.type('Factor', '0.1');
    await submit(room);
    await room.answer(TRIAL, { ...trialOf(RENAME_EFFECT, FEET_EFFECT), columns }, 'POST');
    const kept = await room.answer(`${PATH}/mending-draft`, draftOfSteps(FEET), 'PUT');
    expect(kept.request.body).toEqual({ steps: [RENAME, { ...FEET, factor: 0.1 }] });
  });

  it('is taken untried behind a step that cannot be done', async () => {
    const room = await openWith(RENAME);
    await room.refuse(TRIAL, refusedAt(0, 'No.'), 'POST');
    await room.press('Add a step');
    await room.choose('What to do', 'drop-repeated-rows');
    await submit(room);
    await room.refuse(TRIAL, refusedAt(0, 'No.'), 'POST');
    expect(room.page.querySelectorAll('tb-step-list li')).toHaveLength(2);
    await room.answer(`${PATH}/mending-draft`, draftOfSteps(RENAME), 'PUT');
  });

  it('goes without a trace when it is cancelled', async () => {
    const room = await openForm('rename');
    await room.press('Cancel');
    expect(room.page.querySelector('form')).toBeNull();
    room.expectNoCall(`${PATH}/mending-draft`);
  });
});
