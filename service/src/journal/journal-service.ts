import type { components } from '../../../openapi/types/desk';
import type { Page } from '../http/page';
import type { JournalFilter, JournalRow, JournalStore } from './journal-store';

type JournalEntry = components['schemas']['JournalEntry'];
type JournalPage = components['schemas']['JournalPage'];

/** What the desk's own work is about. Entries on people, partners, keys and settings are for administrators. */
const deskWork = ['estimator', 'edition', 'fit', 'record-set'];

const inUtc = (time: string | undefined): string | undefined =>
  time === undefined ? undefined : new Date(time).toISOString();

export class JournalService {
  constructor(private readonly store: JournalStore) {}

  async list(filter: JournalFilter, page: Page): Promise<JournalPage> {
    const bounds = { ...filter, from: inUtc(filter.from), to: inUtc(filter.to) };
    const rows = await this.store.list(bounds, page);
    return { items: rows.map(toEntry), total: await this.store.count(bounds) };
  }

  async newest(limit: number): Promise<JournalEntry[]> {
    return (await this.store.list({}, { limit, offset: 0 })).map(toEntry);
  }

  async newestOfDeskWork(limit: number): Promise<JournalEntry[]> {
    return (await this.store.newestAbout(deskWork, limit)).map(toEntry);
  }
}

function toEntry({ actorId, actorName, ...entry }: JournalRow): JournalEntry {
  return { ...entry, actor: actorId !== null && actorName !== null ? { id: actorId, name: actorName } : null };
}
