import type { Knex } from 'knex';

export async function up(knex: Knex): Promise<void> {
  await knex.schema.createTable('partner_sites', (table) => {
    table.string('id', 32).primary();
    table.string('partner_id', 32).notNullable().references('id').inTable('partners').onDelete('CASCADE');
    table.string('origin', 255).notNullable();
    table.string('created_at', 24).notNullable();
    table.unique(['partner_id', 'origin']);
    table.index('origin');
  });
  await knex.schema.createTable('keys', (table) => {
    table.string('id', 32).primary();
    table.string('partner_id', 32).notNullable().references('id').inTable('partners');
    table.string('public_id', 16).notNullable().unique();
    table.string('secret_hash', 64).notNullable();
    table.string('last_four', 4).notNullable();
    table.string('kind', 16).notNullable().checkIn(['partner', 'embed']);
    table.string('label', 120).notNullable();
    table.boolean('all_estimators').notNullable();
    table.integer('per_minute').notNullable();
    table.integer('monthly_quota');
    table.string('expires_at', 24);
    table.string('created_at', 24).notNullable();
    table.string('created_by', 32).notNullable().references('id').inTable('people');
    table.string('last_used_at', 24);
    table.string('revoked_at', 24);
    table.index('partner_id');
  });
  await knex.schema.createTable('key_estimators', (table) => {
    table.string('key_id', 32).notNullable().references('id').inTable('keys').onDelete('CASCADE');
    table.string('estimator_id', 32).notNullable().references('id').inTable('estimators');
    table.primary(['key_id', 'estimator_id']);
  });
  // Estimates answered to a key in a calendar month (UTC, as 2026-12).
  await knex.schema.createTable('key_months', (table) => {
    table.string('key_id', 32).notNullable().references('id').inTable('keys').onDelete('CASCADE');
    table.string('month', 7).notNullable();
    table.integer('estimate_count').notNullable();
    table.primary(['key_id', 'month']);
  });
  await knex.schema.createTable('estimates', (table) => {
    table.string('id', 32).primary();
    table.string('estimator_id', 32).notNullable().references('id').inTable('estimators');
    table.string('edition_id', 32).notNullable().references('id').inTable('editions');
    table.string('key_id', 32).notNullable().references('id').inTable('keys');
    table.string('partner_id', 32).notNullable().references('id').inTable('partners');
    table.json('inputs').notNullable();
    table.double('value').notNullable();
    table.double('low');
    table.double('high');
    table.integer('flag_count').notNullable();
    // The answer as it left, so that it reads the same for as long as the database is kept.
    table.text('answer').notNullable();
    table.string('issued_at', 24).notNullable();
    table.index(['estimator_id', 'issued_at', 'id']);
    table.index(['partner_id', 'issued_at']);
    table.index(['edition_id', 'issued_at']);
    table.index('issued_at');
  });
}

export async function down(knex: Knex): Promise<void> {
  for (const table of ['estimates', 'key_months', 'key_estimators', 'keys', 'partner_sites']) {
    await knex.schema.dropTable(table);
  }
}
