import type { Database } from '../database/database';
import type { KeyKind } from './key-text';

interface KeyRow {
  id: string;
  partnerId: string;
  publicId: string;
  secretHash: string;
  lastFour: string;
  kind: KeyKind;
  label: string;
  allEstimators: boolean | number;
  perMinute: number;
  monthlyQuota: number | null;
  expiresAt: string | null;
  createdAt: string;
  createdBy: string;
  lastUsedAt: string | null;
  revokedAt: string | null;
}

export interface NewKey extends Omit<KeyRow, 'allEstimators' | 'lastUsedAt' | 'revokedAt'> {
  /** Null: all, those to come included. */
  readonly estimatorIds: readonly string[] | null;
}

export interface KeyRecord extends Omit<KeyRow, 'allEstimators' | 'createdBy'> {
  readonly allEstimators: boolean;
  readonly createdBy: { readonly id: string; readonly name: string };
  readonly slugs: readonly string[];
  readonly usedThisMonth: number;
}

type ListedRow = KeyRow & { createdByName: string; usedThisMonth: number | null };

export class KeysStore {
  constructor(private readonly database: Database) {}

  async partnerExists(id: string): Promise<boolean> {
    return (await this.database.connection('partners').where({ id }).first('id')) !== undefined;
  }

  async insert(key: NewKey): Promise<void> {
    const { estimatorIds, ...columns } = key;
    await this.database
      .table<KeyRow>('keys')
      .insert({ ...columns, allEstimators: estimatorIds === null, lastUsedAt: null, revokedAt: null });
    if (!estimatorIds) return;
    await this.database
      .table('keyEstimators')
      .insert(estimatorIds.map((estimatorId) => ({ keyId: key.id, estimatorId })));
  }

  async find(id: string, month: string): Promise<KeyRecord | null> {
    const [key] = await this.withSlugs((await this.listed(month).where('keys.id', id)) as ListedRow[]);
    return key ?? null;
  }

  async listOfPartner(partnerId: string, month: string): Promise<KeyRecord[]> {
    const rows = (await this.listed(month)
      .where('keys.partnerId', partnerId)
      .orderBy('keys.createdAt', 'desc')
      .orderBy('keys.id')) as ListedRow[];
    return this.withSlugs(rows);
  }

  /** What a call with the key needs; one read. */
  async findForCall(publicId: string): Promise<KeyRow | null> {
    return (await this.database.table<KeyRow>('keys').where({ publicId }).first()) ?? null;
  }

  async revoke(id: string, at: string): Promise<void> {
    await this.database.table<KeyRow>('keys').where({ id, revokedAt: null }).update({ revokedAt: at });
  }

  async noteUse(id: string, at: string): Promise<void> {
    await this.database.table<KeyRow>('keys').where({ id }).update({ lastUsedAt: at });
  }

  async hasSite(partnerId: string): Promise<boolean> {
    return (await this.database.connection('partnerSites').where({ partnerId }).first('id')) !== undefined;
  }

  async isSiteOf(partnerId: string, origin: string): Promise<boolean> {
    return (await this.database.connection('partnerSites').where({ partnerId, origin }).first('id')) !== undefined;
  }

  async isSiteOfAnyone(origin: string): Promise<boolean> {
    return (await this.database.connection('partnerSites').where({ origin }).first('id')) !== undefined;
  }

  private listed(month: string) {
    return this.database
      .connection('keys')
      .join('people', 'people.id', 'keys.createdBy')
      .leftJoin('keyMonths', (join) => join.on('keyMonths.keyId', 'keys.id').andOnVal('keyMonths.month', month))
      .select('keys.*', 'people.name as createdByName', 'keyMonths.estimateCount as usedThisMonth');
  }

  private async withSlugs(rows: readonly ListedRow[]): Promise<KeyRecord[]> {
    const scopes = (await this.database
      .connection('keyEstimators')
      .join('estimators', 'estimators.id', 'keyEstimators.estimatorId')
      .whereIn(
        'keyEstimators.keyId',
        rows.map((row) => row.id),
      )
      .orderBy('estimators.slug')
      .select('keyEstimators.keyId as keyId', 'estimators.slug as slug')) as { keyId: string; slug: string }[];
    return rows.map((row) => {
      const { createdByName, ...key } = row;
      return {
        ...key,
        allEstimators: Boolean(row.allEstimators),
        createdBy: { id: row.createdBy, name: createdByName },
        slugs: scopes.filter((scope) => scope.keyId === row.id).map((scope) => scope.slug),
        usedThisMonth: row.usedThisMonth ?? 0,
      };
    });
  }
}
