import type { Knex } from 'knex';
import type { Logger } from 'pino';
import type { Clock } from './clock';
import type { Config } from './config';
import { createServices, type Services } from './services';

/**
 * What every service is built from. Inside `transaction` the work gets a Deps whose `db` is the transaction and whose
 * `services` are built on it: use those and nothing captured from outside, for the pool has one connection and a query
 * on the outer `db` would wait for itself.
 */
export interface Deps {
  readonly config: Config;
  readonly db: Knex;
  readonly clock: Clock;
  readonly log: Logger;
  readonly services: Services;
  /** Runs `work` in one transaction; inside one already it simply runs (all or nothing with the outer work). */
  transaction<T>(work: (deps: Deps) => Promise<T>): Promise<T>;
  /** Runs `task` once the present transaction is committed, at once outside of one; never after a rollback. */
  afterCommit(task: () => void): void;
}

export interface Base {
  readonly config: Config;
  readonly db: Knex;
  readonly clock: Clock;
  readonly log: Logger;
}

/** Wires the services once, on the base connection. */
export function createDeps(base: Base): Deps {
  return build(base, null);
}

function build(base: Base, pending: (() => void)[] | null): Deps {
  const deps: Deps = {
    ...base,
    services: undefined as unknown as Services,
    transaction: async (work) => {
      if (pending) return work(deps);
      const tasks: (() => void)[] = [];
      const result = await base.db.transaction((trx) => work(build({ ...base, db: trx }, tasks)));
      for (const task of tasks) task();
      return result;
    },
    afterCommit: (task) => {
      if (pending) pending.push(task);
      else task();
    },
  };
  (deps as { services: Services }).services = createServices(deps);
  return deps;
}
