import type { Knex } from 'knex';

export async function up(knex: Knex): Promise<void> {
  await knex.schema.createTable('estimators', (table) => {
    table.string('id', 32).primary();
    table.string('slug', 64).notNullable().unique();
    table.string('name', 120).notNullable();
    table.string('target_name', 120).notNullable();
    table.string('unit', 40).notNullable();
    table.text('description').notNullable();
    table.text('intended_use').notNullable();
    table.text('not_for').notNullable();
    table.json('cautions').notNullable();
    table.string('created_at', 24).notNullable();
    table.string('created_by', 32).notNullable().references('id').inTable('people');
  });
  await knex.schema.createTable('fits', (table) => {
    table.string('id', 32).primary();
    table.string('estimator_id', 32).notNullable().references('id').inTable('estimators');
    table.string('revision_id', 32).notNullable().references('id').inTable('record_revisions');
    table.json('specification').notNullable();
    table.string('state', 16).notNullable().checkIn(['queued', 'running', 'done', 'failed', 'cancelled']);
    table.string('stage', 80).notNullable();
    table.integer('stage_done').notNullable();
    table.integer('stage_total').notNullable();
    // The process that runs it says so again every few seconds; a stale claim is taken up by another.
    table.string('claimed_by', 64);
    table.string('claimed_at', 24);
    table.boolean('cancel_asked').notNullable().defaultTo(false);
    table.json('failure');
    table.text('result');
    table.text('formula');
    table.double('lambda');
    table.double('effective_degrees_of_freedom');
    table.double('rmse');
    table.double('r2');
    table.string('created_at', 24).notNullable();
    table.string('created_by', 32).notNullable().references('id').inTable('people');
    table.string('started_at', 24);
    table.string('finished_at', 24);
    table.index(['estimator_id', 'created_at']);
    table.index(['state', 'created_at']);
  });
  await knex.schema.createTable('editions', (table) => {
    table.string('id', 32).primary();
    table.string('estimator_id', 32).notNullable().references('id').inTable('estimators');
    table.integer('number').notNullable();
    table.string('fit_id', 32).notNullable().references('id').inTable('fits');
    table.string('state', 16).notNullable().checkIn(['draft', 'under-review', 'in-force', 'superseded', 'withdrawn']);
    table.text('change_note').notNullable();
    // The frozen formula as canonical JSON, and the SHA-256 of exactly that text.
    table.text('formula').notNullable();
    table.string('checksum', 64).notNullable();
    table.json('input_schema').notNullable();
    // The words that stood with it when it was drawn up.
    table.json('cautions').notNullable();
    table.string('method', 16).notNullable();
    table.double('rmse').notNullable();
    table.integer('record_count').notNullable();
    table.integer('input_count').notNullable();
    table.string('created_at', 24).notNullable();
    table.string('created_by', 32).notNullable().references('id').inTable('people');
    table.string('submitted_at', 24);
    table.string('submitted_by', 32).references('id').inTable('people');
    table.string('in_force_at', 24);
    table.string('in_force_by', 32).references('id').inTable('people');
    table.string('ended_at', 24);
    table.string('sunset_at', 24);
    table.unique(['estimator_id', 'number']);
  });
  // At most one edition of an estimator is in force, whatever the number of processes.
  await knex.raw("create unique index editions_one_in_force on editions (estimator_id) where state = 'in-force'");
  await knex.schema.createTable('edition_events', (table) => {
    table.increments('id');
    table.string('edition_id', 32).notNullable().references('id').inTable('editions').onDelete('CASCADE').index();
    table.string('at', 24).notNullable();
    table.string('by', 32).notNullable().references('id').inTable('people');
    table.string('state', 16).notNullable();
    table.text('note').notNullable();
  });
}

export async function down(knex: Knex): Promise<void> {
  for (const table of ['edition_events', 'editions', 'fits', 'estimators']) await knex.schema.dropTable(table);
}
