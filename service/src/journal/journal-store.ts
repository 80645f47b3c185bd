import type { Database } from '../database/database';

/** Each absent filter lets everything through; times bound as from ≤ at < to. */
export interface JournalFilter {
  readonly action?: string;
  readonly actorId?: string;
  readonly subjectKind?: string;
  readonly subjectId?: string;
  readonly from?: string;
  readonly to?: string;
}

export interface JournalRow {
  readonly id: number;
  readonly at: string;
  readonly actorId: string | null;
  readonly actorName: string | null;
  readonly action: string;
  readonly subjectKind: string;
  readonly subjectId: string | null;
  readonly summary: string;
}

export class JournalStore {
  constructor(private readonly database: Database) {}

  /** Newest first. */
  async list(filter: JournalFilter, page: { readonly limit: number; readonly offset: number }): Promise<JournalRow[]> {
    return this.newest(this.matching(filter), page);
  }

  async newestAbout(subjectKinds: readonly string[], limit: number): Promise<JournalRow[]> {
    return this.newest(this.entries().whereIn('journal.subjectKind', [...subjectKinds]), { limit, offset: 0 });
  }

  async count(filter: JournalFilter): Promise<number> {
    const row = await this.matching(filter).count({ total: '*' }).first();
    return Number(row?.['total'] ?? 0);
  }

  private matching({ from, to, ...exact }: JournalFilter) {
    const query = this.entries();
    for (const [column, value] of Object.entries(exact))
      if (value !== undefined) query.where(`journal.${column}`, value);
    if (from !== undefined) query.where('journal.at', '>=', from);
    if (to !== undefined) query.where('journal.at', '<', to);
    return query;
  }

  private entries() {
    return this.database.connection('journal').leftJoin('people', 'people.id', 'journal.actorId');
  }

  private newest(
    query: ReturnType<JournalStore['entries']>,
    page: { readonly limit: number; readonly offset: number },
  ): Promise<JournalRow[]> {
    return query
      .select(
        'journal.id',
        'journal.at',
        'journal.actorId',
        'people.name as actorName',
        'journal.action',
        'journal.subjectKind',
        'journal.subjectId',
        'journal.summary',
      )
      .orderBy([
        { column: 'journal.at', order: 'desc' },
        { column: 'journal.id', order: 'desc' },
      ])
      .limit(page.limit)
      .offset(page.offset);
  }
}
