import { Room } from '../ui/testing/room';
import { invitationRoutes } from './invitation.routes';

const TOKEN = 'Vx3nQ9dK2mT7pL0sW8yB4hR6';
const PATH = `/api/invitations/${TOKEN}`;
const WORDS = 'nine quiet herons wade';

function enter(): Promise<Room> {
  return Room.open({ path: 'invitations', routes: invitationRoutes, address: `/invitations/${TOKEN}` });
}

async function open(): Promise<Room> {
  const room = await enter();
  await room.answer(PATH, { name: 'Odile Marsh', email: 'odile@marlbay.example', expiresAt: '2026-12-08T10:00:00Z' });
  return room;
}

describe('InvitationPage', () => {
  it('says what it is reading while it waits', async () => {
    expect((await enter()).text).toContain('Reading the invitation');
  });

  it('says whom it is for and until when', async () => {
    const room = await open();
    expect(room.text).toContain('Odile Marsh');
    expect(room.text).toContain('8 Dec 2026');
    expect(room.valueOf('E-mail address')).toBe('odile@marlbay.example');
  });

  it.each(['invitation-spent', 'not-found'] as const)('says what to do when it no longer works (%s)', async (code) => {
    const room = await enter();
    await room.refuse(PATH, { status: 410, code });
    expect(room.has('h1', 'This invitation no longer works')).toBe(true);
    expect(room.text).toContain('ask an administrator');
    expect(room.link('sign in').getAttribute('href')).toBe('/sign-in');
  });

  it('reads again when asked, where something else went wrong', async () => {
    const room = await enter();
    await room.refuse(PATH, { status: 503, code: 'unavailable' });
    expect(room.has('h1', 'The invitation could not be read')).toBe(true);
    await room.press('Try again');
    await room.answer(PATH, { name: 'Odile Marsh', email: 'odile@marlbay.example', expiresAt: '2026-12-08T10:00:00Z' });
    expect(room.has('h1', 'Set your password')).toBe(true);
  });
});

describe('setting the password', () => {
  it('sends it and goes on to sign in', async () => {
    const room = await open();
    await room.type('New password', WORDS);
    await room.press('Set the password');
    const call = await room.answer(PATH, null, 'POST');
    expect(call.request.body).toEqual({ password: WORDS });
    expect(room.address).toBe('/sign-in');
  });

  it('sends nothing that is too short, and says how many characters it has', async () => {
    const room = await open();
    await room.type('New password', 'nine quiet');
    await room.press('Set the password');
    expect(room.complaintOf('New password')).toContain('it has 10 of at least 15');
    expect(room.valueOf('New password')).toBe('nine quiet');
  });

  it('keeps what was typed when the service finds it weak, and says why beside it', async () => {
    const room = await open();
    await room.type('New password', 'passwordpassword');
    await room.press('Set the password');
    const errors = [{ detail: 'It says the same thing again and again.', pointer: '#/password' }];
    await room.refuse(PATH, { code: 'password-too-weak', errors }, 'POST');
    expect(room.complaintOf('New password')).toBe('It says the same thing again and again.');
    expect(room.valueOf('New password')).toBe('passwordpassword');
  });

  it('shows and hides the password', async () => {
    const room = await open();
    const type = () => room.page.querySelector<HTMLInputElement>('input[name="password"]')?.type;
    expect(type()).toBe('password');
    await room.tick('Show the password');
    expect(type()).toBe('text');
  });

  it('tells a password manager what is what', async () => {
    const room = await open();
    const tokens = [...room.page.querySelectorAll('form input')].map((input) => input.getAttribute('autocomplete'));
    expect(tokens).toEqual(expect.arrayContaining(['username', 'new-password']));
  });
});
