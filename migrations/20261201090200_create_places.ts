import type { Knex } from 'knex';

/** Hubs, carriers, counters, species, boxes, and the profiles that point at counters. */
export async function up(knex: Knex): Promise<void> {
  await knex.schema.createTable('hubs', (t) => {
    t.increments('id');
    t.text('name').notNullable();
    t.text('city').notNullable();
    t.text('state').notNullable();
    t.float('lat').notNullable();
    t.float('lon').notNullable();
    t.text('zone').notNullable();
  });
  await knex.schema.createTable('carriers', (t) => {
    t.increments('id');
    t.text('name').notNullable();
    t.integer('hub_id').notNullable().references('hubs.id');
  });
  await knex.schema.createTable('counters', (t) => {
    t.increments('id');
    t.integer('carrier_id').notNullable().references('carriers.id');
    t.text('name').notNullable();
    t.text('street').notNullable();
    t.text('city').notNullable();
    t.text('state').notNullable();
    t.text('postal_code').notNullable();
    t.float('lat').notNullable();
    t.float('lon').notNullable();
    t.text('zone').notNullable();
    t.boolean('can_drop_off').notNullable();
    t.boolean('can_hold').notNullable();
    t.json('working_days').notNullable();
    t.json('cut_off_minutes').notNullable();
    t.json('opening_hours').notNullable();
    t.integer('commit_minute').notNullable();
    t.boolean('active').notNullable().defaultTo(true);
    t.integer('version').notNullable().defaultTo(1);
  });
  await knex.schema.createTable('species', (t) => {
    t.increments('id');
    t.text('common_name').notNullable();
    t.text('scientific_name').notNullable();
    t.float('band_low_f').notNullable();
    t.float('band_high_f').notNullable();
    t.float('endurance_low_f').notNullable();
    t.float('endurance_high_f').notNullable();
    t.float('outdoor_low_f');
    t.float('outdoor_high_f');
    t.float('typical_mass_g').notNullable();
    t.boolean('venomous').notNullable().defaultTo(false);
    t.text('note').notNullable().defaultTo('');
    t.boolean('active').notNullable().defaultTo(true);
    t.integer('version').notNullable().defaultTo(1);
  });
  await knex.schema.createTable('boxes', (t) => {
    t.increments('id');
    t.text('name').notNullable();
    t.float('length_in').notNullable();
    t.float('width_in').notNullable();
    t.float('height_in').notNullable();
    t.float('foam_in').notNullable();
    t.boolean('active').notNullable().defaultTo(true);
    t.integer('version').notNullable().defaultTo(1);
  });
  await knex.schema.createTable('breeder_profiles', (t) => {
    t.integer('person_id').primary().references('people.id').onDelete('CASCADE');
    t.integer('window_open_minute').notNullable();
    t.integer('window_close_minute').notNullable();
    t.integer('service_minutes').notNullable();
    t.integer('drop_off_counter_id').notNullable().references('counters.id');
  });
  await knex.schema.createTable('coordinator_profiles', (t) => {
    t.integer('person_id').primary().references('people.id').onDelete('CASCADE');
    t.float('capacity_l').notNullable();
    t.integer('longest_run_minutes').notNullable();
    t.integer('cents_per_mile').notNullable();
    t.json('free_weekdays').notNullable();
  });
}

export async function down(knex: Knex): Promise<void> {
  for (const table of [
    'coordinator_profiles',
    'breeder_profiles',
    'boxes',
    'species',
    'counters',
    'carriers',
    'hubs',
  ])
    await knex.schema.dropTable(table);
}
