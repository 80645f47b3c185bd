import { openBoatDesk, type BoatDesk } from '../support/boat-desk';
import { startTestService, type TestAgent, type TestService } from '../support/test-service';

describe('changing a set', () => {
  let service: TestService;
  let analyst: TestAgent;
  let colleague: TestAgent;
  let desk: BoatDesk;
  beforeAll(async () => {
    service = await startTestService();
    analyst = await service.as('analyst');
    colleague = await service.signIn(await service.addPerson(['analyst'], { name: 'Odile Marsh' }));
    desk = await openBoatDesk(service, analyst);
  });
  afterAll(() => service.close());

  it('changes its words and date, and the journal says what', async () => {
    const set = await desk.bringIn();
    service.clock.advance(1000);
    const change = { name: ' Boats of the north ', description: 'Six years', retainUntil: '2027-06-30' };
    const changed = await analyst.patch(`/api/record-sets/${set.id}`).send({ ...change, changedAt: set.changedAt });
    expect(changed.status).toBe(200);
    expect(changed.body).toMatchObject({ ...change, name: 'Boats of the north' });
    expect(changed.body.changedAt > set.changedAt).toBe(true);
    expect((await desk.journalOf(set.id)).at(-1)).toMatchObject({
      action: 'record-set-changed',
      actorId: analyst.person.id,
      summary: `The record set ${set.name}: it is called Boats of the north now; its description was changed; its rows are kept until 2027-06-30`,
    });
  });

  it('leaves what is absent alone, and null takes the date away', async () => {
    const set = await desk.bringIn();
    await analyst.patch(`/api/record-sets/${set.id}`).send({ description: 'A', retainUntil: '2027-01-01' });
    const { body } = await analyst.patch(`/api/record-sets/${set.id}`).send({ retainUntil: null });
    expect(body).toMatchObject({ name: set.name, description: 'A', retainUntil: null });
  });

  it('tells whoever comes second who was first, when, and what they changed', async () => {
    const set = await desk.bringIn();
    service.clock.advance(90_000);
    await colleague
      .patch(`/api/record-sets/${set.id}`)
      .send({ description: 'By Odile', changedAt: set.changedAt })
      .expect(200);
    service.clock.advance(90_000);
    const late = await analyst
      .patch(`/api/record-sets/${set.id}`)
      .send({ description: 'By the other', changedAt: set.changedAt });
    expect([late.status, late.body.code]).toEqual([409, 'record-set-changed']);
    expect(late.body.detail).toContain('Odile Marsh changed it on 2026-11-03 at 09:');
    expect(late.body.detail).toContain('its description was changed');
    const { body } = await analyst.get(`/api/record-sets/${set.id}`);
    expect(body.description).toBe('By Odile');
    await analyst
      .patch(`/api/record-sets/${set.id}`)
      .send({ description: 'By both', changedAt: body.changedAt })
      .expect(200);
  });

  it('counts a revision that a colleague added as a change', async () => {
    const set = await desk.bringIn();
    service.clock.advance(1000);
    await desk.mend(set.revision.id);
    const late = await colleague.patch(`/api/record-sets/${set.id}`).send({ name: 'X', changedAt: set.changedAt });
    expect(late.body.code).toBe('record-set-changed');
    expect(late.body.detail).toContain('was mended from revision 1');
  });

  it('refuses a day in the past and a name in use, and changes nothing', async () => {
    const [set, other] = [await desk.bringIn(), await desk.bringIn()];
    const past = await analyst.patch(`/api/record-sets/${set.id}`).send({ name: 'New', retainUntil: '2026-11-02' });
    expect(past.status).toBe(400);
    expect(past.body.errors[0].pointer).toBe('#/retainUntil');
    await analyst.patch(`/api/record-sets/${set.id}`).send({ retainUntil: '2026-11-03' }).expect(200);
    const taken = await analyst.patch(`/api/record-sets/${set.id}`).send({ name: other.name.toUpperCase() });
    expect([taken.status, taken.body.code]).toEqual([409, 'name-taken']);
    expect((await analyst.get(`/api/record-sets/${set.id}`)).body.name).toBe(set.name);
  });
});
