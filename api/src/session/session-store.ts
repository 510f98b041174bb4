import { ConnectSessionKnexStore } from 'connect-session-knex';
import type { SessionData } from 'express-session';
import type { Deps } from '../deps';

type Failed = (error?: unknown) => void;

/**
 * The sessions table as express-session's store. The library's methods tell a failing database to their callback and
 * then reject as well; nobody waits for that promise, so it would end the process. Here only the callback hears of it.
 */
export class SessionStore extends ConnectSessionKnexStore {
  constructor({ db }: Deps) {
    super({ knex: db, tableName: 'sessions', createTable: false, cleanupInterval: 0 });
    this.ready.catch(() => undefined);
  }

  override get(sid: string, callback: (error: unknown, session?: SessionData | null) => void) {
    return super.get(sid, callback).catch(() => null);
  }

  override set(sid: string, session: SessionData, callback?: Failed) {
    return super.set(sid, session, callback).catch(() => undefined);
  }

  override destroy(sid: string, callback?: Failed) {
    return super.destroy(sid, callback).catch(() => 0);
  }

  /** The library's `touch` never calls back after a failure, and the answer would wait for it for ever. */
  override touch(sid: string, session: SessionData, callback?: Failed) {
    return super.touch(sid, session, () => callback?.()).catch((error: unknown) => callback?.(error));
  }
}
