import type { Database } from '../database/database';

export interface DeskSettings {
  readonly deskName: string;
  readonly contactEmail: string;
}

const defaults: DeskSettings = { deskName: 'Estimating desk', contactEmail: 'desk@example.com' };

interface SettingRow {
  name: string;
  value: string;
}

export class Settings {
  constructor(private readonly database: Database) {}

  async read(): Promise<DeskSettings> {
    const rows = await this.database.table<SettingRow>('settings');
    return { ...defaults, ...Object.fromEntries(rows.map((row) => [row.name, row.value])) };
  }

  async change(change: Partial<DeskSettings>): Promise<DeskSettings> {
    for (const [name, value] of Object.entries(change)) {
      await this.database.table<SettingRow>('settings').insert({ name, value }).onConflict('name').merge();
    }
    return this.read();
  }
}
