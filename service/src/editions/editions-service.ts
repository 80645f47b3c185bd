import { createHash } from 'node:crypto';
import type { components } from '../../../openapi/types/desk';
import { timeText, type Clock } from '../clock';
import type { Database } from '../database/database';
import { newId } from '../database/new-id';
import { DeskError, notFound } from '../errors';
import type { EstimatorRecord, EstimatorsStore } from '../estimators/estimators-store';
import type { FitRecord, FitsStore } from '../fits/fits-store';
import type { PublishedResult } from '../fits/published-result';
import type { Page } from '../http/page';
import type { Journal } from '../journal/journal';
import type { SignedInPerson } from '../people/person';
import type { Formula } from '../regression/formula/formula';
import type { CaseValues, Evaluation } from './compiled-edition';
import type { CompiledEditions } from './compiled-editions';
import { toEditionSummary } from './edition-summary';
import type { EditionRecord, EditionsStore } from './editions-store';
import { inputSchemaOf } from './input-schema';

type Edition = components['schemas']['Edition'];
type EditionNew = components['schemas']['EditionNew'];
type EditionSummary = components['schemas']['EditionSummary'];

export interface EditionsParts {
  readonly database: Database;
  readonly editions: EditionsStore;
  readonly compiled: CompiledEditions;
  readonly fits: FitsStore;
  readonly estimators: EstimatorsStore;
  readonly journal: Journal;
  readonly clock: Clock;
}

/** Drawing up, reading and trying editions; edition-review.ts moves them from state to state. */
export class EditionsService {
  constructor(private readonly parts: EditionsParts) {}

  async list(slug: string, page: Page): Promise<{ items: EditionSummary[]; total: number }> {
    const { editions } = this.parts;
    const { id } = await this.requireEstimator(slug);
    return { items: (await editions.list(id, page)).map(toEditionSummary), total: await editions.count(id) };
  }

  /** A draft that freezes the fit's formula: from here on nothing about its answers changes. */
  async drawUp(person: SignedInPerson, slug: string, { fitId, changeNote }: EditionNew): Promise<Edition> {
    const { database, editions, journal, clock } = this.parts;
    const id = newId();
    await database.unitOfWork(async () => {
      const estimator = await this.requireEstimator(slug);
      const fit = await this.requireDoneFit(estimator, fitId);
      const number = (await editions.lastNumber(estimator.id)) + 1;
      const at = timeText(clock);
      await editions.insert({
        id,
        number,
        changeNote,
        ...(await this.frozen(estimator, fit)),
        createdAt: at,
        createdBy: person.id,
      });
      await editions.insertEvent({ editionId: id, at, by: person.id, state: 'draft', note: changeNote });
      await journal.write({
        actorId: person.id,
        action: 'edition-drawn-up',
        subjectKind: 'edition',
        subjectId: id,
        summary: `${person.name} drew up edition ${number} of ${slug}`,
      });
    });
    return this.read(person, id);
  }

  async read(person: SignedInPerson, id: string): Promise<Edition> {
    const { editions, fits } = this.parts;
    const record = await this.require(id);
    const [content, events, fit, texts, compiled] = await Promise.all([
      editions.content(id),
      editions.events(id),
      fits.find(record.fitId),
      fits.texts(record.fitId),
      this.parts.compiled.get(id),
    ]);
    if (!content || !fit || !texts) throw notFound('edition');
    const { intercept, weights } = JSON.parse(texts.result) as PublishedResult;
    return {
      ...toEditionSummary(record),
      checksum: record.checksum,
      inputSchema: content.inputSchema as Edition['inputSchema'],
      revision: fit.revision,
      events: events.map((event) => ({ ...event, by: { ...event.by } })),
      sunsetAt: record.sunsetAt,
      scale: compiled.targetIsLogged ? 'log' : 'original',
      ...{ intercept, weights },
      cautions: [...content.cautions],
      mayPutInForce: record.state === 'under-review' && person.roles.includes('reviewer') && !isOwn(person, record),
    };
  }

  /** The same evaluation as a partner gets, of an edition in any state; nothing is kept. */
  async tryCase(id: string, inputs: CaseValues): Promise<Evaluation> {
    const { unit } = await this.require(id);
    return (await this.parts.compiled.get(id)).evaluate(inputs, unit);
  }

  private async require(id: string): Promise<EditionRecord> {
    const record = await this.parts.editions.find(id);
    if (!record) throw notFound('edition');
    return record;
  }

  private async requireEstimator(slug: string): Promise<EstimatorRecord> {
    const estimator = await this.parts.estimators.findBySlug(slug);
    if (!estimator) throw notFound('estimator');
    return estimator;
  }

  private async requireDoneFit(estimator: EstimatorRecord, fitId: string): Promise<FitRecord> {
    const fit = await this.parts.fits.find(fitId);
    if (!fit || fit.estimatorId !== estimator.id) throw notFound('fit of this estimator');
    if (fit.state !== 'done')
      throw new DeskError('fit-not-done', `The fit is ${fit.state}. An edition is drawn up from a fit that is done.`);
    return fit;
  }

  private async frozen(estimator: EstimatorRecord, fit: FitRecord) {
    const texts = await this.parts.fits.texts(fit.id);
    if (!texts) throw new DeskError('fit-not-done', 'The fit has no formula. Start it again.');
    const formula = JSON.parse(texts.formula) as Formula;
    return {
      estimatorId: estimator.id,
      fitId: fit.id,
      formula: texts.formula,
      checksum: createHash('sha256').update(texts.formula, 'utf8').digest('hex'),
      inputSchema: inputSchemaOf(formula, fit.specification.inputs),
      cautions: estimator.cautions,
      method: fit.specification.method,
      rmse: fit.rmse ?? (JSON.parse(texts.result) as PublishedResult).accuracy.rmse,
      recordCount: formula.records.count,
      inputCount: formula.inputs.length,
    };
  }
}

/** Drawn up or submitted by this person: somebody else must judge it. */
export const isOwn = (person: SignedInPerson, edition: EditionRecord): boolean =>
  edition.createdBy.id === person.id || edition.submittedBy?.id === person.id;
