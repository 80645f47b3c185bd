import type { Partner, SessionPerson } from '../api/contract';
import { Room } from '../ui/testing/room';
import { partnerAreaRoutes } from './partner-area.routes';
import { partnersRoutes } from './partners.routes';
import { boatPages, pellAndTarn } from './testing/pell-and-tarn';

const PATH = '/api/partners/partner0pell';
const SITES = `${PATH}/sites`;
const SITE = pellAndTarn.sites[0];

interface Opening {
  readonly person?: Partial<SessionPerson>;
  readonly partner?: Partial<Partner>;
}

function enter(person?: Partial<SessionPerson>): Promise<Room> {
  return Room.open({ path: 'partners', routes: partnersRoutes, address: '/partners/partner0pell', person });
}

async function open({ person, partner }: Opening = {}): Promise<Room> {
  const room = await enter(person);
  await room.answer(PATH, { ...pellAndTarn, ...partner });
  return room;
}

describe('PartnerPage', () => {
  it('says what it is reading while it waits', async () => {
    expect((await enter()).text).toContain('Reading the partner');
  });

  it('says what went wrong and reads again when asked', async () => {
    const room = await enter();
    await room.refuse(PATH, { status: 404, code: 'not-found', title: 'There is no such partner' });
    expect(room.page.querySelector('[role="alert"]')?.textContent).toContain('There is no such partner');
    await room.press('Try again');
    await room.answer(PATH, pellAndTarn);
    expect(room.has('h1', 'Pell & Tarn Brokers')).toBe(true);
  });

  it('shows sites, and keys with the live ones first', async () => {
    const room = await open();
    expect(room.cells(0, 'Table of sites')).toEqual([SITE.origin]);
    expect(room.cells(0, 'Table of keys')).toEqual(['Boat pages Embed key', 'Trial page Embed key']);
    expect(room.cells(1, 'Table of keys')[0]).toMatch(/^9v3b7n5c ?ends in x8Qd$/);
    expect(room.cells(4, 'Table of keys')).toEqual(['812 no quota', '812 of 1,000']);
  });

  it('says what belongs where there is neither key nor site', async () => {
    const room = await open({ partner: { keys: [], sites: [] } });
    expect(room.text).toContain('No key is issued');
    expect(room.text).toContain('No site is listed');
  });

  it('lets someone who only reads change nothing', async () => {
    const room = await open({ person: { roles: ['analyst'] } });
    for (const name of ['Change name', 'Issue a key', 'List a site', 'Take off', 'Revoke'])
      expect(room.has('button', name)).toBe(false);
  });

  it('changes name and contact, starting from what they are', async () => {
    const room = await open();
    await room.press('Change name or contact');
    expect(room.valueOf('Name')).toBe('Pell & Tarn Brokers');
    await room.type('Name', 'Pell, Tarn & Daughters');
    await room.press('Keep changes');
    const call = await room.answer(PATH, { ...pellAndTarn, name: 'Pell, Tarn & Daughters' }, 'PATCH');
    expect(call.request.body).toEqual({ name: 'Pell, Tarn & Daughters', contactEmail: 'web@pellandtarn.example' });
    expect(room.has('h1', 'Pell, Tarn & Daughters')).toBe(true);
  });
});

describe('a partner’s developer', () => {
  it('is led straight to their own partner, with its sites and keys to keep', async () => {
    const person = { roles: ['partner-developer' as const], partnerId: 'partner0pell' };
    const room = await Room.open({ path: 'partner-area', routes: partnerAreaRoutes, address: '/partner-area', person });
    await room.answer(PATH, pellAndTarn);
    expect(room.has('h1', 'Pell & Tarn Brokers')).toBe(true);
    expect(room.has('button', 'Issue a key')).toBe(true);
    expect(room.has('button', 'List a site')).toBe(true);
    expect(room.has('button', 'Change name')).toBe(false);
    expect(room.has('a', 'Partners')).toBe(false);
    expect(room.link('Read the documentation').getAttribute('href')).toBe('/docs');
  });
});

describe('listing a site', () => {
  async function type(origin: string): Promise<Room> {
    const room = await open();
    await room.press('List a site');
    await room.type('Origin', origin);
    await room.press('List the site');
    return room;
  }

  it('sends the origin as a browser has it and shows it in the list', async () => {
    const room = await type('https://Boats.PellAndTarn.example/');
    const call = await room.answer(
      SITES,
      { ...SITE, id: 'site000boats', origin: 'https://boats.pellandtarn.example' },
      'POST',
    );
    expect(call.request.body).toEqual({ origin: 'https://boats.pellandtarn.example' });
    expect(room.text).toContain('https://boats.pellandtarn.example');
    expect(room.has('button', 'List the site')).toBe(false);
  });

  it('refuses a path with the origin it would come to, and sends nothing', async () => {
    const room = await type('https://www.pellandtarn.example/boats');
    expect(room.complaintOf('Origin')).toContain('https://www.pellandtarn.example');
    room.expectNoCall(SITES);
  });

  it('keeps what was typed when the service refuses, and says why beside the field', async () => {
    const room = await type('https://www.pellandtarn.example');
    const errors = [{ detail: 'It is listed already.', pointer: '#/origin' }];
    await room.refuse(SITES, { status: 409, code: 'site-taken', errors }, 'POST');
    expect(room.complaintOf('Origin')).toBe('It is listed already.');
    expect(room.valueOf('Origin')).toBe('https://www.pellandtarn.example');
  });
});

describe('taking a site off the list', () => {
  it('names what stops working before it is done', async () => {
    const room = await open();
    await room.press('Take off https://www');
    expect(room.has('h2', `Take ${SITE.origin} off the list?`)).toBe(true);
    expect(room.text).toContain('“Boat pages”');
    expect(room.text).toContain('embed keys are then answered nowhere');
  });

  it('does nothing when it is cancelled', async () => {
    const room = await open();
    await room.press('Take off https://www');
    await room.press('Cancel');
    room.expectNoCall(`${SITES}/${SITE.id}`);
  });

  it('takes it off when it is confirmed', async () => {
    const room = await open();
    await room.press('Take off https://www');
    await room.press('Take off the list');
    await room.answer(`${SITES}/${SITE.id}`, null, 'DELETE');
    expect(room.text).toContain('No site is listed');
  });

  it('leaves it on the list when the service refuses, and says why', async () => {
    const room = await open();
    await room.press('Take off https://www');
    await room.press('Take off the list');
    await room.refuse(
      `${SITES}/${SITE.id}`,
      { status: 503, code: 'unavailable', title: 'The service cannot answer' },
      'DELETE',
    );
    expect(room.text).toContain('The service cannot answer');
    expect(room.cells(0, 'Table of sites')).toEqual([SITE.origin]);
  });
});

describe('revoking a key', () => {
  const REVOKE = `/api/keys/${boatPages.id}/revoke`;

  it('names the pages that stop answering, and revokes when it is confirmed', async () => {
    const room = await open();
    await room.press('Revoke Boat pages');
    expect(room.has('h2', 'Revoke the key “Boat pages”?')).toBe(true);
    expect(room.text).toContain(`on ${SITE.origin} stops answering at once`);
    await room.press('Revoke the key');
    await room.answer(REVOKE, { ...boatPages, state: 'revoked', revokedAt: '2026-12-01T10:00:00Z' }, 'POST');
    expect(room.has('button', 'Revoke')).toBe(false);
  });

  it('leaves the key live when the service refuses, and says why', async () => {
    const room = await open();
    await room.press('Revoke Boat pages');
    await room.press('Revoke the key');
    await room.refuse(REVOKE, { status: 503, code: 'unavailable', title: 'The service cannot answer' }, 'POST');
    expect(room.text).toContain('The service cannot answer');
    expect(room.has('button', 'Revoke Boat pages')).toBe(true);
  });
});
