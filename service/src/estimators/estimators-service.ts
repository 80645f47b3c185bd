import type { components } from '../../../openapi/types/desk';
import { timeText, type Clock } from '../clock';
import { translateUnique } from '../database/constraint-errors';
import type { Database } from '../database/database';
import { newId } from '../database/new-id';
import type { EditionsStore } from '../editions/editions-store';
import { toEditionSummary } from '../editions/edition-summary';
import { DeskError, notFound } from '../errors';
import type { Page } from '../http/page';
import type { Journal } from '../journal/journal';
import type { SignedInPerson } from '../people/person';
import type { EstimatorRecord, EstimatorsStore } from './estimators-store';

type Estimator = components['schemas']['Estimator'];
type EstimatorNew = components['schemas']['EstimatorNew'];
type EstimatorChange = components['schemas']['EstimatorChange'];
type EditionSummary = components['schemas']['EditionSummary'];

export interface EstimatorsParts {
  readonly database: Database;
  readonly estimators: EstimatorsStore;
  readonly editions: EditionsStore;
  readonly journal: Journal;
  readonly clock: Clock;
}

export class EstimatorsService {
  constructor(private readonly parts: EstimatorsParts) {}

  async list(page: Page): Promise<{ items: Estimator[]; total: number }> {
    const records = await this.parts.estimators.list(page);
    const inForce = await this.parts.editions.inForceOf(records.map((record) => record.id));
    const summaries = new Map(inForce.map((edition) => [edition.estimatorId, toEditionSummary(edition)]));
    return {
      items: records.map((record) => toAnswer(record, summaries.get(record.id) ?? null)),
      total: await this.parts.estimators.count(),
    };
  }

  async read(slug: string): Promise<Estimator> {
    const record = await this.require(slug);
    const [inForce] = await this.parts.editions.inForceOf([record.id]);
    return toAnswer(record, inForce ? toEditionSummary(inForce) : null);
  }

  async create(person: SignedInPerson, given: EstimatorNew): Promise<Estimator> {
    const { estimators, journal, clock, database } = this.parts;
    const { slug, name, targetName, unit, description = '', intendedUse = '', notFor = '', cautions = [] } = given;
    const id = newId();
    const estimator = {
      id,
      slug,
      name,
      targetName,
      unit,
      description,
      intendedUse,
      notFor,
      cautions,
      createdAt: timeText(clock),
      createdBy: person.id,
    };
    await database.unitOfWork(async () => {
      await translateUnique(
        () => estimators.insert(estimator),
        'estimators.slug',
        () => new DeskError('slug-taken', `${slug} names another estimator. Choose another public name.`),
      );
      await journal.write({
        actorId: person.id,
        action: 'estimator-created',
        subjectKind: 'estimator',
        subjectId: slug,
        summary: `${person.name} named the estimator ${name} (${slug})`,
      });
    });
    return this.read(slug);
  }

  async change(person: SignedInPerson, slug: string, change: EstimatorChange): Promise<Estimator> {
    const { estimators, journal, database } = this.parts;
    await database.unitOfWork(async () => {
      const record = await this.require(slug);
      requireSameUnit(record, change);
      await estimators.update(record.id, change);
      const what = Object.keys(change).join(', ');
      await journal.write({
        actorId: person.id,
        action: 'estimator-changed',
        subjectKind: 'estimator',
        subjectId: slug,
        summary: `${person.name} changed ${what} of ${slug}`,
      });
    });
    return this.read(slug);
  }

  async require(slug: string): Promise<EstimatorRecord> {
    const record = await this.parts.estimators.findBySlug(slug);
    if (!record) throw notFound('estimator');
    return record;
  }
}

/** An edition answers in the unit it was drawn up with; another unit would change every number under its readers. */
function requireSameUnit(record: EstimatorRecord, change: EstimatorChange): void {
  if (change.unit === undefined || change.unit === record.unit || record.editionCount === 0) return;
  throw new DeskError(
    'edition-state',
    `Editions of ${record.slug} answer in ${record.unit || 'no unit'}. Name a new estimator for another unit.`,
  );
}

function toAnswer(record: EstimatorRecord, inForce: EditionSummary | null): Estimator {
  const { id: _id, cautions, createdBy, ...rest } = record;
  return { ...rest, cautions: [...cautions], createdBy: { ...createdBy }, inForce };
}
