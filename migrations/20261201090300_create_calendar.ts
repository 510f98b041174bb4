import type { Knex } from 'knex';

/** Blackouts, and the circle's policy: one row a version, the newest in force. */
export async function up(knex: Knex): Promise<void> {
  await knex.schema.createTable('blackouts', (t) => {
    t.increments('id');
    t.text('title').notNullable();
    t.text('kind').notNullable().checkIn(['date', 'range', 'yearly']);
    t.text('start_date');
    t.text('end_date');
    t.text('rules');
    t.json('lifted_dates').notNullable().defaultTo('[]');
    t.text('scope').notNullable().checkIn(['everywhere', 'carrier', 'state', 'counter']);
    t.integer('carrier_id').references('carriers.id');
    t.text('state');
    t.integer('counter_id').references('counters.id');
    t.text('note').notNullable().defaultTo('');
    t.text('source').notNullable().defaultTo('admin').checkIn(['federal-holiday', 'admin']);
    t.text('created_at').notNullable();
    t.integer('version').notNullable().defaultTo(1);
  });
  await knex.schema.createTable('policies', (t) => {
    t.increments('id');
    t.json('values').notNullable();
    t.text('created_at').notNullable();
    t.integer('created_by').references('people.id');
  });
}

export async function down(knex: Knex): Promise<void> {
  for (const table of ['policies', 'blackouts']) await knex.schema.dropTable(table);
}
