import type { MendStep } from '../../api/contract';
import { wordsOf } from '../../ui/testing/queries';
import {
  FEET,
  FEET_EFFECT,
  RENAME,
  RENAME_EFFECT,
  REPEATED,
  REPEATED_EFFECT,
  draftOfSteps,
  trialOf,
} from '../testing/mending';
import { RECORD_SET, REVISION } from '../testing/refits';
import {
  PATH,
  TRIAL,
  DRAFT,
  SET,
  NO_HULL,
  ENDLESS_PAUSES,
  open,
  openWith,
  openTwo,
  stepsKept,
  items,
  itemWords,
  makeButton,
  said,
  key,
} from './testing/mending-room';

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
