import type * as z from 'zod';
import type { booking, DayVerdict, Parcel, ParcelState } from '@shared/contract';
import { daysBetween } from '@shared/calendar/days-between';
import { AppError, badInput } from '@shared/errors';
import { longDate } from '@shared/parcels/long-date';
import type { Deps } from '../deps';
import type { Actor } from '../http/actor';
import { checkVersion } from '../http/router';
import { moveParcel, rowOf, saveMove, stateWords } from './move-parcel';
import { checkMayBook } from './parcel-access';

type Body = z.output<typeof booking>;
type DayBody = Extract<Body, { date: string }>;
type SpanBody = Extract<Body, { flexible: unknown }>;

const bookable: readonly ParcelState[] = ['draft', 'seeking', 'booked', 'on-hold'];
const offItsDay = 'It was taken off its day; a new one is not chosen yet.';

/** See `ParcelsService.book`. */
export async function bookParcel(
  deps: Deps,
  actor: Actor,
  id: number,
  body: Body,
  ifMatch: number | null,
): Promise<Parcel> {
  const parcel = await workOn(deps, actor, id, ifMatch);
  return 'date' in body ? bookDay(deps, actor, parcel, body) : leaveOpen(deps, actor, parcel, body);
}

/** See `ParcelsService.unbook`; a draft stays as it is. */
export async function unbookParcel(
  deps: Deps,
  actor: Actor,
  id: number,
  ifMatch: number | null,
): Promise<Parcel> {
  const parcel = await workOn(deps, actor, id, ifMatch);
  if (parcel.state === 'draft') return parcel;
  return deps.transaction(async (tx) => {
    const now = await unchanged(tx, parcel);
    await leaveRun(tx, actor, now, null);
    await moveParcel(
      tx,
      id,
      'draft',
      actor,
      now.shipDate ? `Taken off ${longDate(now.shipDate)}.` : 'Put back to a draft.',
    );
    await tellOffItsDay(tx, now);
    return tx.services.parcels.get(id);
  });
}

async function workOn(deps: Deps, actor: Actor, id: number, ifMatch: number | null): Promise<Parcel> {
  const parcel = await deps.services.parcels.forActor(actor, id);
  checkMayBook(actor, parcel);
  checkVersion(ifMatch, parcel.version, parcel);
  if (!bookable.includes(parcel.state)) {
    const help = parcel.state === 'packed' ? ' Unpack it first.' : '';
    throw new AppError(
      'move-not-allowed',
      `${parcel.code} is ${stateWords[parcel.state]}; its day stands.${help}`,
    );
  }
  return parcel;
}

async function bookDay(deps: Deps, actor: Actor, parcel: Parcel, body: DayBody): Promise<Parcel> {
  // May wait for the forecast service, so it comes before the transaction.
  const verdict = await deps.services.days.forDate(parcel.id, body.date);
  refuseShut(parcel.code, verdict);
  const words = verdict.verdict === 'open' ? null : requireWords(verdict, body.acceptTight);
  return deps.transaction(async (tx) => {
    const now = await unchanged(tx, parcel);
    await leaveRun(tx, actor, now, body.date);
    const text = `Booked for ${longDate(body.date)}${words === null ? '' : `, a ${verdict.verdict} day, accepted: "${words}"`}.`;
    const set = { shipDate: body.date, flexible: null, acceptedTight: words, verdict };
    if (now.state !== 'booked') await moveParcel(tx, parcel.id, 'booked', actor, text, set);
    else {
      const columns = { ship_date: body.date, flexible_from: null, flexible_to: null, accepted_tight: words };
      await saveMove(tx, await rowOf(tx, parcel.id), columns, actor, text, verdict);
    }
    // Its run may have waited for just this.
    await tx.services.runs.lookAgain(parcel.id);
    if (now.state !== 'booked' || now.shipDate !== body.date)
      await tx.services.notices.tell({ kind: 'parcel-booked', parcelId: parcel.id });
    return tx.services.parcels.get(parcel.id);
  });
}

async function leaveOpen(deps: Deps, actor: Actor, parcel: Parcel, { flexible }: SpanBody): Promise<Parcel> {
  const today = deps.clock.today(parcel.dropOff.zone);
  checkSpan(parcel, flexible, today);
  const from = flexible.from < today ? today : flexible.from;
  const days = daysBetween(from, flexible.to) + 1;
  const answer = await deps.services.days.forParcel(parcel.id, { from, days });
  if (answer.days.every((day) => day.verdict === 'shut'))
    throw new AppError(
      'day-not-offered',
      `No day from ${longDate(from)} to ${longDate(flexible.to)} is offered for ${parcel.code}.`,
      [],
      {
        days: answer.days,
      },
    );
  return deps.transaction(async (tx) => {
    const now = await unchanged(tx, parcel);
    await leaveRun(tx, actor, now, null);
    const text = `Left open for any safe day from ${longDate(flexible.from)} to ${longDate(flexible.to)}.`;
    if (now.state !== 'seeking') await moveParcel(tx, parcel.id, 'seeking', actor, text, { flexible });
    else {
      const columns = { flexible_from: flexible.from, flexible_to: flexible.to };
      await saveMove(tx, await rowOf(tx, parcel.id), columns, actor, text, null);
    }
    await tellOffItsDay(tx, now);
    return tx.services.parcels.get(parcel.id);
  });
}

function checkSpan(parcel: Parcel, span: SpanBody['flexible'], today: string): void {
  const errors = [];
  if (span.from < parcel.readyFrom)
    errors.push({ path: 'flexible.from', message: `It is ready from ${longDate(parcel.readyFrom)}.` });
  if (span.to > parcel.latestDate)
    errors.push({ path: 'flexible.to', message: `It is to ship by ${longDate(parcel.latestDate)}.` });
  if (span.to < today) errors.push({ path: 'flexible.to', message: 'These days are over.' });
  if (errors.length > 0) throw badInput(errors);
}

/** 409 with the present verdict and its reasons in a sentence. */
export function refuseShut(code: string, verdict: DayVerdict): void {
  if (verdict.verdict !== 'shut') return;
  throw new AppError(
    'day-not-offered',
    `${longDate(verdict.date)} is shut for ${code}. ${reasonsText(verdict)}`.trim(),
    [],
    {
      current: verdict,
    },
  );
}

/** The reasons behind the class a verdict came to, as sentences. */
export const reasonsText = (verdict: DayVerdict): string =>
  verdict.reasons
    .filter((reason) => reason.verdict === verdict.verdict)
    .map((reason) => reason.text)
    .join(' ');

function requireWords(verdict: DayVerdict, words: string | undefined): string {
  if (words !== undefined) return words;
  const what = verdict.verdict === 'far' ? 'too far off for a forecast' : 'tight';
  throw new AppError(
    'bad-input',
    `${longDate(verdict.date)} is ${what}: accept it in your own words to book it. ${reasonsText(verdict)}`.trim(),
    [{ path: 'acceptTight', message: `This day is ${what}. Say in a few words that you accept it.` }],
    { current: verdict },
  );
}

/** The parcel inside the transaction; 412 when it changed while the forecast was asked. */
export async function unchanged(tx: Deps, before: Parcel): Promise<Parcel> {
  const now = await tx.services.parcels.get(before.id);
  checkVersion(before.version, now.version, now);
  return now;
}

/** Out of its run, unless that goes on the very day. */
async function leaveRun(tx: Deps, actor: Actor, parcel: Parcel, date: string | null): Promise<void> {
  if (!parcel.run || parcel.run.date === date) return;
  const why =
    date === null ? `${parcel.code} was taken off its day.` : `${parcel.code} ships on another day now.`;
  await tx.services.runs.takeOut(parcel.id, why, actor);
}

/** The buyer had been told a day: it does not stand any more. */
async function tellOffItsDay(tx: Deps, before: Parcel): Promise<void> {
  const { id: parcelId, shipDate } = before;
  if (shipDate !== null)
    await tx.services.notices.tell({ kind: 'parcel-on-hold', parcelId, reason: offItsDay, shipDate });
}
