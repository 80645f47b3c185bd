import type { Database } from '../database/database';

export interface InvitationRow {
  id: string;
  personId: string;
  tokenHash: string;
  expiresAt: string;
  spentAt: string | null;
  createdAt: string;
}

export class InvitationsStore {
  constructor(private readonly database: Database) {}

  async insert(row: InvitationRow): Promise<void> {
    await this.table().insert(row);
  }

  async findByTokenHash(tokenHash: string): Promise<InvitationRow | null> {
    return (await this.table().where({ tokenHash }).first()) ?? null;
  }

  /** Marks it used; false when it was used or had run out, so that of two answers at once only one counts. */
  async spend(id: string, at: string): Promise<boolean> {
    const count = await this.table()
      .where({ id })
      .whereNull('spentAt')
      .where('expiresAt', '>', at)
      .update({ spentAt: at });
    return count === 1;
  }

  async spendAllOf(personId: string, at: string): Promise<void> {
    await this.table().where({ personId }).whereNull('spentAt').update({ spentAt: at });
  }

  /** Those used or run out before the moment; the number removed. */
  async removeEndedBefore(moment: string): Promise<number> {
    return this.table().where('expiresAt', '<', moment).orWhere('spentAt', '<', moment).delete();
  }

  private table() {
    return this.database.table<InvitationRow>('invitations');
  }
}
