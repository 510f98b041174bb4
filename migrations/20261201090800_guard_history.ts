import type { Knex } from 'knex';

/** History is append-only: the database itself refuses to change or remove an entry. */
export async function up(knex: Knex): Promise<void> {
  for (const verb of ['UPDATE', 'DELETE'])
    await knex.raw(
      `CREATE TRIGGER history_no_${verb.toLowerCase()} BEFORE ${verb} ON history BEGIN SELECT RAISE(ABORT, 'History is append-only.'); END`,
    );
}

export async function down(knex: Knex): Promise<void> {
  for (const verb of ['update', 'delete']) await knex.raw(`DROP TRIGGER history_no_${verb}`);
}
