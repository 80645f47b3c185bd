import type { components } from '../../../openapi/types/desk';
import type { Database } from '../database/database';

type FitUnderWay = components['schemas']['DeskOverview']['fitsUnderWay'][number];

interface FitUnderWayRow {
  readonly id: string;
  readonly state: FitUnderWay['state'];
  readonly stage: string;
  readonly stageDone: number;
  readonly stageTotal: number;
  readonly slug: string;
  readonly name: string;
}

export class DeskStore {
  constructor(private readonly database: Database) {}

  /** Queued and running, the oldest first. */
  async fitsUnderWay(): Promise<FitUnderWay[]> {
    const rows: FitUnderWayRow[] = await this.database
      .connection('fits')
      .join('estimators', 'estimators.id', 'fits.estimatorId')
      .whereIn('fits.state', ['queued', 'running'])
      .orderBy([{ column: 'fits.createdAt' }, { column: 'fits.id' }])
      .limit(50)
      .select(
        'fits.id',
        'fits.state',
        'fits.stage',
        'fits.stageDone',
        'fits.stageTotal',
        'estimators.slug',
        'estimators.name',
      );
    return rows.map((row) => ({
      id: row.id,
      estimator: row.slug,
      estimatorName: row.name,
      state: row.state,
      progress: { stage: row.stage, done: row.stageDone, total: row.stageTotal },
    }));
  }

  async estimatesSince(moment: string): Promise<number> {
    const row = await this.database
      .connection('estimates')
      .where('issuedAt', '>=', moment)
      .count({ total: '*' })
      .first();
    return Number(row?.['total'] ?? 0);
  }
}
