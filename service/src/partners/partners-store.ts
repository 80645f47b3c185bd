import type { Database } from '../database/database';

export interface PartnerRow {
  id: string;
  name: string;
  nameKey: string;
  contactEmail: string;
  createdAt: string;
  createdBy: string;
}

export interface PartnerSummaryRow {
  readonly id: string;
  readonly name: string;
  readonly contactEmail: string;
  readonly createdAt: string;
  readonly siteCount: number;
  readonly keyCount: number;
  readonly estimateCount: number;
  readonly lastUsedAt: string | null;
}

export const nameKeyOf = (name: string): string => name.trim().toLowerCase().replace(/\s+/g, ' ');

export class PartnersStore {
  constructor(private readonly database: Database) {}

  async insert(row: Omit<PartnerRow, 'nameKey'>): Promise<void> {
    await this.table().insert({ ...row, nameKey: nameKeyOf(row.name) });
  }

  async update(id: string, change: Partial<Pick<PartnerRow, 'name' | 'contactEmail'>>): Promise<void> {
    const nameKey = change.name === undefined ? {} : { nameKey: nameKeyOf(change.name) };
    await this.table()
      .where({ id })
      .update({ ...change, ...nameKey });
  }

  async find(id: string): Promise<PartnerRow | null> {
    return (await this.table().where({ id }).first()) ?? null;
  }

  async count(): Promise<number> {
    const row = await this.database.connection('partners').count({ total: '*' }).first();
    return Number(row?.['total'] ?? 0);
  }

  /** Every count comes with its row from one statement. Keys are live that are neither revoked nor expired at `now`. */
  async list(page: { readonly limit: number; readonly offset: number }, now: string): Promise<PartnerSummaryRow[]> {
    const { connection } = this.database;
    const sites = connection('partnerSites').whereRaw('partner_sites.partner_id = partners.id').count();
    const keys = connection('keys').whereRaw('keys.partner_id = partners.id');
    const live = keys
      .clone()
      .whereNull('revokedAt')
      .andWhere((either) => either.whereNull('expiresAt').orWhere('expiresAt', '>', now));
    const rows: PartnerSummaryRow[] = await connection('partners')
      .select('id', 'name', 'contactEmail', 'createdAt', {
        siteCount: sites,
        keyCount: live.count(),
        estimateCount: this.estimates().whereRaw('keys.partner_id = partners.id'),
        lastUsedAt: keys.clone().max('lastUsedAt'),
      })
      .orderBy([{ column: 'nameKey' }, { column: 'id' }])
      .limit(page.limit)
      .offset(page.offset);
    return rows.map((row) => ({ ...row, estimateCount: Number(row.estimateCount ?? 0) }));
  }

  async estimateCount(partnerId: string): Promise<number> {
    const [row] = (await this.estimates().where({ 'keys.partnerId': partnerId })) as unknown as {
      total: number | null;
    }[];
    return Number(row?.total ?? 0);
  }

  /** From the monthly counts, which stay few where estimates grow to millions. */
  private estimates() {
    return this.database
      .connection('keyMonths')
      .join('keys', 'keys.id', 'keyMonths.keyId')
      .sum({ total: 'keyMonths.estimateCount' });
  }

  private table() {
    return this.database.table<PartnerRow>('partners');
  }
}
