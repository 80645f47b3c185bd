import type { components } from '../../../openapi/types/partner';
import { DeskError, notFound } from '../errors';
import type { InForceRow, KeyReach, PublishedRow, PublishedStore } from './published-store';

type PublishedEstimator = components['schemas']['PublishedEstimator'];

/** Estimators as partners see them: through a key, and only with an edition in force. */
export class PublishedEstimators {
  constructor(private readonly published: PublishedStore) {}

  async list(key: KeyReach): Promise<{ items: PublishedEstimator[] }> {
    return { items: (await this.published.listInForce(key)).map(toAnswer) };
  }

  async describe(key: KeyReach, slug: string): Promise<PublishedEstimator> {
    const estimator = await this.requireCovered(key, slug);
    const inForce = await this.published.findInForce(estimator.id);
    if (!inForce) throw nothingInForce(slug);
    return toAnswer(inForce);
  }

  /** The estimator, when there is one and the key covers it. */
  async requireCovered(key: KeyReach, slug: string): Promise<PublishedRow> {
    const estimator = await this.published.findBySlug(slug);
    if (!estimator) throw notFound('estimator');
    if (await this.published.covers(key, estimator.id)) return estimator;
    throw new DeskError('key-out-of-scope', `This key does not cover ${slug}. Ask the desk for a key that does.`);
  }
}

export const nothingInForce = (slug: string): DeskError =>
  new DeskError('nothing-in-force', `Nothing of ${slug} is in force now. Ask the desk when the next edition will be.`);

function toAnswer(row: InForceRow): PublishedEstimator {
  const { slug, name, targetName, unit, description, intendedUse, notFor } = row;
  return {
    ...{ slug, name, targetName, unit, description, intendedUse, notFor },
    cautions: JSON.parse(row.cautions) as string[],
    edition: row.editionNumber,
    inForceSince: row.inForceAt,
    inputs: JSON.parse(row.inputSchema) as PublishedEstimator['inputs'],
  };
}
