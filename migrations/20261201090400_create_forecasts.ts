import type { Knex } from 'knex';

/** The forecast cache: one row a place, kept when the service is down, with when it was issued and fetched. */
export async function up(knex: Knex): Promise<void> {
  await knex.schema.createTable('forecasts', (t) => {
    t.text('place_key').primary();
    t.float('lat').notNullable();
    t.float('lon').notNullable();
    t.text('zone').notNullable();
    /** Path of the raw grid on the service, from /points; null before it was resolved or after it moved. */
    t.text('grid_path');
    t.text('last_modified');
    /** JSON of {startMs, tempsF}; null until the first answer. */
    t.json('series');
    t.text('issued_at');
    t.text('fetched_at');
    t.json('alerts');
    t.text('alerts_fetched_at');
    /** The last failure in a sentence; null after a success. */
    t.text('problem');
    t.text('tried_at');
  });
}

export async function down(knex: Knex): Promise<void> {
  await knex.schema.dropTable('forecasts');
}
