import type { Knex } from 'knex';

/** Sessions (connect-session-knex layout), one-time account links and the sign-in throttle. */
export async function up(knex: Knex): Promise<void> {
  await knex.schema.createTable('sessions', (t) => {
    t.text('sid').primary();
    t.json('sess').notNullable();
    t.timestamp('expired').notNullable().index();
  });
  await knex.schema.createTable('account_links', (t) => {
    t.increments('id');
    t.integer('person_id').notNullable().references('people.id').onDelete('CASCADE').index();
    t.text('kind').notNullable().checkIn(['invitation', 'reset']);
    /** SHA-256 of the token in the link: the table alone opens no account. */
    t.text('token_hash').notNullable().unique();
    t.text('created_at').notNullable();
    t.text('expires_at').notNullable();
    t.text('used_at');
  });
  await knex.schema.createTable('sign_in_failures', (t) => {
    t.text('key').primary();
    t.integer('count').notNullable();
    t.text('first_at').notNullable();
    t.text('last_at').notNullable();
  });
}

export async function down(knex: Knex): Promise<void> {
  for (const table of ['sign_in_failures', 'account_links', 'sessions']) await knex.schema.dropTable(table);
}
