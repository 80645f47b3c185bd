import type { components } from '../../../openapi/types/desk';
import { timeText, type Clock } from '../clock';
import type { Database } from '../database/database';
import { newId } from '../database/new-id';
import type { EditionsStore } from '../editions/editions-store';
import { DeskError, notFound } from '../errors';
import type { EstimatorsStore } from '../estimators/estimators-store';
import type { Page } from '../http/page';
import type { Journal } from '../journal/journal';
import type { SignedInPerson } from '../people/person';
import { requireRows } from '../records/required-rows';
import { checkSpecification } from './check-specification';
import type { FitRunner } from './fit-runner';
import type { FitRecord, FitsStore, FitState } from './fits-store';
import type { FitFollower, FitStep, ProgressFeed } from './progress-feed';
import type { PublishedResult } from './published-result';
import type { RevisionFactsStore } from './revision-facts-store';

type Fit = components['schemas']['Fit'];
type FitNew = components['schemas']['FitNew'];
type FitSummary = components['schemas']['FitSummary'];
type FitAccepted = components['schemas']['FitAccepted'];

export interface FitsParts {
  readonly database: Database;
  readonly fits: FitsStore;
  readonly revisions: RevisionFactsStore;
  readonly estimators: EstimatorsStore;
  readonly editions: EditionsStore;
  readonly runner: FitRunner;
  readonly feed: ProgressFeed;
  readonly journal: Journal;
  readonly clock: Clock;
}

export class FitsService {
  constructor(private readonly parts: FitsParts) {}

  /** Queues a fit; one that is sure to fail is refused at once. */
  async start(person: SignedInPerson, slug: string, { revisionId, specification }: FitNew): Promise<FitAccepted> {
    const { database, fits, journal, clock, runner } = this.parts;
    const id = newId();
    await database.unitOfWork(async () => {
      const estimator = await this.requireEstimator(slug);
      await this.requireSound({ revisionId, specification });
      await fits.insert({
        id,
        estimatorId: estimator.id,
        revisionId,
        specification,
        createdAt: timeText(clock),
        createdBy: person.id,
      });
      await journal.write({
        actorId: person.id,
        action: 'fit-started',
        subjectKind: 'fit',
        subjectId: id,
        summary: `${person.name} started a ${specification.method} fit for ${slug}`,
      });
    });
    runner.wake();
    return { id, state: 'queued' };
  }

  async list(slug: string, page: Page): Promise<{ items: FitSummary[]; total: number }> {
    const estimator = await this.requireEstimator(slug);
    const records = await this.parts.fits.list(estimator.id, page);
    return { items: records.map(toSummary), total: await this.parts.fits.count(estimator.id) };
  }

  async read(id: string): Promise<Fit> {
    const record = await this.require(id);
    const texts = await this.parts.fits.texts(id);
    const editions = await this.parts.editions.listOfFit(id);
    const {
      estimatorId: _id,
      lambda: _lambda,
      effectiveDegreesOfFreedom: _df,
      rmse: _rmse,
      r2: _r2,
      createdBy,
      failure,
      ...rest
    } = record;
    return {
      ...rest,
      createdBy: { ...createdBy },
      failure: failure && { ...failure },
      result: texts ? (JSON.parse(texts.result) as PublishedResult) : null,
      editions,
    };
  }

  /** A waiting fit is cancelled at once, a running one as soon as its thread has ended. */
  async cancel(person: SignedInPerson, id: string): Promise<FitAccepted> {
    const { database, fits, journal, clock, runner, feed } = this.parts;
    await database.unitOfWork(async () => {
      const { state } = await this.require(id);
      const stopped = (await fits.cancelQueued(id, timeText(clock))) || (await fits.askCancel(id));
      if (!stopped) throw new DeskError('fit-ended', `The fit is ${state} already. Start another if you need one.`);
      await journal.write({
        actorId: person.id,
        action: 'fit-cancelled',
        subjectKind: 'fit',
        subjectId: id,
        summary: `${person.name} cancelled the fit ${id}`,
      });
    });
    runner.cancel(id);
    const step = await this.progress(id);
    if (step.state === 'cancelled') feed.publish(id, step);
    return { id, state: step.state };
  }

  async progress(id: string): Promise<FitStep> {
    const step = await this.parts.fits.stateOf(id);
    if (!step) throw notFound('fit');
    return step;
  }

  /** Gives the present step, then every further one, and ends with the final one. Returns what stops it. */
  follow(id: string, follower: FitFollower): () => void {
    return this.parts.feed.follow(id, follower);
  }

  /** Resolves with the final state. */
  async waitFor(id: string): Promise<FitState> {
    await this.progress(id);
    return new Promise((resolve) => {
      let state: FitState = 'queued';
      this.follow(id, { step: (step) => void (state = step.state), end: () => resolve(state) });
    });
  }

  private async require(id: string): Promise<FitRecord> {
    const record = await this.parts.fits.find(id);
    if (!record) throw notFound('fit');
    return record;
  }

  private async requireEstimator(slug: string): Promise<{ readonly id: string }> {
    const estimator = await this.parts.estimators.findBySlug(slug);
    if (!estimator) throw notFound('estimator');
    return estimator;
  }

  private async requireSound({ revisionId, specification }: FitNew): Promise<void> {
    const facts = await this.parts.revisions.find(revisionId);
    if (facts) requireRows(facts);
    const errors = facts
      ? checkSpecification(specification, facts)
      : [{ pointer: '#/revisionId', detail: 'There is no such revision of a record set.' }];
    if (errors.length > 0)
      throw new DeskError('specification-invalid', `Mend the specification: ${errors[0].detail}`, { errors });
  }
}

function toSummary(fit: FitRecord): FitSummary {
  const { id, state, revision, createdAt, createdBy, lambda, effectiveDegreesOfFreedom, rmse, r2, specification } = fit;
  const { method, penalty, inputs } = specification;
  const rule = method === 'least-squares' ? 'fixed' : (penalty?.rule ?? 'minimum');
  return {
    id,
    state,
    method,
    rule,
    inputCount: inputs.length,
    revision,
    createdAt,
    createdBy: { ...createdBy },
    lambda,
    effectiveDegreesOfFreedom,
    rmse,
    r2,
  };
}
