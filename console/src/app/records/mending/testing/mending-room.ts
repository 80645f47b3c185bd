import { TestBed } from '@angular/core/testing';
import type { MendStep, MendingDraft } from '../../../api/contract';
import { Announcer } from '../../../ui/announcer';
import { wordsOf } from '../../../ui/testing/queries';
import { Room } from '../../../ui/testing/room';
import { recordsRoutes } from '../../records.routes';
import { FEET, FEET_EFFECT, RENAME, RENAME_EFFECT, draftOfSteps, trialOf } from '../../testing/mending';
import { RECORD_SET, REVISION } from '../../testing/refits';
import { MENDING_PAUSES } from '../mending-pauses';

export const PATH = '/api/record-revisions/revision2';
export const TRIAL = `${PATH}/mending-trial`;
export const DRAFT = `${PATH}/mending-draft`;
export const MAKING = `${PATH}/mended-revisions`;
export const SET = '/api/record-sets/records1';
export const TASK = '/api/record-tasks/task00000001';

export const NO_HULL = {
  status: 400,
  detail: 'Mend step 2.',
  errors: [{ pointer: '#/steps/1', detail: 'There is no column Hull at this step.' }],
};

export const NO_PAUSES = { betweenEditsMs: 0, beforeRetryMs: 0 };
/** Longer than any test: what waits for them is never done by itself. */
export const ENDLESS_PAUSES = { betweenEditsMs: 600_000, beforeRetryMs: 600_000 };

export async function open(query = '', pauses = NO_PAUSES): Promise<Room> {
  TestBed.overrideProvider(MENDING_PAUSES, { useValue: pauses });
  const address = `/records/revisions/revision2/mend${query}`;
  return Room.open({ path: 'records', routes: recordsRoutes, address, person: { roles: ['analyst'] } });
}

export async function openWith(draft: MendingDraft, pauses = NO_PAUSES): Promise<Room> {
  const room = await open('', pauses);
  await room.answer(PATH, REVISION);
  await room.answer(DRAFT, draft);
  await room.answer(SET, RECORD_SET);
  return room;
}

/** Opened with two steps that can be done. */
export async function openTwo(): Promise<Room> {
  const room = await openWith(draftOfSteps(FEET, RENAME));
  await room.answer(TRIAL, trialOf(FEET_EFFECT, RENAME_EFFECT), 'POST');
  return room;
}

export async function stepsKept(room: Room): Promise<readonly MendStep[]> {
  const call = await room.answer(DRAFT, draftOfSteps(FEET), 'PUT');
  return (call.request.body as { steps: MendStep[] }).steps;
}

export const items = (room: Room): HTMLElement[] => [...room.page.querySelectorAll<HTMLElement>('tb-step-list li')];
export const itemWords = (room: Room): readonly string[] =>
  items(room).map((item) => wordsOf(item.querySelector('.words') ?? item));
export const makeButton = (room: Room): HTMLButtonElement => room.button('Make revision') as HTMLButtonElement;
export const said = (): string => TestBed.inject(Announcer).text();

export async function key(room: Room, pressed: KeyboardEventInit, target: EventTarget = document.body): Promise<void> {
  target.dispatchEvent(new KeyboardEvent('keydown', { key: 'z', ctrlKey: true, bubbles: true, ...pressed }));
  await room.settle();
}
