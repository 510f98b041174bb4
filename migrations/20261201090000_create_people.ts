import type { Knex } from 'knex';

/** People, their roles, and the profiles that come with a role. */
export async function up(knex: Knex): Promise<void> {
  await knex.schema.createTable('people', (t) => {
    t.increments('id');
    t.text('email').notNullable().unique();
    t.text('name').notNullable();
    t.text('business_name');
    t.text('phone');
    t.text('street');
    t.text('city');
    t.text('state');
    t.text('postal_code');
    t.float('lat');
    t.float('lon');
    t.text('zone').notNullable();
    t.text('temperature_unit').notNullable().defaultTo('F');
    t.text('password_hash');
    /** Rises when every session of the person must end (password change, deactivation). */
    t.integer('session_epoch').notNullable().defaultTo(1);
    t.boolean('active').notNullable().defaultTo(true);
    t.integer('version').notNullable().defaultTo(1);
    t.text('created_at').notNullable();
    t.text('updated_at').notNullable();
  });
  await knex.schema.createTable('person_roles', (t) => {
    t.integer('person_id').notNullable().references('people.id').onDelete('CASCADE');
    t.text('role').notNullable().checkIn(['breeder', 'coordinator', 'buyer', 'admin']);
    t.primary(['person_id', 'role']);
  });
  await knex.schema.createTable('days_away', (t) => {
    t.increments('id');
    t.integer('person_id').notNullable().references('people.id').onDelete('CASCADE').index();
    t.text('from_date').notNullable();
    t.text('to_date').notNullable();
    t.text('note').notNullable().defaultTo('');
  });
  await knex.schema.createTable('driving_days', (t) => {
    t.integer('person_id').notNullable().references('people.id').onDelete('CASCADE');
    t.text('date').notNullable();
    t.boolean('free').notNullable();
    t.primary(['person_id', 'date']);
  });
}

export async function down(knex: Knex): Promise<void> {
  for (const table of ['driving_days', 'days_away', 'person_roles', 'people'])
    await knex.schema.dropTable(table);
}
