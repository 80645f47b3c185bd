import { Room } from '../ui/testing/room';
import { peopleRoutes } from './people.routes';
import { bram, greta, ines, odile } from './testing/yard-people';

const PATH = '/api/people';
const PARTNERS = '/api/partners';
const partners = { items: [{ id: 'partner0pell', name: 'Pell & Tarn Brokers' }], total: 1 };

function enter(): Promise<Room> {
  return Room.open({ path: 'people', routes: peopleRoutes, address: '/people' });
}

async function open(people = [ines, odile, greta, bram]): Promise<Room> {
  const room = await enter();
  await room.answer(PATH, { items: people, total: people.length });
  await room.answer(PARTNERS, partners);
  return room;
}

describe('PeoplePage', () => {
  it('says what it is reading while it waits', async () => {
    expect((await enter()).text).toContain('Reading the people');
  });

  it('says what belongs here when nobody is listed', async () => {
    expect((await open([])).text).toContain('Nobody is listed');
  });

  it('says what went wrong and reads again when asked', async () => {
    const room = await enter();
    await room.refuse(PATH, { status: 503, code: 'unavailable', detail: 'The database is busy.' });
    expect(room.page.querySelector('[role="alert"]')?.textContent).toContain('The database is busy.');
    await room.press('Try again');
    await room.answer(PATH, { items: [ines], total: 1 });
    expect(room.cells(0)).toEqual(['Ines Caldwell (you)']);
  });

  it('lists people by name with their roles, their partner and their state', async () => {
    const room = await open();
    expect(room.cells(0)).toEqual(['Bram Pell', 'Greta Hollin', 'Ines Caldwell (you)', 'Odile Marsh']);
    expect(room.cells(2)).toEqual([
      'Partner developer Pell & Tarn Brokers',
      'Reviewer',
      'Administrator, Analyst',
      'Viewer',
    ]);
    expect(room.cells(3)).toEqual(['Active', 'Closed', 'Active', 'Invited']);
    expect(room.cells(4)[3]).toBe('Never');
  });

  it('offers no desk role to a partner’s developer', async () => {
    expect((await open()).has('button', 'Change roles of Bram Pell')).toBe(false);
  });
});

describe('inviting a person', () => {
  async function fill(): Promise<Room> {
    const room = await open();
    await room.press('Invite a person');
    await room.type('Name', 'Runa Holt');
    await room.type('E-mail', 'runa@marlbay.example');
    return room;
  }

  const invited = {
    person: { ...odile, id: 'person00runa', name: 'Runa Holt' },
    invitationUrl: 'https://desk.example/invitations/abc',
    expiresAt: '2026-12-08T11:00:00Z',
  };

  it('says in one line what each role allows', async () => {
    const room = await fill();
    expect(room.text).toContain('Analyst Brings in records, makes fits and draws up editions.');
  });

  it('sends name, address and roles, and shows the link until it is put away', async () => {
    const room = await fill();
    await room.tick('Analyst');
    await room.tick('Reviewer');
    await room.press('Invite');
    const call = await room.answer(PATH, invited, 'POST');
    expect(call.request.body).toEqual({
      name: 'Runa Holt',
      email: 'runa@marlbay.example',
      roles: ['analyst', 'reviewer'],
      partnerId: null,
    });
    expect(room.text).toContain('https://desk.example/invitations/abc');
    expect(room.cells(0)).toContain('Runa Holt');
    await room.press('Done');
    expect(room.text).not.toContain('https://desk.example/invitations/abc');
  });

  it('says to pass the link on where the mail could not be sent', async () => {
    const room = await fill();
    await room.tick('Viewer');
    await room.press('Invite');
    await room.answer(PATH, { ...invited, mailSent: false }, 'POST');
    expect(room.text).toContain('pass the link on yourself');
  });

  it('bars desk roles for a partner’s developer and asks for the partner', async () => {
    const room = await fill();
    await room.tick('Analyst');
    await room.tick('Partner developer');
    expect(room.page.querySelectorAll('input[type="checkbox"]:disabled')).toHaveLength(4);
    await room.press('Invite');
    expect(room.text).toContain('Choose the partner they develop for');
    await room.choose('Partner', 'partner0pell');
    await room.press('Invite');
    const call = await room.answer(PATH, invited, 'POST');
    expect(call.request.body).toMatchObject({ roles: ['partner-developer'], partnerId: 'partner0pell' });
  });

  it('asks for a role before it sends anything', async () => {
    const room = await fill();
    await room.press('Invite');
    expect(room.page.querySelector('fieldset.tb-complained')?.textContent).toContain('Choose at least one role');
    room.expectNoCall(PATH);
  });

  it('keeps what was typed when the address is in use, and says so beside it', async () => {
    const room = await fill();
    await room.tick('Viewer');
    await room.press('Invite');
    const errors = [{ detail: 'Ines Caldwell is entered with this address.', pointer: '#/email' }];
    await room.refuse(PATH, { status: 409, code: 'email-taken', errors }, 'POST');
    expect(room.complaintOf('E-mail')).toBe('Ines Caldwell is entered with this address.');
    expect(room.valueOf('Name')).toBe('Runa Holt');
  });

  it('gives somebody invited a new link', async () => {
    const room = await open();
    await room.press('New link for Odile Marsh');
    const call = await room.answer(PATH, { ...invited, person: odile }, 'POST');
    expect(call.request.body).toMatchObject({ email: 'odile@marlbay.example', roles: ['viewer'] });
    expect(room.text).toContain('https://desk.example/invitations/abc');
    expect(room.cells(0)).toHaveLength(4);
  });
});

describe('changing what a person may do', () => {
  it('starts from their roles and sends the new ones', async () => {
    const room = await open();
    await room.press('Change roles of Ines Caldwell');
    await room.tick('Reviewer');
    await room.press('Keep the roles');
    const roles = ['administrator', 'analyst', 'reviewer'];
    const call = await room.answer(`${PATH}/${ines.id}`, { ...ines, roles }, 'PATCH');
    expect(call.request.body).toEqual({ roles });
    expect(room.cells(2)).toContain('Administrator, Analyst, Reviewer');
  });

  it('keeps the choice when the service refuses, and says why', async () => {
    const room = await open([ines]);
    await room.press('Change roles of Ines Caldwell');
    await room.tick('Administrator');
    await room.press('Keep the roles');
    await room.refuse(
      `${PATH}/${ines.id}`,
      { status: 409, code: 'last-administrator', title: 'The desk needs an administrator' },
      'PATCH',
    );
    expect(room.text).toContain('The desk needs an administrator');
    expect(room.page.querySelector<HTMLInputElement>('tb-role-choice input')?.checked).toBe(false);
  });

  it('closes a person’s access once what it means has been confirmed', async () => {
    const room = await open();
    await room.press('Close Odile Marsh');
    expect(room.text).toContain('Odile Marsh is signed out everywhere at once');
    await room.press('Close access');
    const call = await room.answer(`${PATH}/${odile.id}`, { ...odile, state: 'closed' }, 'PATCH');
    expect(call.request.body).toEqual({ closed: true });
    expect(room.has('button', 'Reopen Odile Marsh')).toBe(true);
  });

  it('closes nothing when it is cancelled', async () => {
    const room = await open();
    await room.press('Close Odile Marsh');
    await room.press('Cancel');
    room.expectNoCall(`${PATH}/${odile.id}`);
  });

  it('reopens, saying as what they can sign in again', async () => {
    const room = await open();
    await room.press('Reopen Greta Hollin');
    expect(room.text).toContain('Greta Hollin can sign in again, as Reviewer.');
    await room.press('Reopen access');
    const call = await room.answer(`${PATH}/${greta.id}`, { ...greta, state: 'active' }, 'PATCH');
    expect(call.request.body).toEqual({ closed: false });
  });
});
