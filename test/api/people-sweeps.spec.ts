import { sweepInvitations } from '../../service/src/jobs/sweep-invitations';
import { sweepSignInAttempts } from '../../service/src/jobs/sweep-sign-in-attempts';
import { InvitationsStore } from '../../service/src/people/invitations-store';
import { SignInThrottle } from '../../service/src/people/sign-in-throttle';
import { startTestService, type TestService } from '../support/test-service';

const dayMs = 24 * 60 * 60 * 1000;

// A sign-in hashes for half a second on purpose, and longer where other tests share the processor.
jest.setTimeout(30_000);

describe('sweeping', () => {
  let service: TestService;
  beforeAll(async () => void (service = await startTestService()));
  afterAll(() => service.close());

  it('removes invitations a month after they ended and leaves open ones', async () => {
    const { database, clock, knex } = service.services;
    const person = await service.addPerson(['viewer']);
    const time = (days: number): string => new Date(clock.now().getTime() + days * dayMs).toISOString();
    const row = (id: string, expiresAt: string, spentAt: string | null) => ({
      id,
      personId: person.id,
      tokenHash: id,
      expiresAt,
      spentAt,
      createdAt: time(-60),
    });
    await knex('invitations').insert([
      row('expired', time(-31), null),
      row('spent', time(3), time(-31)),
      row('lately', time(-29), null),
      row('open', time(3), null),
    ]);
    await sweepInvitations(new InvitationsStore(database), clock).run();
    expect(await knex('invitations').orderBy('id').pluck('id')).toEqual(['lately', 'open']);
  });

  it('forgets failed sign-ins after a day', async () => {
    const { database, clock, knex } = service.services;
    const throttle = new SignInThrottle(database, clock);
    await throttle.recordFailure({ account: 'old@desk.example', address: '192.0.2.1' });
    service.clock.advance(dayMs + 1);
    await throttle.recordFailure({ account: 'new@desk.example', address: '192.0.2.2' });
    await sweepSignInAttempts(throttle).run();
    expect(await knex('signInAttempts').orderBy('subject').pluck('subject')).toEqual([
      'account:new@desk.example',
      'address:192.0.2.2',
    ]);
  });
});
