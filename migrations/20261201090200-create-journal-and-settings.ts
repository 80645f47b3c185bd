import type { Knex } from 'knex';

export async function up(knex: Knex): Promise<void> {
  await knex.schema.createTable('journal', (table) => {
    table.increments('id');
    table.string('at', 24).notNullable().index();
    table.string('actor_id', 32).references('id').inTable('people');
    table.string('action', 60).notNullable().index();
    table.string('subject_kind', 40).notNullable();
    table.string('subject_id', 64);
    table.string('summary', 500).notNullable();
    table.index(['subject_kind', 'subject_id']);
  });
  await knex.schema.createTable('settings', (table) => {
    table.string('name', 60).primary();
    table.text('value').notNullable();
  });
}

export async function down(knex: Knex): Promise<void> {
  await knex.schema.dropTable('settings');
  await knex.schema.dropTable('journal');
}
