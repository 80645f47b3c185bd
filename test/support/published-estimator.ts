import { addRevision, boatColumns } from './record-fixture';
import type { TestAgent, TestPerson, TestService } from './test-service';

export const refitLabour = {
  slug: 'refit-labour',
  name: 'Refit labour',
  targetName: 'Labour',
  unit: 'h',
  cautions: ['An estimate is not a quotation.'],
};

export const boatSpecification = {
  target: { column: 'hours' },
  inputs: [
    { column: 'length overall', label: 'Length overall', help: 'Without the bowsprit.' },
    { column: 'beam' },
    { column: 'hull', label: 'Hull material' },
    { column: 'ballast', missing: 'typical' },
  ],
  method: 'ridge',
};

/** A case that the records cover. */
export const boat = { 'length overall': 11.5, beam: 3.9, hull: 'steel', ballast: 3.1 };

export interface Desk {
  readonly analyst: TestAgent;
  readonly reviewer: TestAgent;
  readonly administrator: TestAgent;
  /** A fit of boatSpecification that is done. */
  readonly fitId: string;
}

/** An estimator with one fit that is done, and the people who go on from there. */
export async function openDesk(service: TestService): Promise<Desk> {
  const [analyst, reviewer, administrator] = [
    await service.as('analyst'),
    await service.as('reviewer'),
    await service.as('administrator'),
  ];
  await analyst.post('/api/estimators').send(refitLabour).expect(201);
  return { analyst, reviewer, administrator, fitId: await addFit(service, analyst, boatSpecification) };
}

export async function addFit(service: TestService, analyst: TestAgent, specification: object): Promise<string> {
  const revisionId = await addRevision(service, analyst.person, boatColumns());
  const fit = await analyst
    .post(`/api/estimators/${refitLabour.slug}/fits`)
    .send({ revisionId, specification })
    .expect(202);
  const state = await service.services.fits.waitFor(fit.body.id as string);
  if (state !== 'done') throw new Error(`The fit is ${state}.`);
  return fit.body.id as string;
}

/** Draws an edition up, submits it and puts it in force. Gives its id. */
export async function putInForce({ analyst, reviewer }: Desk, fitId: string): Promise<string> {
  const draft = await analyst
    .post(`/api/estimators/${refitLabour.slug}/editions`)
    .send({ fitId, changeNote: 'Drawn up for a test.' })
    .expect(201);
  const { id } = draft.body as { id: string };
  await analyst.post(`/api/editions/${id}/submit`).expect(200);
  await reviewer.post(`/api/editions/${id}/put-in-force`).expect(200);
  return id;
}

/** A partner with one site, straight into the tables. */
export async function addPartner(service: TestService, by: TestPerson, origin: string): Promise<string> {
  const { knex } = service.services;
  const id = `partner${Math.random().toString(36).slice(2, 10)}`.padEnd(16, '0');
  const at = service.clock.now().toISOString();
  await knex('partners').insert({
    id,
    name: `Partner ${id}`,
    nameKey: id,
    contactEmail: 'yard@partner.example',
    createdAt: at,
    createdBy: by.id,
  });
  await knex('partnerSites').insert({ id: `site${id}`, partnerId: id, origin, createdAt: at });
  return id;
}
