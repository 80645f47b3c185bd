import type { HttpRequest } from '@angular/common/http';
import { TestBed } from '@angular/core/testing';
import type { ReadingProposal } from '../../../api/contract';
import { controlOf } from '../../../ui/testing/queries';
import { Room } from '../../../ui/testing/room';
import { recordsRoutes } from '../../records.routes';
import { SETTLE_MS } from '../proposed-reading';
import { INCOMING } from './incoming';

export const FILE_PATH = '/api/incoming-files/incoming1';
export const PROPOSAL_PATH = `${FILE_PATH}/proposal`;
export const BRING_IN_PATH = `${FILE_PATH}/bring-in`;
export const TASK_PATH = '/api/record-tasks/task1';

/** The second step of bringing in, opened by an analyst. */
export function openProposal(query = ''): Promise<Room> {
  TestBed.overrideProvider(SETTLE_MS, { useValue: 0 });
  const address = `/records/bring-in/incoming1${query}`;
  return Room.open({ path: 'records', routes: recordsRoutes, address, person: { roles: ['analyst'] } });
}

/** The same, with the file there and how it would be read. */
export async function readyProposal(proposal?: ReadingProposal): Promise<Room> {
  const room = await openProposal();
  await room.answer(FILE_PATH, proposal ? { ...INCOMING, proposal } : INCOMING);
  return room;
}

/** Answers a question for a proposal, and gives what was asked. */
export async function propose(room: Room, proposal: ReadingProposal): Promise<HttpRequest<unknown>> {
  return (await room.answer(PROPOSAL_PATH, proposal, 'POST')).request as HttpRequest<unknown>;
}

/** Changes a control, by its label or its accessible name, and leaves it. */
export async function enter(room: Room, name: string, value: string): Promise<void> {
  const control = controlNamed(room, name);
  control.value = value;
  control.dispatchEvent(new Event('change'));
  await room.settle();
}

export async function tickOf(room: Room, name: string): Promise<void> {
  controlNamed(room, name).click();
  await room.settle();
}

export function controlNamed({ page }: Room, name: string): HTMLInputElement {
  return page.querySelector<HTMLInputElement>(`[aria-label="${name}"]`) ?? controlOf(page, name);
}
