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

export const emailKeyOf = (email: string): string => email.trim().toLowerCase();

export class PeopleStore {
  constructor(private readonly database: Database) {}

  async insert(person: NewPerson): Promise<void> {
    const { roles, ...columns } = person;
    await this.database.table<PersonRow>('people').insert({ ...columns, emailKey: emailKeyOf(person.email), lastSignInAt: null });
    await this.insertRoles(person.id, roles);
  }

  async findById(id: string): Promise<PersonRecord | null> {
    return this.withRoles(await this.database.table<PersonRow>('people').where({ id }).first());
  }

  async findByEmail(email: string): Promise<PersonRecord | null> {
    return this.withRoles(await this.database.table<PersonRow>('people').where({ emailKey: emailKeyOf(email) }).first());
  }

  async list(limit: number, offset: number): Promise<PersonRecord[]> {
    const rows = await this.database.table<PersonRow>('people').orderBy([{ column: 'name' }, { column: 'id' }]).limit(limit).offset(offset);
    const people = await Promise.all(rows.map((row) => this.withRoles(row)));
    return people.filter((person): person is PersonRecord => person !== null);
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

  async update(id: string, change: Partial<Pick<PersonRow, 'name' | 'state' | 'passwordHash' | 'lastSignInAt'>>): Promise<void> {
    await this.database.table<PersonRow>('people').where({ id }).update(change);
  }

  async replaceRoles(id: string, roles: readonly Role[]): Promise<void> {
    await this.database.table<RoleRow>('personRoles').where({ personId: id }).delete();
    await this.insertRoles(id, roles);
  }

  private async insertRoles(personId: string, roles: readonly Role[]): Promise<void> {
    await this.database.table<RoleRow>('personRoles').insert(roles.map((role) => ({ personId, role })));
  }

  private async withRoles(row: PersonRow | undefined): Promise<PersonRecord | null> {
    if (!row) return null;
    const roles = await this.database.table<RoleRow>('personRoles').where({ personId: row.id }).orderBy('role');
    return {
      id: row.id,
      name: row.name,
      email: row.email,
      partnerId: row.partnerId,
      roles: roles.map((entry) => entry.role),
      state: row.state,
      passwordHash: row.passwordHash,
      createdAt: row.createdAt,
      lastSignInAt: row.lastSignInAt,
    };
  }
}
