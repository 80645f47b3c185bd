import type { Database } from '../database/database';
import type { PersonRecord, PersonState, Role } from './person';

interface PersonRow {
  id: string;
  name: string;
  email: string;
  emailKey: string;
  passwordHash: string | null;
  state: PersonState;
  partnerId: string | null;
  createdAt: string;
  lastSignInAt: string | null;
}
interface RoleRow {
  personId: string;
  role: Role;
}

export interface NewPerson {
  readonly id: string;
  readonly name: string;
  readonly email: string;
  readonly passwordHash: string | null;
  readonly state: PersonState;
  readonly partnerId: string | null;
  readonly roles: readonly Role[];
  readonly createdAt: string;
}

type PersonChangeColumns = Partial<
  Pick<PersonRow, 'name' | 'email' | 'partnerId' | 'state' | 'passwordHash' | 'lastSignInAt'>
>;

export const emailKeyOf = (email: string): string => email.trim().toLowerCase();

export class PeopleStore {
  constructor(private readonly database: Database) {}

  async insert(person: NewPerson): Promise<void> {
    const { roles, ...columns } = person;
    await this.table().insert({ ...columns, emailKey: emailKeyOf(person.email), lastSignInAt: null });
    await this.insertRoles(person.id, roles);
  }

  async findById(id: string): Promise<PersonRecord | null> {
    const [person] = await this.withRoles(await this.table().where({ id }));
    return person ?? null;
  }

  async findByEmail(email: string): Promise<PersonRecord | null> {
    const [person] = await this.withRoles(await this.table().where({ emailKey: emailKeyOf(email) }));
    return person ?? null;
  }

  async list(limit: number, offset: number): Promise<PersonRecord[]> {
    const rows = await this.table()
      .orderBy([{ column: 'name' }, { column: 'id' }])
      .limit(limit)
      .offset(offset);
    return this.withRoles(rows);
  }

  async partnerExists(partnerId: string): Promise<boolean> {
    return (await this.database.connection('partners').where({ id: partnerId }).first('id')) !== undefined;
  }

  async count(): Promise<number> {
    const row = await this.database.connection('people').count({ total: '*' }).first();
    return Number(row?.['total'] ?? 0);
  }

  async countActiveWithRole(role: Role): Promise<number> {
    const row = await this.database
      .connection('people')
      .join('personRoles', 'personRoles.personId', 'people.id')
      .where({ 'personRoles.role': role, 'people.state': 'active' })
      .count({ total: '*' })
      .first();
    return Number(row?.['total'] ?? 0);
  }

  async update(id: string, change: PersonChangeColumns): Promise<void> {
    const emailKey = change.email === undefined ? {} : { emailKey: emailKeyOf(change.email) };
    await this.table()
      .where({ id })
      .update({ ...change, ...emailKey });
  }

  async replaceRoles(id: string, roles: readonly Role[]): Promise<void> {
    await this.database.table<RoleRow>('personRoles').where({ personId: id }).delete();
    await this.insertRoles(id, roles);
  }

  private table() {
    return this.database.table<PersonRow>('people');
  }

  private async insertRoles(personId: string, roles: readonly Role[]): Promise<void> {
    await this.database.table<RoleRow>('personRoles').insert(roles.map((role) => ({ personId, role })));
  }

  private async withRoles(rows: readonly PersonRow[]): Promise<PersonRecord[]> {
    const ids = rows.map((row) => row.id);
    const roles = await this.database.table<RoleRow>('personRoles').whereIn('personId', ids).orderBy('role');
    return rows.map(({ emailKey: _, ...person }) => ({
      ...person,
      roles: roles.filter((entry) => entry.personId === person.id).map((entry) => entry.role),
    }));
  }
}
