import type { Logger } from 'pino';
import { timeText, type Clock } from '../clock';
import { ConfigurationError, type Config } from '../config';
import type { Database } from '../database/database';
import { newId } from '../database/new-id';
import { DeskError } from '../errors';
import type { Journal } from '../journal/journal';
import { hashPassword } from './password';
import { requireStrongPassword } from './password-strength';
import type { PeopleStore } from './people-store';
import type { Role } from './person';

const deskRoles: readonly Role[] = ['administrator', 'analyst', 'reviewer', 'viewer'];

export interface FirstAdministratorParts {
  readonly administrator: Config['administrator'];
  readonly database: Database;
  readonly people: PeopleStore;
  readonly journal: Journal;
  readonly clock: Clock;
  readonly log: Logger;
}

/** Enters the administrator of the environment while nobody is entered; afterwards the two variables mean nothing. */
export async function enterFirstAdministrator(parts: FirstAdministratorParts): Promise<void> {
  const { administrator, people, log } = parts;
  if ((await people.count()) > 0) return;
  if (administrator === null) {
    log.warn(
      'Nobody can sign in yet. Start again with ADMIN_EMAIL and ADMIN_PASSWORD (at least 15 characters) set: they make the first administrator.',
    );
    return;
  }
  const name = administrator.email.split('@')[0];
  requireStrongSetting(administrator.password, { name, email: administrator.email });
  const passwordHash = await hashPassword(administrator.password);
  await insertUnlessEntered(parts, { name, email: administrator.email, passwordHash });
}

/** Counted again inside the transaction: several processes may start at once. */
async function insertUnlessEntered(
  parts: FirstAdministratorParts,
  entry: { name: string; email: string; passwordHash: string },
): Promise<void> {
  const { database, people, journal, clock, log } = parts;
  await database.unitOfWork(async () => {
    if ((await people.count()) > 0) return;
    const id = newId();
    await people.insert({
      id,
      ...entry,
      roles: deskRoles,
      partnerId: null,
      state: 'active',
      createdAt: timeText(clock),
    });
    await journal.write({
      actorId: null,
      action: 'person-entered',
      subjectKind: 'person',
      subjectId: id,
      summary: `${entry.email} entered as the first administrator`,
    });
    log.info(`The first administrator is ${entry.email}; take ADMIN_PASSWORD out of the environment now.`);
  });
}

/** Told as a wrong setting, in one line and without the password. */
function requireStrongSetting(password: string, person: { readonly name: string; readonly email: string }): void {
  try {
    requireStrongPassword(password, person);
  } catch (error) {
    if (!(error instanceof DeskError)) throw error;
    throw new ConfigurationError(
      'ADMIN_PASSWORD',
      'easy to guess',
      'a few unrelated words of 15 characters or more in all',
    );
  }
}
