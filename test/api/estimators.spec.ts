import { startTestService, type TestAgent, type TestService } from '../support/test-service';

const refitLabour = {
  slug: 'refit-labour',
  name: 'Refit labour',
  targetName: 'Labour',
  unit: 'h',
  cautions: ['An estimate is not a quotation.'],
};

describe('estimators', () => {
  let service: TestService;
  let analyst: TestAgent;
  beforeAll(async () => {
    service = await startTestService();
    analyst = await service.as('analyst');
  });
  afterAll(() => service.close());

  it('are named by an analyst and begin with nothing in force', async () => {
    const created = await analyst.post('/api/estimators').send(refitLabour);
    expect(created.status).toBe(201);
    expect(created.body).toMatchObject({
      ...refitLabour,
      description: '',
      inForce: null,
      fitCount: 0,
      editionCount: 0,
      estimateCount: 0,
    });
    expect(created.body.createdBy).toEqual({ id: analyst.person.id, name: analyst.person.name });
    const read = await (await service.as('viewer')).get('/api/estimators/refit-labour');
    expect(read.body).toEqual(created.body);
  });

  it('have public names of their own', async () => {
    const again = await analyst.post('/api/estimators').send({ ...refitLabour, name: 'Another' });
    expect(again.status).toBe(409);
    expect(again.body.code).toBe('slug-taken');
  });

  it('refuse a public name that cannot stand in an address', async () => {
    const wrong = await analyst.post('/api/estimators').send({ ...refitLabour, slug: 'Refit Labour' });
    expect(wrong.status).toBe(400);
    expect(wrong.body.errors[0].pointer).toBe('#/slug');
  });

  it('keep the words that a change does not name', async () => {
    const changed = await analyst
      .patch('/api/estimators/refit-labour')
      .send({ intendedUse: 'Planning the winter.', cautions: [] });
    expect(changed.body).toMatchObject({ name: 'Refit labour', intendedUse: 'Planning the winter.', cautions: [] });
  });

  it('are listed by name, a page at a time', async () => {
    await analyst
      .post('/api/estimators')
      .send({ slug: 'crane-time', name: 'Crane time', targetName: 'Time', unit: 'min' })
      .expect(201);
    const first = await analyst.get('/api/estimators?limit=1');
    const second = await analyst.get('/api/estimators?limit=1&offset=1');
    expect(first.body.total).toBe(2);
    expect([first, second].map((page) => page.body.items[0].slug)).toEqual(['crane-time', 'refit-labour']);
  });

  it('answer 404 for a name that nobody gave', async () => {
    expect((await analyst.get('/api/estimators/no-such')).body.code).toBe('not-found');
    expect((await analyst.patch('/api/estimators/no-such').send({ name: 'New' })).status).toBe(404);
  });

  it('tell the journal who named and changed them', async () => {
    const notes = await service.services
      .knex('journal')
      .where({ subjectKind: 'estimator' })
      .orderBy('id')
      .pluck('action');
    expect(notes).toEqual(['estimator-created', 'estimator-changed', 'estimator-created']);
  });
});
