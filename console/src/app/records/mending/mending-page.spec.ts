import { TestBed } from '@angular/core/testing';
import type { MendStep, MendingDraft } from '../../api/contract';
import { Announcer } from '../../ui/announcer';
import { wordsOf } from '../../ui/testing/queries';
import { Room } from '../../ui/testing/room';
import { recordsRoutes } from '../records.routes';
import {
  FEET,
  FEET_EFFECT,
  MENDED,
  RENAME,
  RENAME_EFFECT,
  REPEATED,
  REPEATED_EFFECT,
  draftOfSteps,
  mendTask,
  trialOf,
} from '../testing/mending';
import { RECORD_SET, REVISION } from '../testing/refits';
import { MENDING_PAUSES } from './mending-pauses';

const PATH = '/api/record-revisions/revision2';
const TRIAL = `${PATH}/mending-trial`;
const DRAFT = `${PATH}/mending-draft`;
const MAKING = `${PATH}/mended-revisions`;
const SET = '/api/record-sets/records1';
const TASK = '/api/record-tasks/task00000001';

const NO_HULL = {
  status: 400,
  detail: 'Mend step 2.',
  errors: [{ pointer: '#/steps/1', detail: 'There is no column Hull at this step.' }],
};

const NO_PAUSES = { betweenEditsMs: 0, beforeRetryMs: 0 };
/** Longer than any test: what waits for them is never done by itself. */
const ENDLESS_PAUSES = { betweenEditsMs: 600_000, beforeRetryMs: 600_000 };

async function open(query = '', pauses = NO_PAUSES): Promise<Room> {
  TestBed.overrideProvider(MENDING_PAUSES, { useValue: pauses });
  const address = `/records/revisions/revision2/mend${query}`;
  return Room.open({ path: 'records', routes: recordsRoutes, address, person: { roles: ['analyst'] } });
}

async function openWith(draft: MendingDraft, pauses = NO_PAUSES): Promise<Room> {
  const room = await open('', pauses);
  await room.answer(PATH, REVISION);
  await room.answer(DRAFT, draft);
  await room.answer(SET, RECORD_SET);
  return room;
}

/** Opened with two steps that can be done. */
async function openTwo(): Promise<Room> {
  const room = await openWith(draftOfSteps(FEET, RENAME));
  await room.answer(TRIAL, trialOf(FEET_EFFECT, RENAME_EFFECT), 'POST');
  return room;
}

async function stepsKept(room: Room): Promise<readonly MendStep[]> {
  const call = await room.answer(DRAFT, draftOfSteps(FEET), 'PUT');
  return (call.request.body as { steps: MendStep[] }).steps;
}

const items = (room: Room): HTMLElement[] => [...room.page.querySelectorAll<HTMLElement>('tb-step-list li')];
const itemWords = (room: Room): readonly string[] =>
  items(room).map((item) => wordsOf(item.querySelector('.words') ?? item));
const makeButton = (room: Room): HTMLButtonElement => room.button('Make revision') as HTMLButtonElement;
const said = (): string => TestBed.inject(Announcer).text();

async function key(room: Room, pressed: KeyboardEventInit, target: EventTarget = document.body): Promise<void> {
  target.dispatchEvent(new KeyboardEvent('keydown', { key: 'z', ctrlKey: true, bubbles: true, ...pressed }));
  await room.settle();
}

describe('the mending page as it opens', () => {
  it('says what it is reading', async () => {
    const room = await open();
    expect(room.text).toContain('Reading the revision and your steps');
  });

  it('says what went wrong, and reads again when asked', async () => {
    const room = await open();
    await room.answer(DRAFT, draftOfSteps());
    await room.refuse(PATH, { status: 404, detail: 'The revision may have been deleted.' });
    expect(wordsOf(room.page.querySelector('[role="alert"]') as HTMLElement)).toContain('may have been deleted');
    await room.press('Try again');
    await room.answer(PATH, REVISION);
    await room.answer(DRAFT, draftOfSteps());
    await room.answer(SET, RECORD_SET);
    expect(room.text).toContain('Mend revision 2');
  });

  it('says what belongs in an empty list, shows the revision as it is, and tries nothing', async () => {
    const room = await openWith(draftOfSteps());
    expect(room.text).toContain('No steps yet');
    expect(room.cells(2, 'Columns afterwards')).toEqual(['m', '–', '–']);
    expect(makeButton(room).disabled).toBe(true);
    room.expectNoCall(TRIAL);
  });

  it('shows the steps of an earlier day with what each does, and when they were kept', async () => {
    const room = await openTwo();
    expect(itemWords(room)).toEqual([FEET_EFFECT.told, RENAME_EFFECT.told]);
    expect(wordsOf(items(room)[0])).toContain('changes 14 rows');
    expect(room.text).toContain('Kept on 21 Oct 2026');
    expect(makeButton(room).textContent).toContain('Make revision 3');
    expect(makeButton(room).disabled).toBe(false);
  });

  it('marks a step that does nothing', async () => {
    const room = await openWith(draftOfSteps(REPEATED));
    await room.answer(TRIAL, trialOf(REPEATED_EFFECT), 'POST');
    expect(wordsOf(items(room)[0].querySelector('.idle') as HTMLElement)).toBe('drops no row');
  });

  it('says when the trial itself fails, and tries again when asked', async () => {
    const room = await openWith(draftOfSteps(FEET));
    await room.refuse(TRIAL, { status: 503, code: 'unavailable', detail: 'The desk is busy.' }, 'POST');
    expect(wordsOf(room.page.querySelector('.outcome [role="alert"]') as HTMLElement)).toContain('The desk is busy.');
    await room.press('Try again');
    await room.answer(TRIAL, trialOf(FEET_EFFECT), 'POST');
    expect(itemWords(room)).toEqual([FEET_EFFECT.told]);
  });

  it('marks a step that cannot be done, lets those after it wait and shows what the ones before come to', async () => {
    const room = await openWith(draftOfSteps(FEET, { ...RENAME, column: 'Hull' } as MendStep, REPEATED));
    await room.refuse(TRIAL, NO_HULL, 'POST');
    const call = await room.answer(TRIAL, trialOf(FEET_EFFECT), 'POST');
    expect(call.request.body).toEqual({ steps: [FEET] });
    expect(wordsOf(items(room)[1])).toContain('This step cannot be done. There is no column Hull at this step.');
    expect(wordsOf(items(room)[2])).toContain('Waits until the step above it is mended.');
    expect(room.text).toContain('After the first 1 step; step 2 cannot be done.');
    expect(makeButton(room).disabled).toBe(true);
  });

  it('says that row numbers count what earlier steps leave', async () => {
    const numbered: MendStep = { kind: 'set-missing', column: 'Length overall', rows: [3] };
    const room = await openWith(draftOfSteps(numbered, REPEATED, { ...numbered }));
    await room.answer(TRIAL, trialOf(), 'POST');
    expect(items(room).map((item) => wordsOf(item).includes('Its row numbers count'))).toEqual([false, false, true]);
  });
});

describe('changing the list', () => {
  it('moves a step by its button, keeps the list, says so and leaves the focus with the step', async () => {
    const room = await openTwo();
    await room.press('Move up step 2');
    expect(await stepsKept(room)).toEqual([RENAME, FEET]);
    await room.answer(TRIAL, trialOf(RENAME_EFFECT, FEET_EFFECT), 'POST');
    expect(itemWords(room)).toEqual([RENAME_EFFECT.told, FEET_EFFECT.told]);
    expect(said()).toContain('Step 2 is now step 1 of 2.');
    expect(wordsOf(document.activeElement as HTMLElement)).toBe('Move up step 1');
  });

  it('takes a step out; undoing by keyboard brings it back without asking the service what it did', async () => {
    const room = await openTwo();
    await room.press('Remove step 1');
    expect(await stepsKept(room)).toEqual([RENAME]);
    await room.answer(TRIAL, trialOf(RENAME_EFFECT), 'POST');
    await key(room, {});
    expect(await stepsKept(room)).toEqual([FEET, RENAME]);
    expect(itemWords(room)).toEqual([FEET_EFFECT.told, RENAME_EFFECT.told]);
    await key(room, { key: 'Z', shiftKey: true });
    expect(await stepsKept(room)).toEqual([RENAME]);
    room.expectNoCall(TRIAL);
  });

  it('leaves undoing to a field that has the focus', async () => {
    const room = await openTwo();
    await room.press('Remove step 1');
    await room.press('Add a step');
    await key(room, {}, room.page.querySelector('select') as HTMLElement);
    expect(itemWords(room)).toHaveLength(1);
  });

  it('says when the list could not be kept, and tries again by itself', async () => {
    const room = await openTwo();
    await room.press('Remove step 1');
    await room.refuse(DRAFT, { status: 503, code: 'unavailable', title: 'The desk is busy' }, 'PUT');
    expect(wordsOf(room.page.querySelector('.not-kept') as HTMLElement)).toContain('Not kept: the desk is busy.');
    expect(await stepsKept(room)).toEqual([RENAME]);
    expect(room.page.querySelector('.not-kept')).toBeNull();
  });

  it('lets the browser ask before it leaves while a change is not kept', async () => {
    const leaving = (): boolean => !window.dispatchEvent(new Event('beforeunload', { cancelable: true }));
    const room = await openTwo();
    expect(leaving()).toBe(false);
    await room.press('Remove step 1');
    expect(leaving()).toBe(true);
    await stepsKept(room);
    expect(leaving()).toBe(false);
  });

  it('starts afresh once that is confirmed', async () => {
    const room = await openTwo();
    await room.press('Start afresh');
    const dialog = room.page.querySelector('[role="dialog"]') as HTMLElement;
    expect(wordsOf(dialog)).toContain('Your 2 steps for revision 2 are taken off the list.');
    [...dialog.querySelectorAll('button')].at(-1)?.click();
    await room.settle();
    expect(await stepsKept(room)).toEqual([]);
    expect(room.text).toContain('No steps yet');
    expect(document.activeElement).toBe(room.button('Add a step'));
  });

  it('keeps what was changed last when the page is left at once', async () => {
    const room = await openWith(draftOfSteps(FEET, RENAME), ENDLESS_PAUSES);
    await room.press('Remove step 1');
    room.expectNoCall(TRIAL);
    room.link('Refits, nine yards, revision 2').click();
    await room.settle();
    expect(await stepsKept(room)).toEqual([RENAME]);
  });
});

describe('steps of another revision', () => {
  async function openFrom(draft: MendingDraft, from: object): Promise<Room> {
    const room = await open('?from=revision3');
    await room.answer(PATH, REVISION);
    await room.answer(DRAFT, draft);
    await room.answer('/api/record-revisions/revision3', from);
    await room.answer(SET, RECORD_SET);
    return room;
  }

  it('are taken into an empty list and kept; the address forgets them', async () => {
    const room = await openFrom(draftOfSteps(), MENDED);
    expect(room.text).toContain('These are the steps that made revision 3.');
    expect(await stepsKept(room)).toEqual([FEET, RENAME]);
    expect(room.address).toBe('/records/revisions/revision2/mend');
  });

  it('are said to name rows by number where these may be others here', async () => {
    const steps: MendStep[] = [{ kind: 'set-missing', column: 'Length overall', rows: [3] }, REPEATED];
    const from = {
      ...MENDED,
      basedOn: { id: 'revision1', number: 1 },
      mending: { from: 'revision1', steps, changes: [] },
    };
    const room = await openFrom(draftOfSteps(), from);
    expect(room.text).toContain('1 of them names rows by number, counted in revision 1.');
    expect(room.link('Look at the rows of step 1').getAttribute('href')).toBe(
      '/records/revisions/revision2?numbers=3#rows',
    );
    await stepsKept(room);
  });

  it('are not cautioned against on the revision that they were made on', async () => {
    const steps: MendStep[] = [{ kind: 'set-missing', column: 'Length overall', rows: [3] }];
    const room = await openFrom(draftOfSteps(), { ...MENDED, mending: { from: 'revision2', steps, changes: [] } });
    expect(room.page.querySelector('.caution')).toBeNull();
    await stepsKept(room);
  });

  it('wait for an answer where there are steps already, and can take their place', async () => {
    const room = await openFrom(draftOfSteps(REPEATED), MENDED);
    expect(room.text).toContain('Your 1 step');
    expect(room.text).toContain('The 2 steps of revision 3');
    await room.press('Take these instead');
    expect(await stepsKept(room)).toEqual([FEET, RENAME]);
    expect(room.address).toBe('/records/revisions/revision2/mend');
  });

  it('are left alone by whoever goes on with their own', async () => {
    const room = await openFrom(draftOfSteps(REPEATED), MENDED);
    await room.press('Go on with yours');
    await room.answer(TRIAL, trialOf(REPEATED_EFFECT), 'POST');
    expect(itemWords(room)).toEqual([REPEATED_EFFECT.told]);
    room.expectNoCall(DRAFT);
  });

  it.each([
    ['it came from a file', { ...REVISION, id: 'revision3', number: 3 }, 'it has no steps to take over'],
    ['it is of another set', { ...MENDED, recordSetId: 'records2' }, 'belongs to another record set'],
  ])('are not taken over where %s, which is said', async (_, from, words) => {
    const room = await openFrom(draftOfSteps(), from);
    expect(room.text).toContain(words);
    expect(room.text).toContain('No steps yet');
  });
});

describe('making the revision', () => {
  it('is not made past a step that is still being written', async () => {
    const room = await openWith(draftOfSteps(FEET));
    await room.press('Add a step');
    await room.press('Make revision 3');
    expect(room.text).toContain('A step is still being written.');
    room.expectNoCall(MAKING);
    await room.press('Cancel');
    expect(room.text).not.toContain('A step is still being written.');
  });

  it('sends the steps with the newest revision that is known, shows how far it is and opens what came out', async () => {
    const room = await openTwo();
    await room.press('Make revision 3');
    const call = await room.answer(MAKING, mendTask('queued'), 'POST');
    expect(call.request.body).toEqual({ steps: [FEET, RENAME], expectedNewest: 2 });
    await room.answer(TASK, mendTask('done'));
    expect(room.address).toBe('/records/revisions/revision3');
    room.expectNoCall(DRAFT);
  });

  it('shows the count of a running task and cancels it; nothing can be changed meanwhile', async () => {
    const room = await openTwo();
    await room.press('Make revision 3');
    await room.answer(MAKING, mendTask('queued'), 'POST');
    await room.answer(TASK, mendTask('running'));
    expect(room.text).toContain('Carrying out the steps, 1 of 2 steps');
    expect(room.page.querySelector('.columns')?.hasAttribute('inert')).toBe(true);
    await room.press('Cancel the mending');
    await room.answer(`${TASK}/cancel`, mendTask('running'), 'POST');
    expect(room.button('Cancelling').hasAttribute('disabled')).toBe(true);
  });

  it('says when it cannot be watched, and looks again when asked', async () => {
    const room = await openTwo();
    await room.press('Make revision 3');
    await room.answer(MAKING, mendTask('queued'), 'POST');
    await room.refuse(TASK, { status: 500, code: 'internal', detail: 'Try again.' });
    await room.press('Look again how far it is');
    await room.answer(TASK, mendTask('done'));
    expect(room.address).toBe('/records/revisions/revision3');
  });

  it('says that nothing was made of a cancelled task, and leaves the list as it was', async () => {
    const room = await openTwo();
    await room.press('Make revision 3');
    await room.answer(MAKING, mendTask('queued'), 'POST');
    await room.answer(TASK, mendTask('cancelled'));
    expect(said()).toContain('No revision was made');
    expect(itemWords(room)).toHaveLength(2);
    expect(makeButton(room).disabled).toBe(false);
  });

  it('says why a task failed', async () => {
    const room = await openTwo();
    await room.press('Make revision 3');
    await room.answer(MAKING, mendTask('queued'), 'POST');
    const problem = { code: 'storage-full' as const, detail: 'There is no room left. Tell your administrator.' };
    await room.answer(TASK, mendTask('failed', { problem }));
    expect(wordsOf(room.page.querySelector('[role="alert"]') as HTMLElement)).toContain('There is no room left.');
  });

  it('keeps the list before it makes anything of it', async () => {
    const room = await openWith(draftOfSteps(FEET, RENAME), ENDLESS_PAUSES);
    await room.press('Remove step 2');
    await room.press('Make revision 3');
    room.expectNoCall(MAKING);
    expect(await stepsKept(room)).toEqual([FEET]);
    await room.answer(MAKING, mendTask('queued'), 'POST');
  });

  it.each(['at once', 'at its end'])(
    'says who has added what when it is refused %s, and makes it all the same',
    async (when) => {
      const room = await openTwo();
      await room.press('Make revision 3');
      const refusal = { code: 'record-set-changed' as const, detail: 'Somebody added revision 3.' };
      if (when === 'at once') await room.refuse(MAKING, { status: 409, ...refusal }, 'POST');
      else {
        await room.answer(MAKING, mendTask('queued'), 'POST');
        await room.answer(TASK, mendTask('failed', { problem: refusal }));
      }
      const added = { ...MENDED, createdBy: { id: 'person02', name: 'Per Lund' } };
      await room.answer(SET, { ...RECORD_SET, lastNumber: added.number, revision: added });
      expect(await stepsKept(room)).toEqual([FEET, RENAME]);
      expect(room.text).toContain('Per Lund added revision 3 on 21 Oct 2026');
      expect(room.link('Look at revision 3 first').getAttribute('href')).toBe('/records/revisions/revision3');
      await room.press('Make it all the same, as revision 4');
      const call = await room.answer(MAKING, mendTask('queued'), 'POST');
      expect(call.request.body).toEqual({ steps: [FEET, RENAME], expectedNewest: 3 });
    },
  );
});
