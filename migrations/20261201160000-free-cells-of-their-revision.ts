import type { Knex } from 'knex';

const columns = ['revision_id', 'position', 'block', 'row_count', 'cells'];

async function rebuild(knex: Knex, refersToRevision: boolean): Promise<void> {
  await knex.schema.createTable('record_blocks_rebuilt', (table) => {
    const revision = table.string('revision_id', 32).notNullable();
    if (refersToRevision) revision.references('id').inTable('record_revisions').onDelete('CASCADE');
    table.integer('position').notNullable();
    table.integer('block').notNullable();
    table.integer('row_count').notNullable();
    table.binary('cells').notNullable();
    table.primary(['revision_id', 'position', 'block']);
  });
  const kept = refersToRevision ? 'where revision_id in (select id from record_revisions)' : '';
  await knex.raw(
    `insert into record_blocks_rebuilt (${columns.join()}) select ${columns.join()} from record_blocks ${kept}`,
  );
  await knex.schema.dropTable('record_blocks');
  await knex.schema.renameTable('record_blocks_rebuilt', 'record_blocks');
}

/**
 * Cells are written before their revision's row and removed after it, in short transactions of a thread. With the
 * foreign key a process killed between the two would leave a database that fails the check of every later start, and
 * deleting a revision would remove its cells in one long transaction.
 */
export async function up(knex: Knex): Promise<void> {
  await rebuild(knex, false);
}

export async function down(knex: Knex): Promise<void> {
  await rebuild(knex, true);
}
