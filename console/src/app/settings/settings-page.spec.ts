import { TestBed } from '@angular/core/testing';
import type { SessionPerson } from '../api/contract';
import { SessionStore } from '../api/session-store';
import { Room } from '../ui/testing/room';
import { settingsRoutes } from './settings.routes';

const PATH = '/api/settings';
const settings = { deskName: 'Marl Bay Yard Federation', contactEmail: 'desk@marlbay.example' };

function enter(person?: Partial<SessionPerson>): Promise<Room> {
  return Room.open({ path: 'settings', routes: settingsRoutes, address: '/settings', person });
}

async function open(person?: Partial<SessionPerson>): Promise<Room> {
  const room = await enter(person);
  await room.answer(PATH, settings);
  return room;
}

describe('SettingsPage', () => {
  it('says what it is reading while it waits, and already who is signed in', async () => {
    const room = await enter({ roles: ['analyst', 'reviewer'] });
    expect(room.text).toContain('Reading the settings');
    expect(room.text).toContain('ines@marlbay.example');
    expect(room.text).toContain('Analyst, Reviewer');
  });

  it('says what went wrong and reads again when asked', async () => {
    const room = await enter();
    await room.refuse(PATH, { status: 503, code: 'unavailable', detail: 'The database is busy.' });
    expect(room.text).toContain('The database is busy.');
    await room.press('Try again');
    await room.answer(PATH, settings);
    expect(room.valueOf('Name')).toBe('Marl Bay Yard Federation');
  });

  it('lets only an administrator change the desk', async () => {
    const room = await open({ roles: ['viewer'] });
    expect(room.has('button', 'Keep the settings')).toBe(false);
    expect(room.text).toContain('desk@marlbay.example');
  });

  it('keeps a change and renames the desk everywhere at once', async () => {
    const room = await open();
    await room.type('Name', 'Marl Bay Yards');
    await room.press('Keep the settings');
    const call = await room.answer(PATH, { ...settings, deskName: 'Marl Bay Yards' }, 'PATCH');
    expect(call.request.body).toEqual({ deskName: 'Marl Bay Yards', contactEmail: 'desk@marlbay.example' });
    expect(room.text).toContain('Kept.');
    expect(TestBed.inject(SessionStore).deskName()).toBe('Marl Bay Yards');
  });

  it('sends nothing while a field is wrong, and says what is wrong beside it', async () => {
    const room = await open();
    await room.type('Contact e-mail', 'desk');
    await room.press('Keep the settings');
    expect(room.complaintOf('Contact e-mail')).toContain('Enter an e-mail address');
    room.expectNoCall(PATH);
  });

  it('keeps what was typed when the service refuses', async () => {
    const room = await open();
    await room.type('Name', 'Marl Bay Yards');
    await room.press('Keep the settings');
    await room.refuse(PATH, { status: 503, code: 'unavailable', title: 'The service cannot answer' }, 'PATCH');
    expect(room.text).toContain('The service cannot answer');
    expect(room.valueOf('Name')).toBe('Marl Bay Yards');
  });
});
