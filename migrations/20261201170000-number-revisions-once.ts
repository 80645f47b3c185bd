import type { Knex } from 'knex';

/** The number last given to a revision of the set: one that was deleted must not come again as another's. */
export async function up(knex: Knex): Promise<void> {
  await knex.schema.alterTable('record_sets', (table) => {
    table.integer('last_number').notNullable().defaultTo(0);
  });
  await knex.raw(
    'update record_sets set last_number = coalesce((select max(number) from record_revisions where record_set_id = record_sets.id), 0)',
  );
}

export async function down(knex: Knex): Promise<void> {
  await knex.schema.alterTable('record_sets', (table) => table.dropColumn('last_number'));
}
