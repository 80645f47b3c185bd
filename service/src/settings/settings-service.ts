import type { components } from '../../../openapi/types/desk';
import type { Database } from '../database/database';
import type { Journal } from '../journal/journal';
import type { SignedInPerson } from '../people/person';
import type { DeskSettings, Settings } from './settings';

type SettingsChange = components['schemas']['SettingsChange'];

const titles: Readonly<Record<keyof DeskSettings, string>> = {
  deskName: 'name of the desk',
  contactEmail: 'contact address',
};

export class SettingsService {
  constructor(
    private readonly database: Database,
    private readonly settings: Settings,
    private readonly journal: Journal,
  ) {}

  async read(): Promise<DeskSettings> {
    return this.settings.read();
  }

  /** One journal entry for every setting that really differs. */
  async change(change: SettingsChange, actor: SignedInPerson): Promise<DeskSettings> {
    return this.database.unitOfWork(async () => {
      const before = await this.settings.read();
      for (const name of ['deskName', 'contactEmail'] as const) {
        const value = change[name]?.trim();
        if (value === undefined || value === before[name]) continue;
        await this.settings.change({ [name]: value });
        const summary = `The ${titles[name]} is now ${value}; it was ${before[name]}`;
        await this.journal.write({
          actorId: actor.id,
          action: 'setting-changed',
          subjectKind: 'setting',
          subjectId: name,
          summary,
        });
      }
      return this.settings.read();
    });
  }
}
