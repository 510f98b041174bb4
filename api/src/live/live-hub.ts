import type { Response } from 'express';
import type { LiveChange } from '@shared/contract';
import { AppError } from '@shared/errors';
import type { Config } from '../config';
import type { Deps } from '../deps';
import { onWake } from '../jobs/wake';
import { changeFacts, mayHear, type ChangeFacts } from './live-audience';
import {
  endStream,
  openStream,
  sendBeat,
  sendChange,
  sendMissed,
  type Connection,
  type Listener,
} from './live-connections';
import { changesAfter, newestHistoryId, openAccounts, openSessions, type LoggedChange } from './live-queries';

/** Another process (`npm run recheck`) writes into the history too: it is looked at this often beside our own commits. */
const lookEveryMs = 700;
const beatEveryMs = 20_000;
/** After so long a stream ends by itself; the browser comes back and is let in anew, or not. */
const longestMs = 6 * 3_600_000;
const mostPerPerson = 12;
const mostPerLook = 500;
/** More than this was missed: the page reads all it shows. */
const mostMissed = 200;

type Accounts = Awaited<ReturnType<typeof openAccounts>>;

/**
 * The open streams of a site. What happened is read from the history, where every change stands once it is committed, so
 * nothing is told that was rolled back and nothing has to be told twice. Works only while somebody listens.
 */
export class LiveHub {
  private readonly connections = new Set<Connection>();
  private accounts: Accounts = new Map();
  private lastId = 0;
  private looking: Promise<void> | null = null;
  private lookAgain = false;
  private stopTimers: (() => void) | null = null;

  constructor(private readonly deps: Deps) {}

  /** How many streams are open. */
  get size(): number {
    return this.connections.size;
  }

  /** Opens a stream; `lastSeen` is the history entry that the page heard of last. Throws 429 for too many of one person. */
  async open(res: Response, listener: Listener, lastSeen: number | null): Promise<void> {
    if (listener.kind === 'person' && this.ofPerson(listener.personId) >= mostPerPerson)
      throw new AppError('too-many', 'You have this site open in too many tabs. Close some of them.');
    const connection: Connection = { listener, res };
    const newest = await newestHistoryId(this.deps.db);
    const missed =
      lastSeen === null ? [] : await changesAfter(this.deps.db, Math.min(lastSeen, newest), mostMissed + 1);
    if (this.connections.size === 0) {
      this.lastId = newest;
      this.start();
    }
    this.connections.add(connection);
    if (listener.kind === 'person') await this.readAccounts();
    if (res.destroyed) return void this.forget(connection);
    const end = setTimeout(() => endStream(connection, false), longestMs);
    res.on('close', () => {
      clearTimeout(end);
      this.forget(connection);
    });
    openStream(res);
    if (missed.length > mostMissed) sendMissed(connection, newest);
    else await this.tell([connection], missed);
  }

  /** Tells of something that leaves no entry in the history. */
  async say(change: LiveChange): Promise<void> {
    if (this.connections.size === 0) return;
    const facts = await changeFacts(this.deps.db, [change]);
    for (const connection of this.connections)
      if (this.hears(connection, change, facts)) sendChange(connection, null, change);
  }

  /** Signed out: the streams of that session end. */
  closeSession(sessionId: string): void {
    this.endWhere(({ listener }) => listener.kind === 'person' && listener.sessionId === sessionId);
  }

  /** Ends all streams; browsers come back once the site is up again. */
  close(): void {
    for (const connection of [...this.connections]) endStream(connection, false);
    this.connections.clear();
    this.stop();
  }

  private start(): void {
    const look = () => void this.look();
    const looks = setInterval(look, lookEveryMs);
    const beats = setInterval(() => void this.beat(), beatEveryMs);
    const off = onWake(this.deps.config, 'live', look);
    this.stopTimers = () => {
      clearInterval(looks);
      clearInterval(beats);
      off();
    };
  }

  private stop(): void {
    this.stopTimers?.();
    this.stopTimers = null;
  }

  private forget(connection: Connection): void {
    this.connections.delete(connection);
    if (this.connections.size === 0) this.stop();
  }

  private ofPerson(personId: number): number {
    return [...this.connections].filter(
      ({ listener }) => listener.kind === 'person' && listener.personId === personId,
    ).length;
  }

  /** One look at a time; a wish to look that comes meanwhile is looked after at its end. */
  private look(): Promise<void> {
    this.lookAgain = true;
    this.looking ??= (async () => {
      while (this.lookAgain) {
        this.lookAgain = false;
        await this.lookOnce().catch((err: unknown) => this.deps.log.error({ err }, 'live pages: no look'));
      }
    })().finally(() => {
      this.looking = null;
    });
    return this.looking;
  }

  private async lookOnce(): Promise<void> {
    if (this.connections.size === 0) return;
    const newest = await newestHistoryId(this.deps.db);
    if (newest <= this.lastId) return;
    const changes = await changesAfter(this.deps.db, this.lastId, mostPerLook);
    // Kinds that no page shows are skipped by the query, so the newest entry may lie behind the last of the changes.
    this.lastId = changes.length < mostPerLook ? newest : (changes.at(-1)?.historyId ?? newest);
    if (changes.length === mostPerLook) this.lookAgain = true;
    if (changes.some(({ kind }) => kind === 'person')) await this.readAccounts();
    await this.tell([...this.connections], changes);
  }

  private async tell(to: readonly Connection[], changes: readonly LoggedChange[]): Promise<void> {
    if (changes.length === 0) return;
    // Several entries about one thing are one event, under the name of the last.
    const last = new Map(changes.map((change) => [`${change.kind} ${change.id}`, change]));
    const facts = await changeFacts(this.deps.db, [...last.values()]);
    for (const { historyId, kind, id } of last.values())
      for (const connection of to)
        if (this.hears(connection, { kind, id }, facts)) sendChange(connection, historyId, { kind, id });
  }

  private hears({ listener }: Connection, change: LiveChange, facts: ChangeFacts): boolean {
    if (listener.kind === 'arrival') return change.kind === 'parcel' && change.id === listener.parcelId;
    const account = this.accounts.get(listener.personId);
    return account !== undefined && mayHear({ id: listener.personId, roles: account.roles }, change, facts);
  }

  private async readAccounts(): Promise<void> {
    const ids = [...this.connections].flatMap(({ listener }) =>
      listener.kind === 'person' ? [listener.personId] : [],
    );
    this.accounts = await openAccounts(this.deps.db, [...new Set(ids)]);
    this.endWhere(({ listener }) => {
      if (listener.kind !== 'person') return false;
      return this.accounts.get(listener.personId)?.sessionEpoch !== listener.sessionEpoch;
    });
  }

  /** Keeps the streams alive, and ends those whose session is gone. */
  private async beat(): Promise<void> {
    for (const connection of this.connections) sendBeat(connection);
    try {
      const ids = [...this.connections].flatMap(({ listener }) =>
        listener.kind === 'person' ? [listener.sessionId] : [],
      );
      const open = await openSessions(this.deps.db, ids);
      this.endWhere(({ listener }) => listener.kind === 'person' && !open.has(listener.sessionId));
      await this.readAccounts();
    } catch (err) {
      this.deps.log.error({ err }, 'live pages: no look at the sessions');
    }
  }

  private endWhere(ends: (connection: Connection) => boolean): void {
    for (const connection of [...this.connections]) if (ends(connection)) endStream(connection, true);
  }
}

const hubs = new WeakMap<Config, LiveHub>();

/** The one hub of a site, on its base connection. */
export function liveHub(deps: Deps): LiveHub {
  const known = hubs.get(deps.config);
  if (known) return known;
  const made = new LiveHub(deps);
  hubs.set(deps.config, made);
  return made;
}

/** Ends the streams of a site that stops, if it ever had any. */
export const closeLive = (config: Config): void => hubs.get(config)?.close();

/** Ends the streams of a session that was signed out. */
export const closeLiveSession = (config: Config, sessionId: string): void =>
  hubs.get(config)?.closeSession(sessionId);
