import type { Knex } from 'knex';

/** Files that wait to be brought in, work on records, drafts of mending, retention, and finer figures of a column. */
export async function up(knex: Knex): Promise<void> {
  await knex.schema.alterTable('record_sets', (table) => {
    // After this day (2027-12-31) the rows of every revision are erased.
    table.string('retain_until', 10);
    table.string('changed_at', 24);
  });
  await knex('record_sets').update({ changed_at: knex.ref('created_at') });
  await knex.schema.alterTable('record_revisions', (table) => {
    // The revision whose rows come first, when a file was appended to it, and how many rows the file added.
    table.string('appended_to', 32);
    table.integer('appended_row_count');
    table.boolean('original_kept').notNullable().defaultTo(true);
    table.string('erased_at', 24);
  });
  await knex.schema.alterTable('record_columns', (table) => {
    // JSON: [{share, value}], and {count, low, high, deviation}; null where they were not taken.
    table.json('quantiles');
    table.json('outlying');
  });
  // A file that has arrived and does not count yet.
  await knex.schema.createTable('incoming_files', (table) => {
    table.string('id', 32).primary();
    table.string('file_name', 255).notNullable();
    // Name within the folder of uploads.
    table.string('path', 255).notNullable();
    table.string('sha256', 64).notNullable();
    table.bigInteger('byte_count').notNullable();
    table.string('received_at', 24).notNullable();
    table.string('kept_until', 24).notNullable();
    table.string('created_by', 32).notNullable().references('id').inTable('people');
    table.index('kept_until');
  });
  // Work on records that takes its time: bringing a file in, mending a revision.
  await knex.schema.createTable('record_tasks', (table) => {
    table.string('id', 32).primary();
    table.string('kind', 16).notNullable().checkIn(['bring-in', 'mend']);
    table.string('state', 16).notNullable().checkIn(['queued', 'running', 'done', 'failed', 'cancelled']);
    table.json('progress').notNullable();
    // The revision that is being made: its cells are stored before its row is.
    table.string('revision_id', 32).notNullable();
    table.string('record_set_id', 32);
    table.json('problem');
    table.boolean('cancel_asked').notNullable().defaultTo(false);
    // When the process that does the work last said so.
    table.string('said_at', 24).notNullable();
    table.string('created_at', 24).notNullable();
    table.string('created_by', 32).notNullable().references('id').inTable('people');
    table.index('created_at');
  });
  // The steps that a person is working on for a revision.
  await knex.schema.createTable('mending_drafts', (table) => {
    table.string('revision_id', 32).notNullable().references('id').inTable('record_revisions').onDelete('CASCADE');
    table.string('person_id', 32).notNullable().references('id').inTable('people');
    table.json('steps').notNullable();
    table.string('changed_at', 24).notNullable();
    table.primary(['revision_id', 'person_id']);
  });
}

export async function down(knex: Knex): Promise<void> {
  for (const table of ['mending_drafts', 'record_tasks', 'incoming_files']) await knex.schema.dropTable(table);
  await knex.schema.alterTable('record_columns', (table) => table.dropColumns('quantiles', 'outlying'));
  await knex.schema.alterTable('record_revisions', (table) => {
    table.dropColumns('appended_to', 'appended_row_count', 'original_kept', 'erased_at');
  });
  await knex.schema.alterTable('record_sets', (table) => table.dropColumns('retain_until', 'changed_at'));
}
