import type { Database } from '../database/database';

export interface SiteRow {
  id: string;
  partnerId: string;
  origin: string;
  createdAt: string;
}

export class SitesStore {
  constructor(private readonly database: Database) {}

  async insert(row: SiteRow): Promise<void> {
    await this.table().insert(row);
  }

  async listOfPartner(partnerId: string): Promise<SiteRow[]> {
    return this.table().where({ partnerId }).orderBy('origin');
  }

  async find(partnerId: string, id: string): Promise<SiteRow | null> {
    return (await this.table().where({ partnerId, id }).first()) ?? null;
  }

  async remove(id: string): Promise<void> {
    await this.table().where({ id }).delete();
  }

  private table() {
    return this.database.table<SiteRow>('partnerSites');
  }
}
