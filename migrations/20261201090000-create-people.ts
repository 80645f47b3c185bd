import type { Knex } from 'knex';

export async function up(knex: Knex): Promise<void> {
  await knex.schema.createTable('partners', (table) => {
    table.string('id', 32).primary();
    table.string('name', 120).notNullable();
    table.string('name_key', 120).notNullable().unique();
    table.string('contact_email', 254).notNullable();
    table.string('created_at', 24).notNullable();
    table.string('created_by', 32).notNullable();
  });
  await knex.schema.createTable('people', (table) => {
    table.string('id', 32).primary();
    table.string('name', 120).notNullable();
    table.string('email', 254).notNullable();
    table.string('email_key', 254).notNullable().unique();
    table.string('password_hash', 255);
    table.string('state', 16).notNullable().checkIn(['invited', 'active', 'closed']);
    table.string('partner_id', 32).references('id').inTable('partners');
    table.string('created_at', 24).notNullable();
    table.string('last_sign_in_at', 24);
  });
  await knex.schema.createTable('person_roles', (table) => {
    table.string('person_id', 32).notNullable().references('id').inTable('people').onDelete('CASCADE');
    table
      .string('role', 32)
      .notNullable()
      .checkIn(['administrator', 'analyst', 'reviewer', 'viewer', 'partner-developer']);
    table.primary(['person_id', 'role']);
  });
  await knex.schema.createTable('invitations', (table) => {
    table.string('id', 32).primary();
    table.string('person_id', 32).notNullable().references('id').inTable('people').onDelete('CASCADE');
    table.string('token_hash', 64).notNullable().unique();
    table.string('expires_at', 24).notNullable();
    table.string('spent_at', 24);
    table.string('created_at', 24).notNullable();
  });
  await knex.schema.createTable('sign_in_attempts', (table) => {
    table.string('subject', 300).primary();
    table.integer('failures').notNullable();
    table.string('last_failed_at', 24).notNullable();
    table.string('blocked_until', 24).notNullable();
  });
}

export async function down(knex: Knex): Promise<void> {
  for (const table of ['sign_in_attempts', 'invitations', 'person_roles', 'people', 'partners']) {
    await knex.schema.dropTable(table);
  }
}
