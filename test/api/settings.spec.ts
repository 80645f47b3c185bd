import { startTestService, type TestAgent, type TestService } from '../support/test-service';

// A sign-in hashes for half a second on purpose, and longer where other tests share the processor.
jest.setTimeout(30_000);

describe('settings', () => {
  let service: TestService;
  let administrator: TestAgent;
  beforeAll(async () => {
    service = await startTestService();
    administrator = await service.as('administrator');
  });
  afterAll(() => service.close());

  it('are changed one by one; what is left out stays', async () => {
    await administrator.patch('/api/settings').send({ contactEmail: 'desk@marlbay.example' }).expect(200);
    const changed = await administrator.patch('/api/settings').send({ deskName: ' Marl Bay ' }).expect(200);
    expect(changed.body).toEqual({ deskName: 'Marl Bay', contactEmail: 'desk@marlbay.example' });
    const session = await (await service.as('viewer')).get('/api/session').expect(200);
    expect(session.body.deskName).toBe('Marl Bay');
  });

  it('leave a journal entry for each that really differs', async () => {
    await administrator
      .patch('/api/settings')
      .send({ deskName: 'North desk', contactEmail: 'desk@marlbay.example' })
      .expect(200);
    await administrator.patch('/api/settings').send({ deskName: 'North desk' }).expect(200);
    const { body } = await administrator.get('/api/journal?subjectKind=setting&limit=1').expect(200);
    expect(body.items[0]).toMatchObject({
      action: 'setting-changed',
      subjectId: 'deskName',
      summary: 'The name of the desk is now North desk; it was Marl Bay',
    });
    expect(body.total).toBe(3);
  });

  it('are read by everyone at the desk and changed by administrators', async () => {
    const viewer = await service.as('viewer');
    await viewer.get('/api/settings').expect(200);
    await viewer.patch('/api/settings').send({ deskName: 'Mine' }).expect(403);
  });

  it('refuse a blank name and an address that is none', async () => {
    expect((await administrator.patch('/api/settings').send({ deskName: '  ' })).body.code).toBe('request-invalid');
    expect((await administrator.patch('/api/settings').send({ contactEmail: 'desk' })).body.code).toBe(
      'request-invalid',
    );
  });
});
