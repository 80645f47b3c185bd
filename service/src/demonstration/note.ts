import { existsSync, readFileSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { partnerPageSettingsPath } from '../partner-page/partner-page';
import { demonstrationPassword } from './cast';
import { Draws } from './draws';
import { drawRefitCase, refitInputs } from './refit-records';
import { required, type Stage } from './stage';

/** What a start tells about the demonstration. The keys stand here because the database holds their hashes alone. */
export interface DemonstrationNote {
  readonly password: string;
  readonly people: readonly { readonly name: string; readonly email: string; readonly roles: readonly string[] }[];
  readonly estimator: string;
  readonly partnerKey: string;
  readonly embedKey: string;
  readonly administratorEmail: string;
  readonly embedPartnerId: string;
  /** The sample page's origin, listed for the embed key's partner. */
  readonly partnerPageUrl: string;
  readonly exampleInputs: Readonly<Record<string, string | number>>;
}

const roleOrder = ['administrator', 'analyst', 'reviewer', 'viewer', 'partner-developer'];
const byRole = (first: { readonly roles: readonly string[] }, second: { readonly roles: readonly string[] }): number =>
  roleOrder.indexOf(first.roles[0]) - roleOrder.indexOf(second.roles[0]);

const notePath = (dataFolder: string): string => join(dataFolder, 'demonstration.json');

export async function demonstrationNote(stage: Stage): Promise<DemonstrationNote> {
  const people = await stage.services.people.list(50, 0);
  return {
    password: demonstrationPassword,
    people: people.map(({ name, email, roles }) => ({ name, email, roles })).sort(byRole),
    estimator: 'refit-labour',
    partnerKey: required(stage.keyTexts, 'northquay'),
    embedKey: required(stage.keyTexts, 'pellTarn'),
    administratorEmail: stage.cast.administrator.email,
    embedPartnerId: required(stage.keys, 'pellTarn').partnerId,
    partnerPageUrl: stage.services.config.partnerPageUrl,
    exampleInputs: refitInputs(drawRefitCase(new Draws(2))),
  };
}

/** Both files are for the account that runs the service alone: they hold keys. */
export function writeNote(dataFolder: string, note: DemonstrationNote): void {
  const keep = (path: string, content: object): void =>
    writeFileSync(path, `${JSON.stringify(content, null, 2)}\n`, { mode: 0o600 });
  keep(notePath(dataFolder), note);
  keep(partnerPageSettingsPath(dataFolder), { estimator: note.estimator, key: note.embedKey });
}

export function readNote(dataFolder: string): DemonstrationNote | null {
  const path = notePath(dataFolder);
  return existsSync(path) ? (JSON.parse(readFileSync(path, 'utf8')) as DemonstrationNote) : null;
}
