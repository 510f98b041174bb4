import type * as z from 'zod';
import type {
  Blackout,
  blackoutNew,
  blackoutPatch,
  BlackoutList,
  BlackoutPreview,
  previewRequest,
} from '@shared/contract';
import { addDays } from '@shared/calendar/add-days';
import { blackoutDates } from '@shared/calendar/blackout-dates';
import { daysBetween } from '@shared/calendar/days-between';
import { badInput, notFound } from '@shared/errors';
import type { Deps } from '../deps';
import type { Actor } from '../http/actor';
import { checkVersion } from '../http/router';
import { checkedBlackout } from './blackout-rules';
import {
  deleteBlackout,
  findBlackout,
  findBlackouts,
  insertBlackout,
  updateBlackout,
  type BlackoutFields,
} from './blackouts-queries';
import { movedBy, previewOf } from './moved-by';

export interface BlackoutsService {
  all(): Promise<Blackout[]>;
  /** The blackouts and each covered day of the window (both ends count); a year from today's month on by default. Throws 400 for a window over three years. */
  list(from?: string, to?: string): Promise<BlackoutList>;
  /** Throws 400; parcels on a newly closed day go on hold and their people are told, in the same transaction. */
  create(actor: Actor, body: z.output<typeof blackoutNew>): Promise<Blackout>;
  /** Throws 400, 404, 412. */
  edit(
    actor: Actor,
    id: number,
    patch: z.output<typeof blackoutPatch>,
    ifMatch: number | null,
  ): Promise<Blackout>;
  /** Opens its days again; parcels on hold stay so until somebody books them. Throws 404, 412. */
  remove(actor: Actor, id: number, ifMatch: number | null): Promise<void>;
  /** What saving would move; nothing is saved. Throws 400, 404. */
  preview(body: z.output<typeof previewRequest>): Promise<BlackoutPreview>;
}

/** Days shown without a window: from the first of last month on. */
const shownDays = 400;
/** Longest window a calendar may ask for, in days: each of its days is looked at for each blackout. */
const longestWindow = 1100;
/** A preview names the days of the coming year, no more. */
const previewDays = 366;

/** The days on which the carrier, a state or a counter does not work beside its weekdays. */
export function createBlackoutsService(deps: Deps): BlackoutsService {
  const get = async ({ db }: Deps, id: number): Promise<Blackout> => {
    const found = await findBlackout(db, id);
    if (!found) throw notFound('That blackout');
    return found;
  };
  return {
    all: () => findBlackouts(deps.db),
    async list(from, to) {
      const first = from ?? addDays(`${(await todayOf(deps)).slice(0, 8)}01`, -31);
      const last = to ?? addDays(first, shownDays);
      if (last < first || daysBetween(first, last) > longestWindow)
        throw badInput([
          { path: 'to', message: 'Ask for three years at most, with the end after the beginning.' },
        ]);
      const blackouts = await findBlackouts(deps.db);
      const days = blackouts.flatMap((one) =>
        blackoutDates(one, first, last).map((date) => ({ date, blackoutId: one.id })),
      );
      return {
        blackouts,
        days: days.sort((a, b) => a.date.localeCompare(b.date) || a.blackoutId - b.blackoutId),
      };
    },
    async create(actor, body) {
      const fields = await checkedBlackout(deps, body, await todayOf(deps));
      return deps.transaction(async (tx) => {
        const before = await findBlackouts(tx.db);
        const id = await insertBlackout(tx.db, fields, tx.clock.nowIso());
        await note(tx, actor, id, 'created', `Entered “${fields.title}”.`, undefined, fields);
        await holdWhatMoved(tx, actor, before);
        return get(tx, id);
      });
    },
    async edit(actor, id, patch, ifMatch) {
      const seen = await get(deps, id);
      checkVersion(ifMatch, seen.version, seen);
      const fields = await checkedBlackout(
        deps,
        { ...fieldsOf(seen), ...defined(patch) },
        await todayOf(deps),
        seen.rules,
      );
      return deps.transaction(async (tx) => {
        const now = await get(tx, id);
        checkVersion(seen.version, now.version, now);
        const before = await findBlackouts(tx.db);
        await updateBlackout(tx.db, id, fields);
        await note(tx, actor, id, 'changed', `Changed “${fields.title}”.`, fieldsOf(now), fields);
        await holdWhatMoved(tx, actor, before);
        return get(tx, id);
      });
    },
    remove: (actor, id, ifMatch) =>
      deps.transaction(async (tx) => {
        const now = await get(tx, id);
        checkVersion(ifMatch, now.version, now);
        await deleteBlackout(tx.db, id);
        await note(tx, actor, id, 'removed', `Removed “${now.title}”.`, fieldsOf(now));
      }),
    async preview({ blackout, replaces }) {
      const before = await findBlackouts(deps.db);
      const replaced = before.find(({ id }) => id === replaces);
      if (replaces !== undefined && !replaced) throw notFound('That blackout');
      const today = await todayOf(deps);
      const fields = blackout ? await checkedBlackout(deps, blackout, today, replaced?.rules) : null;
      const after = [...before.filter(({ id }) => id !== replaces), ...(fields ? [fields] : [])];
      const days = fields ? blackoutDates(fields, today, addDays(today, previewDays)) : [];
      return previewOf(deps, await movedBy(deps, before, after), days);
    },
  };
}

async function todayOf({ services, clock }: Deps): Promise<string> {
  return clock.today((await services.policy.current()).policy.circleZone);
}

/** Parcels that lost their day with what was just saved. */
async function holdWhatMoved(tx: Deps, actor: Actor, before: readonly Blackout[]): Promise<void> {
  for (const { parcel, text } of await movedBy(tx, before, await findBlackouts(tx.db)))
    await tx.services.parcels.putOnHold(parcel.id, text, actor);
}

const note = (
  tx: Deps,
  actor: Actor,
  id: number,
  action: string,
  text: string,
  before?: unknown,
  after?: unknown,
) =>
  tx.services.history.add({
    actorId: actor.id,
    actorName: actor.name,
    subjectKind: 'blackout',
    subjectId: id,
    action,
    text,
    before,
    after,
  });

function fieldsOf({
  id: _id,
  source: _source,
  createdAt: _at,
  version: _version,
  ...fields
}: Blackout): BlackoutFields {
  return fields;
}

/** A member that was sent as undefined was not sent. */
const defined = (patch: z.output<typeof blackoutPatch>): Partial<BlackoutFields> =>
  Object.fromEntries(Object.entries(patch).filter(([, value]) => value !== undefined));
