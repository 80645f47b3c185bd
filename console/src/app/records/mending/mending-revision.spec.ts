import type { MendStep, MendingDraft } from '../../api/contract';
import { wordsOf } from '../../ui/testing/queries';
import type { Room } from '../../ui/testing/room';
import { FEET, MENDED, RENAME, REPEATED, REPEATED_EFFECT, draftOfSteps, mendTask, trialOf } from '../testing/mending';
import { RECORD_SET, REVISION } from '../testing/refits';
import {
  PATH,
  TRIAL,
  DRAFT,
  MAKING,
  SET,
  TASK,
  ENDLESS_PAUSES,
  open,
  openWith,
  openTwo,
  stepsKept,
  itemWords,
  makeButton,
  said,
} from './testing/mending-room';

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
