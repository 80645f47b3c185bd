import type { components } from '../../../openapi/types/desk';
import type { Database } from '../database/database';
import type { Page } from '../http/page';

type EstimateSummary = components['schemas']['EstimateSummary'];

interface EstimateRow {
  id: string;
  estimatorId: string;
  editionId: string;
  keyId: string;
  partnerId: string;
  /** JSON. */
  inputs: string;
  value: number;
  low: number | null;
  high: number | null;
  flagCount: number;
  /** JSON: the answer as it left. */
  answer: string;
  issuedAt: string;
}

export type NewEstimate = Readonly<EstimateRow>;

/** An estimate with all that it came from. */
export interface TracedEstimate {
  readonly answer: string;
  readonly inputs: string;
  readonly editionId: string;
  readonly estimatorName: string;
  readonly checksum: string;
  readonly revisionId: string;
  readonly revisionNumber: number;
  readonly sha256: string;
  readonly rowCount: number;
  readonly recordSetId: string;
  readonly recordSetName: string;
  readonly approverId: string | null;
  readonly approverName: string | null;
  readonly partnerId: string;
  readonly partnerName: string;
  readonly keyId: string;
  readonly keyLabel: string;
  readonly keyKind: string;
}

interface KeyMonthRow {
  keyId: string;
  month: string;
  estimateCount: number;
}

export class EstimatesStore {
  constructor(private readonly database: Database) {}

  async insert(estimate: NewEstimate): Promise<void> {
    await this.database.table<EstimateRow>('estimates').insert(estimate);
  }

  /** Counts one estimate more; false, and nothing is counted, where `quota` is used up. One statement: no two calls can take the last one. */
  async countInMonth(keyId: string, month: string, quota: number | null): Promise<boolean> {
    const { connection } = this.database;
    const counted = this.database
      .table<KeyMonthRow>('keyMonths')
      .insert({ keyId, month, estimateCount: 1 })
      .onConflict(['keyId', 'month'])
      .merge({ estimateCount: connection.raw('key_months.estimate_count + 1') as unknown as number });
    if (quota !== null) counted.where('keyMonths.estimateCount', '<', quota);
    const rows = (await counted.returning('estimateCount')) as unknown as readonly unknown[];
    return rows.length === 1;
  }

  async findAnswer(id: string, partnerId: string): Promise<string | null> {
    const row = await this.database.table<EstimateRow>('estimates').where({ id, partnerId }).first('answer');
    return row?.answer ?? null;
  }

  async estimatorIdOf(slug: string): Promise<string | null> {
    const row = (await this.database.connection('estimators').where({ slug }).first('id')) as
      { id: string } | undefined;
    return row?.id ?? null;
  }

  /** Newest first. */
  async list(estimatorId: string, { limit, offset }: Page): Promise<EstimateSummary[]> {
    return (await this.database
      .connection('estimates')
      .join('editions', 'editions.id', 'estimates.editionId')
      .join('keys', 'keys.id', 'estimates.keyId')
      .join('partners', 'partners.id', 'estimates.partnerId')
      .where('estimates.estimatorId', estimatorId)
      .orderBy('estimates.issuedAt', 'desc')
      .orderBy('estimates.id', 'desc')
      .limit(limit)
      .offset(offset)
      .select(
        'estimates.id',
        'editions.number as edition',
        'estimates.value',
        'estimates.low',
        'estimates.high',
        'estimates.flagCount',
      )
      .select('estimates.issuedAt', 'partners.name as partnerName', 'keys.label as keyLabel')) as EstimateSummary[];
  }

  async count(estimatorId: string): Promise<number> {
    const row = await this.database.connection('estimates').where({ estimatorId }).count({ total: '*' }).first();
    return Number(row?.['total'] ?? 0);
  }

  async trace(id: string): Promise<TracedEstimate | null> {
    const row = (await this.database
      .connection('estimates')
      .join('editions', 'editions.id', 'estimates.editionId')
      .join('estimators', 'estimators.id', 'estimates.estimatorId')
      .join('fits', 'fits.id', 'editions.fitId')
      .join('recordRevisions', 'recordRevisions.id', 'fits.revisionId')
      .join('recordSets', 'recordSets.id', 'recordRevisions.recordSetId')
      .join('keys', 'keys.id', 'estimates.keyId')
      .join('partners', 'partners.id', 'estimates.partnerId')
      .leftJoin('people as approvers', 'approvers.id', 'editions.inForceBy')
      .where('estimates.id', id)
      .first(
        ...[
          'estimates.answer',
          'estimates.inputs',
          'estimates.editionId',
          'estimators.name as estimatorName',
          'editions.checksum',
        ],
        ...[
          'recordRevisions.id as revisionId',
          'recordRevisions.number as revisionNumber',
          'recordRevisions.sha256',
          'recordRevisions.rowCount',
        ],
        ...[
          'recordSets.id as recordSetId',
          'recordSets.name as recordSetName',
          'approvers.id as approverId',
          'approvers.name as approverName',
        ],
        ...[
          'partners.id as partnerId',
          'partners.name as partnerName',
          'keys.id as keyId',
          'keys.label as keyLabel',
          'keys.kind as keyKind',
        ],
      )) as TracedEstimate | undefined;
    return row ?? null;
  }
}
