import type { Knex } from 'knex';

/** The e-mail outbox, calendar invitations with their lives, calendar feeds, and the append-only history. */
export async function up(knex: Knex): Promise<void> {
  await knex.schema.createTable('outbox', (t) => {
    t.increments('id');
    /** One effect, one key: a second insert with the same key is ignored. */
    t.text('idempotency_key').notNullable().unique();
    t.text('to_email').notNullable();
    t.text('to_name').notNullable();
    t.text('subject').notNullable();
    t.text('text').notNullable();
    t.text('html').notNullable();
    t.text('ical');
    t.text('ical_method');
    t.text('state').notNullable().defaultTo('waiting').checkIn(['waiting', 'sending', 'sent', 'failed']);
    t.integer('attempts').notNullable().defaultTo(0);
    t.text('next_attempt_at').notNullable();
    t.text('claimed_at');
    t.text('last_error');
    t.text('message_id').notNullable();
    t.text('created_at').notNullable();
    t.text('sent_at');
    t.index(['state', 'next_attempt_at']);
  });
  await knex.schema.createTable('invitations', (t) => {
    t.increments('id');
    t.text('uid').notNullable().unique();
    t.integer('person_id').notNullable().references('people.id');
    t.text('subject_kind').notNullable().checkIn(['run', 'arrival']);
    t.integer('subject_id').notNullable();
    t.integer('sequence').notNullable().defaultTo(0);
    t.text('method').notNullable().checkIn(['REQUEST', 'CANCEL']);
    /** Hash of what it said last: the same again is not sent. */
    t.text('content_hash').notNullable();
    t.json('event').notNullable();
    t.text('updated_at').notNullable();
    t.unique(['person_id', 'subject_kind', 'subject_id']);
  });
  await knex.schema.createTable('calendar_feeds', (t) => {
    t.increments('id');
    t.integer('person_id').notNullable().references('people.id').onDelete('CASCADE').unique();
    t.text('token').notNullable().unique();
    t.text('created_at').notNullable();
  });
  await knex.schema.createTable('history', (t) => {
    t.increments('id');
    t.text('at').notNullable();
    t.integer('actor_id').references('people.id');
    t.text('actor_name').notNullable();
    t.text('subject_kind').notNullable();
    t.integer('subject_id').notNullable();
    t.text('action').notNullable();
    t.text('text').notNullable();
    t.json('before');
    t.json('after');
    t.index(['subject_kind', 'subject_id']);
  });
}

export async function down(knex: Knex): Promise<void> {
  for (const table of ['history', 'calendar_feeds', 'invitations', 'outbox'])
    await knex.schema.dropTable(table);
}
