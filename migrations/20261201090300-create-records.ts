import type { Knex } from 'knex';

export async function up(knex: Knex): Promise<void> {
  await knex.schema.createTable('record_sets', (table) => {
    table.string('id', 32).primary();
    table.string('name', 120).notNullable();
    table.string('name_key', 120).notNullable().unique();
    table.string('description', 2000).notNullable();
    table.string('created_at', 24).notNullable();
    table.string('created_by', 32).notNullable().references('id').inTable('people');
  });
  await knex.schema.createTable('record_revisions', (table) => {
    table.string('id', 32).primary();
    table.string('record_set_id', 32).notNullable().references('id').inTable('record_sets');
    table.integer('number').notNullable();
    table.string('sha256', 64).notNullable();
    table.integer('row_count').notNullable();
    table.integer('column_count').notNullable();
    table.bigInteger('byte_count').notNullable();
    table.string('file_name', 255).notNullable();
    table.string('original_path', 255).notNullable();
    table.json('reading').notNullable();
    table.string('created_at', 24).notNullable();
    table.string('created_by', 32).notNullable().references('id').inTable('people');
    table.unique(['record_set_id', 'number']);
  });
  await knex.schema.createTable('record_columns', (table) => {
    table.string('revision_id', 32).notNullable().references('id').inTable('record_revisions').onDelete('CASCADE');
    table.integer('position').notNullable();
    table.string('name', 255).notNullable();
    table.string('kind', 16).notNullable().checkIn(['numeric', 'category', 'date', 'text']);
    table.string('unit', 40);
    table.integer('missing_count').notNullable();
    table.integer('distinct_count');
    table.double('minimum');
    table.double('maximum');
    table.double('mean');
    table.double('standard_deviation');
    table.json('histogram');
    // Every level of a category in the order of its codes, with its count.
    table.json('levels').notNullable();
    table.primary(['revision_id', 'position']);
    table.unique(['revision_id', 'name']);
  });
  // Cells of one column in blocks of rows: Float64 little-endian for numeric (NaN missing) and date (days since
  // 1970-01-01), Int32 codes for category (-1 missing), JSON for text.
  await knex.schema.createTable('record_blocks', (table) => {
    table.string('revision_id', 32).notNullable().references('id').inTable('record_revisions').onDelete('CASCADE');
    table.integer('position').notNullable();
    table.integer('block').notNullable();
    table.integer('row_count').notNullable();
    table.binary('cells').notNullable();
    table.primary(['revision_id', 'position', 'block']);
  });
}

export async function down(knex: Knex): Promise<void> {
  for (const table of ['record_blocks', 'record_columns', 'record_revisions', 'record_sets']) {
    await knex.schema.dropTable(table);
  }
}
