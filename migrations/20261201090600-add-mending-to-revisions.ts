import type { Knex } from 'knex';

/** A revision made from another one by steps; without them it was brought in from a file. */
export async function up(knex: Knex): Promise<void> {
  await knex.schema.alterTable('record_revisions', (table) => {
    table.string('mended_from', 32);
    // JSON: the steps, and a sentence on what each of them did.
    table.json('mending');
  });
}

export async function down(knex: Knex): Promise<void> {
  await knex.schema.alterTable('record_revisions', (table) => {
    table.dropColumn('mended_from');
    table.dropColumn('mending');
  });
}
