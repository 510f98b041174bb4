import type { Knex } from 'knex';

/** Runs, their stops and the parcels on them; a parcel is on one run at most. */
export async function up(knex: Knex): Promise<void> {
  await knex.schema.createTable('runs', (t) => {
    t.increments('id');
    t.text('state')
      .notNullable()
      .checkIn(['proposed', 'confirmed', 'underway', 'handed-over', 'closed', 'called-off'])
      .index();
    t.text('date').notNullable().index();
    t.integer('coordinator_id').notNullable().references('people.id').index();
    t.integer('counter_id').notNullable().references('counters.id');
    t.text('depart_at').notNullable();
    t.text('arrive_at').notNullable();
    t.text('cut_off_at').notNullable();
    t.float('drive_minutes').notNullable();
    t.float('miles').notNullable();
    t.float('last_leg_minutes').notNullable();
    t.integer('fixed_cents').notNullable();
    t.integer('driving_cents').notNullable();
    t.integer('alone_cents').notNullable();
    /** Plain sentences about what is wrong with it, JSON array. */
    t.json('problems').notNullable().defaultTo('[]');
    t.text('note').notNullable().defaultTo('');
    t.text('call_off_reason');
    t.text('confirmed_at');
    t.text('departed_at');
    t.text('handed_over_at');
    t.text('created_at').notNullable();
    t.text('updated_at').notNullable();
    t.integer('version').notNullable().defaultTo(1);
  });
  await knex.schema.createTable('run_stops', (t) => {
    t.increments('id');
    t.integer('run_id').notNullable().references('runs.id').onDelete('CASCADE').index();
    t.integer('seq').notNullable();
    t.integer('breeder_id').notNullable().references('people.id');
    t.text('arrive_at').notNullable();
    t.text('leave_at').notNullable();
    t.float('wait_minutes').notNullable();
    t.float('drive_minutes').notNullable();
    t.float('miles').notNullable();
    t.unique(['run_id', 'seq']);
  });
  await knex.schema.createTable('run_parcels', (t) => {
    t.integer('run_id').notNullable().references('runs.id').onDelete('CASCADE').index();
    t.integer('parcel_id').primary().references('parcels.id').onDelete('CASCADE');
    t.boolean('pinned').notNullable().defaultTo(false);
    t.integer('share_cents').notNullable().defaultTo(0);
  });
  await knex.schema.createTable('proposals', (t) => {
    t.increments('id');
    t.text('created_at').notNullable();
    t.integer('created_by').references('people.id');
    t.json('result').notNullable();
  });
}

export async function down(knex: Knex): Promise<void> {
  for (const table of ['proposals', 'run_parcels', 'run_stops', 'runs']) await knex.schema.dropTable(table);
}
