import type { Knex } from 'knex';

const states = [
  'draft',
  'seeking',
  'booked',
  'packed',
  'aboard',
  'handed-over',
  'arrived',
  'closed',
  'on-hold',
  'cancelled',
];

/** Parcels, their contents, the buyer's mornings, and each verdict a booking was made on. */
export async function up(knex: Knex): Promise<void> {
  await knex.schema.createTable('parcels', (t) => {
    t.increments('id');
    t.text('code').notNullable().unique();
    t.text('state').notNullable().checkIn(states).index();
    t.integer('breeder_id').notNullable().references('people.id').index();
    t.integer('buyer_id').notNullable().references('people.id').index();
    t.text('buyer_name').notNullable();
    t.text('buyer_phone');
    t.integer('drop_off_counter_id').notNullable().references('counters.id');
    t.text('service').notNullable().checkIn(['hold', 'door']);
    t.integer('hold_counter_id').references('counters.id');
    t.text('door_street');
    t.text('door_city');
    t.text('door_state');
    t.text('door_postal_code');
    t.float('door_lat');
    t.float('door_lon');
    t.text('door_zone');
    t.integer('box_id').notNullable().references('boxes.id');
    t.text('ready_from').notNullable();
    t.text('latest_date').notNullable();
    t.text('last_meal_date');
    t.text('ship_date').index();
    t.text('flexible_from');
    t.text('flexible_to');
    t.text('accepted_tight');
    t.text('hold_reason');
    t.integer('share_cents');
    t.text('tracking_number');
    /** The secret of the buyer's link. */
    t.text('arrival_token').notNullable().unique();
    t.text('report_outcome');
    t.text('report_text');
    t.text('report_at');
    t.text('note').notNullable().defaultTo('');
    t.text('created_at').notNullable();
    t.text('updated_at').notNullable();
    t.integer('version').notNullable().defaultTo(1);
  });
  await knex.schema.createTable('parcel_contents', (t) => {
    t.increments('id');
    t.integer('parcel_id').notNullable().references('parcels.id').onDelete('CASCADE').index();
    t.integer('species_id').notNullable().references('species.id');
    t.integer('quantity').notNullable();
    t.float('mass_g').notNullable();
  });
  await knex.schema.createTable('parcel_mornings', (t) => {
    t.integer('parcel_id').notNullable().references('parcels.id').onDelete('CASCADE');
    t.text('date').notNullable();
    t.boolean('suits').notNullable();
    t.primary(['parcel_id', 'date']);
  });
  await knex.schema.createTable('booking_verdicts', (t) => {
    t.increments('id');
    t.integer('parcel_id').notNullable().references('parcels.id').onDelete('CASCADE').index();
    t.text('ship_date').notNullable();
    /** The DayVerdict as it stood, and what it was computed from. */
    t.json('verdict').notNullable();
    t.json('inputs');
    t.integer('policy_id').references('policies.id');
    t.text('accepted_tight');
    t.integer('booked_by').references('people.id');
    t.text('created_at').notNullable();
  });
}

export async function down(knex: Knex): Promise<void> {
  for (const table of ['booking_verdicts', 'parcel_mornings', 'parcel_contents', 'parcels'])
    await knex.schema.dropTable(table);
}
