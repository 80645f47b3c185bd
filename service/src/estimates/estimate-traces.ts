import type { components } from '../../../openapi/types/desk';
import { notFound } from '../errors';
import type { Page } from '../http/page';
import type { EstimatesStore } from './estimates-store';

type EstimateList = components['schemas']['EstimateList'];
type EstimateRecord = components['schemas']['EstimateRecord'];
type Estimate = components['schemas']['Estimate'];

/** What the desk sees of estimates: what was answered, and where a number came from. */
export class EstimateTraces {
  constructor(private readonly estimates: EstimatesStore) {}

  async list(slug: string, page: Page): Promise<EstimateList> {
    const estimatorId = await this.estimates.estimatorIdOf(slug);
    if (!estimatorId) throw notFound('estimator');
    return { items: await this.estimates.list(estimatorId, page), total: await this.estimates.count(estimatorId) };
  }

  async read(id: string): Promise<EstimateRecord> {
    const traced = await this.estimates.trace(id);
    if (!traced) throw notFound('estimate');
    const {
      editionId,
      estimatorName,
      checksum,
      revisionId,
      revisionNumber,
      sha256,
      rowCount,
      recordSetId,
      recordSetName,
      approverId,
      approverName,
    } = traced;
    return {
      ...(JSON.parse(traced.answer) as Estimate),
      inputs: JSON.parse(traced.inputs) as EstimateRecord['inputs'],
      ...{ editionId, estimatorName, checksum },
      revision: { id: revisionId, number: revisionNumber, sha256, rowCount, recordSetId, recordSetName },
      approvedBy: approverId !== null && approverName !== null ? { id: approverId, name: approverName } : null,
      partner: { id: traced.partnerId, name: traced.partnerName },
      key: { id: traced.keyId, label: traced.keyLabel, kind: traced.keyKind },
    };
  }
}
