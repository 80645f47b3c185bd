import type { Database } from '../database/database';
import type { Page } from '../http/page';

export interface EstimatorRow {
  id: string;
  slug: string;
  name: string;
  targetName: string;
  unit: string;
  description: string;
  intendedUse: string;
  notFor: string;
  /** JSON: a list of sentences. */
  cautions: string;
  createdAt: string;
  createdBy: string;
}

export interface EstimatorWords {
  readonly name: string;
  readonly targetName: string;
  readonly unit: string;
  readonly description: string;
  readonly intendedUse: string;
  readonly notFor: string;
  readonly cautions: readonly string[];
}

export interface EstimatorRecord extends EstimatorWords {
  readonly id: string;
  readonly slug: string;
  readonly createdAt: string;
  readonly createdBy: { readonly id: string; readonly name: string };
  readonly fitCount: number;
  readonly editionCount: number;
  readonly estimateCount: number;
}

interface ListedRow extends EstimatorRow {
  createdByName: string;
  fitCount: number;
  editionCount: number;
  estimateCount: number;
}

export class EstimatorsStore {
  constructor(private readonly database: Database) {}

  async insert(
    estimator: EstimatorWords & {
      readonly id: string;
      readonly slug: string;
      readonly createdAt: string;
      readonly createdBy: string;
    },
  ): Promise<void> {
    await this.database
      .table<EstimatorRow>('estimators')
      .insert({ ...estimator, cautions: JSON.stringify(estimator.cautions) });
  }

  async update(id: string, change: Partial<EstimatorWords>): Promise<void> {
    const { cautions, ...words } = change;
    await this.database
      .table<EstimatorRow>('estimators')
      .where({ id })
      .update({ ...words, ...(cautions && { cautions: JSON.stringify(cautions) }) });
  }

  async list({ limit, offset }: Page): Promise<EstimatorRecord[]> {
    const rows = (await this.withCounts()
      .orderBy('estimators.name')
      .orderBy('estimators.id')
      .limit(limit)
      .offset(offset)) as ListedRow[];
    return rows.map(toRecord);
  }

  async findBySlug(slug: string): Promise<EstimatorRecord | null> {
    const row = (await this.withCounts().where({ slug }).first()) as ListedRow | undefined;
    return row ? toRecord(row) : null;
  }

  async idsOfSlugs(slugs: readonly string[]): Promise<ReadonlyMap<string, string>> {
    const rows = await this.database
      .table<EstimatorRow>('estimators')
      .whereIn('slug', [...slugs])
      .select('id', 'slug');
    return new Map(rows.map((row) => [row.slug, row.id]));
  }

  async count(): Promise<number> {
    const row = await this.database.connection('estimators').count({ total: '*' }).first();
    return Number(row?.['total'] ?? 0);
  }

  /** The counts come as subqueries, each answered from one index. */
  private withCounts() {
    const { connection } = this.database;
    const counted = (table: string, name: string) =>
      connection(table).count('*').where(`${table}.estimatorId`, connection.ref('estimators.id')).as(name);
    return connection('estimators')
      .join('people', 'people.id', 'estimators.createdBy')
      .select('estimators.*', 'people.name as createdByName')
      .select(counted('fits', 'fitCount'), counted('editions', 'editionCount'), counted('estimates', 'estimateCount'));
  }
}

function toRecord(row: ListedRow): EstimatorRecord {
  return {
    id: row.id,
    slug: row.slug,
    name: row.name,
    targetName: row.targetName,
    unit: row.unit,
    description: row.description,
    intendedUse: row.intendedUse,
    notFor: row.notFor,
    cautions: JSON.parse(row.cautions) as string[],
    createdAt: row.createdAt,
    createdBy: { id: row.createdBy, name: row.createdByName },
    fitCount: Number(row.fitCount),
    editionCount: Number(row.editionCount),
    estimateCount: Number(row.estimateCount),
  };
}
