import type { Database } from '../database/database';

/** What a key may reach: all estimators, or those of its list. */
export interface KeyReach {
  readonly id: string;
  readonly allEstimators: boolean;
}

export interface PublishedRow {
  readonly id: string;
  readonly slug: string;
  readonly name: string;
  readonly targetName: string;
  readonly unit: string;
  readonly description: string;
  readonly intendedUse: string;
  readonly notFor: string;
}

export interface InForceRow extends PublishedRow {
  readonly editionNumber: number;
  readonly inForceAt: string;
  /** JSON. */
  readonly inputSchema: string;
  /** JSON: the words that stood when the edition was drawn up. */
  readonly cautions: string;
}

const estimatorColumns = ['id', 'slug', 'name', 'targetName', 'unit', 'description', 'intendedUse', 'notFor'].map(
  (column) => `estimators.${column}`,
);

export class PublishedStore {
  constructor(private readonly database: Database) {}

  async findBySlug(slug: string): Promise<PublishedRow | null> {
    return (
      ((await this.database.connection('estimators').where({ slug }).first(estimatorColumns)) as
        PublishedRow | undefined) ?? null
    );
  }

  async covers(key: KeyReach, estimatorId: string): Promise<boolean> {
    if (key.allEstimators) return true;
    return (
      (await this.database.connection('keyEstimators').where({ keyId: key.id, estimatorId }).first('keyId')) !==
      undefined
    );
  }

  /** Estimators with an edition in force, by name. */
  async listInForce(key: KeyReach): Promise<InForceRow[]> {
    const query = this.inForce().orderBy('estimators.name').orderBy('estimators.id');
    if (!key.allEstimators)
      query.whereIn(
        'estimators.id',
        this.database.connection('keyEstimators').where({ keyId: key.id }).select('estimatorId'),
      );
    return (await query) as InForceRow[];
  }

  async findInForce(estimatorId: string): Promise<InForceRow | null> {
    return ((await this.inForce().where('estimators.id', estimatorId).first()) as InForceRow | undefined) ?? null;
  }

  private inForce() {
    return this.database
      .connection('editions')
      .join('estimators', 'estimators.id', 'editions.estimatorId')
      .where('editions.state', 'in-force')
      .select(estimatorColumns)
      .select('editions.number as editionNumber', 'editions.inForceAt', 'editions.inputSchema', 'editions.cautions');
  }
}
