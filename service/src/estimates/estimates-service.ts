import type { components } from '../../../openapi/types/partner';
import { timeText, type Clock } from '../clock';
import type { Database } from '../database/database';
import { newId } from '../database/new-id';
import type { CompiledEditions } from '../editions/compiled-editions';
import type { EditionRecord, EditionsStore } from '../editions/editions-store';
import { DeskError, notFound } from '../errors';
import { monthOf, secondsLeftInMonth } from '../keys/month';
import type { PartnerKey } from '../keys/partner-key';
import type { EstimatesStore } from './estimates-store';
import { nothingInForce, type PublishedEstimators } from './published-estimators';

type Estimate = components['schemas']['Estimate'];
type EstimateRequest = components['schemas']['EstimateRequest'];

/** What of a key an estimate needs; a seed may name a key without its secret. */
export type AskingKey = Pick<PartnerKey, 'id' | 'partnerId' | 'allEstimators' | 'monthlyQuota'>;

export interface EstimateCall extends EstimateRequest {
  readonly key: AskingKey;
  readonly slug: string;
}

export interface EstimatesParts {
  readonly database: Database;
  readonly estimates: EstimatesStore;
  readonly published: PublishedEstimators;
  readonly editions: EditionsStore;
  readonly compiled: CompiledEditions;
  readonly clock: Clock;
}

export class EstimatesService {
  constructor(private readonly parts: EstimatesParts) {}

  /** The answer to one case. It is in the database before this resolves. */
  async estimate({ key, slug, inputs, edition: number }: EstimateCall): Promise<Estimate> {
    const { published, compiled, clock } = this.parts;
    const estimator = await published.requireCovered(key, slug);
    const edition =
      number === undefined
        ? await this.editionInForce(estimator.id, slug)
        : await this.pinnedEdition(estimator.id, slug, number);
    const evaluation = (await compiled.get(edition.id)).evaluate(inputs, estimator.unit);
    const estimate = {
      id: newId(),
      estimator: slug,
      edition: edition.number,
      ...evaluation,
      issuedAt: timeText(clock),
    };
    await this.keep(key, edition, { estimate, inputs });
    return estimate;
  }

  /** As it was answered, to any key of the same partner. */
  async readOwn(key: Pick<PartnerKey, 'partnerId'>, id: string): Promise<Estimate> {
    const answer = await this.parts.estimates.findAnswer(id, key.partnerId);
    if (answer === null) throw notFound('estimate');
    return JSON.parse(answer) as Estimate;
  }

  private async keep(
    key: AskingKey,
    edition: EditionRecord,
    { estimate, inputs }: { readonly estimate: Estimate; readonly inputs: EstimateRequest['inputs'] },
  ): Promise<void> {
    const { database, estimates, clock } = this.parts;
    const { id, value, interval, flags, issuedAt } = estimate;
    await database.unitOfWork(async () => {
      if (!(await estimates.countInMonth(key.id, monthOf(clock), key.monthlyQuota))) throw this.quotaExceeded(key);
      await estimates.insert({
        ...{ id, value, issuedAt, low: interval.low, high: interval.high, flagCount: flags.length },
        ...{ keyId: key.id, partnerId: key.partnerId, estimatorId: edition.estimatorId, editionId: edition.id },
        inputs: JSON.stringify(inputs),
        answer: JSON.stringify(estimate),
      });
    });
  }

  private quotaExceeded(key: AskingKey): DeskError {
    const retryAfter = secondsLeftInMonth(this.parts.clock);
    return new DeskError(
      'quota-exceeded',
      `This key answers ${key.monthlyQuota} estimates a month, counted in UTC. Ask the desk for more, or wait for the next month.`,
      { retryAfter },
    );
  }

  private async editionInForce(estimatorId: string, slug: string): Promise<EditionRecord> {
    const [edition] = await this.parts.editions.inForceOf([estimatorId]);
    if (!edition) throw nothingInForce(slug);
    return edition;
  }

  /** Editions that are or were in force; a withdrawn one until its sunset. */
  private async pinnedEdition(estimatorId: string, slug: string, number: number): Promise<EditionRecord> {
    const edition = await this.parts.editions.findByNumber(estimatorId, number);
    if (!edition || edition.inForceAt === null)
      throw new DeskError(
        'edition-unknown',
        `${slug} has no edition ${number} that was ever in force. Leave the number out to ask the one in force.`,
      );
    if (edition.state !== 'withdrawn') return edition;
    if (edition.sunsetAt !== null && edition.sunsetAt > timeText(this.parts.clock)) return edition;
    throw new DeskError(
      'edition-withdrawn',
      `Edition ${number} of ${slug} was withdrawn. Leave the number out to ask the one in force.`,
    );
  }
}
