import type * as z from 'zod';
import type {
  Arrival,
  ArrivalList,
  Counter,
  DayVerdict,
  morningsBody,
  Parcel,
  ParcelState,
  reportBody,
} from '@shared/contract';
import { addDays } from '@shared/calendar/add-days';
import { AppError, badInput, notFound, type FieldProblem } from '@shared/errors';
import { contentsText } from '@shared/parcels/contents-text';
import { longDate } from '@shared/parcels/long-date';
import type { Deps } from '../deps';
import { arrivalStatus, collectTimes, thingsToBring } from './arrival-plan';
import { arrivalSteps } from './arrival-steps';
import { findArrivalRow, saveMornings, saveReport, touchParcel, type ArrivalRow } from './arrivals-queries';

export interface ArrivalsService {
  /** What the buyer sees, by the secret of the link. Throws 404. */
  byToken(token: string): Promise<Arrival>;
  /** The parcel behind a link. Throws 404. */
  parcelIdOf(token: string): Promise<number>;
  ofBuyer(personId: number): Promise<ArrivalList>;
  /** Keeps the buyer's word on the mornings named; what is left out stays as it was. Throws 400, 404, 409. */
  sayMornings(token: string, body: z.output<typeof morningsBody>): Promise<Arrival>;
  /** Keeps the buyer's report, once ("not arrived" may be followed by another). Throws 404, 409. */
  report(token: string, body: z.output<typeof reportBody>): Promise<Arrival>;
}

/** States in which the day may still be chosen or changed: the buyer's mornings count. */
const dayMayChange: readonly ParcelState[] = ['draft', 'seeking', 'booked', 'packed', 'on-hold'];
const onItsWay: readonly ParcelState[] = ['handed-over', 'arrived', 'closed'];
/** Mornings further off than this are nobody's plan yet. Assumption. */
const morningsAheadDays = 60;

/** The buyer's side of a parcel. */
export function createArrivalsService(deps: Deps): ArrivalsService {
  return {
    byToken: (token) => showArrival(deps, token),
    parcelIdOf: async (token) => (await found(deps, token)).parcel.id,
    async ofBuyer(personId) {
      const parcels = await deps.services.parcels.ofBuyer(personId);
      return parcels.map((parcel) => ({
        token: tokenOf(parcel),
        code: parcel.code,
        what: contentsText(parcel.contents),
        arrivalDate: parcel.arrivalDate,
        place: `${parcel.destination.name}, ${parcel.destination.city}, ${parcel.destination.state}`,
        status: arrivalStatus(parcel),
      }));
    },
    async sayMornings(token, body) {
      await deps.transaction((tx) => keepMornings(tx, token, body.mornings));
      return showArrival(deps, token);
    },
    async report(token, body) {
      await deps.transaction((tx) => keepReport(tx, token, body));
      return showArrival(deps, token);
    },
  };
}

async function showArrival(deps: Deps, token: string): Promise<Arrival> {
  const { parcel, row } = await found(deps, token);
  const { counterId } = parcel.destination;
  const counter = counterId === null ? null : await deps.services.places.counter(counterId);
  const collect = collectTimes(parcel, counter);
  return {
    token,
    code: parcel.code,
    what: contentsText(parcel.contents),
    breederName: parcel.breeder.businessName ?? parcel.breeder.name,
    breederPhone: row.breeder_phone,
    buyerName: parcel.buyer.name,
    service: parcel.service,
    status: arrivalStatus(parcel),
    arrivalDate: parcel.arrivalDate,
    collectFrom: collect.from,
    collectBy: collect.by,
    place: placeOf(parcel, counter, collect.hours),
    bring: thingsToBring(parcel),
    steps: arrivalSteps(parcel, collect, {
      bookedAt: row.booked_at,
      confirmedAt: row.confirmed_at,
      handedOverAt: row.handed_over_at,
      reportAt: row.report_at,
      nowIso: deps.clock.nowIso(),
    }),
    mornings: await morningsOf(deps, parcel),
    trackingNumber: parcel.trackingNumber,
    report: reportOf(row),
    calendarUrl: `/api/arrivals/${token}/calendar.ics`,
  };
}

/** The parcel and what else the page needs; an unknown link and a guessed one get the same 404. */
async function found(deps: Deps, token: string): Promise<{ parcel: Parcel; row: ArrivalRow }> {
  const row = await findArrivalRow(deps.db, token);
  if (!row) throw notFound('That arrival');
  return { parcel: await deps.services.parcels.get(row.parcel_id), row };
}

const tokenOf = (parcel: Parcel): string => parcel.arrivalUrl.slice(parcel.arrivalUrl.lastIndexOf('/') + 1);

function placeOf(parcel: Parcel, counter: Counter | null, hours: string | null): Arrival['place'] {
  const { street, city, state, postalCode, zone } = parcel.destination;
  return { name: counter?.name ?? 'Your door', street, city, state, postalCode, zone, hours };
}

function reportOf(row: ArrivalRow): Arrival['report'] {
  if (row.report_outcome === null || row.report_at === null) return null;
  return { outcome: row.report_outcome, text: row.report_text ?? '', at: row.report_at };
}

/** The mornings that could come into question in the next two weeks, and those the buyer has spoken of. */
async function morningsOf(deps: Deps, parcel: Parcel): Promise<Arrival['mornings']> {
  const said = new Map(parcel.mornings.map(({ date, suits }) => [date, suits]));
  const days = dayMayChange.includes(parcel.state)
    ? (await deps.services.days.forParcel(parcel.id)).days
    : [];
  const offered = new Set(days.filter(isCandidate).map((day) => addDays(day.date, 1)));
  return [...new Set([...offered, ...said.keys()])]
    .sort()
    .map((date) => ({ date, suits: said.get(date) ?? null, offered: offered.has(date) }));
}

/** A day that is shut by nothing but the buyer's own word stays on offer: they may take the word back. */
const isCandidate = (day: DayVerdict): boolean =>
  day.verdict !== 'shut' ||
  day.reasons.every((reason) => reason.verdict !== 'shut' || reason.code.startsWith('buyer'));

async function keepMornings(
  tx: Deps,
  token: string,
  mornings: z.output<typeof morningsBody>['mornings'],
): Promise<void> {
  const { parcel } = await found(tx, token);
  if (!dayMayChange.includes(parcel.state))
    throw new AppError(
      'conflict',
      'Its day cannot change any more. Call the breeder if the morning does not suit you.',
    );
  checkMornings(mornings, tx.clock.today(parcel.destination.zone));
  const said = new Map(parcel.mornings.map(({ date, suits }) => [date, suits]));
  const news = mornings.filter(({ date, suits }) => said.get(date) !== suits);
  if (news.length === 0) return;
  await saveMornings(tx.db, parcel.id, news);
  await touchParcel(tx.db, parcel.id, tx.clock.nowIso());
  await tx.services.history.add({
    actorId: parcel.buyer.id,
    actorName: parcel.buyer.name,
    subjectKind: 'parcel',
    subjectId: parcel.id,
    action: 'mornings',
    text: news
      .map(({ date, suits }) => `${longDate(date)} ${suits ? 'suits' : 'does not suit'} the buyer.`)
      .join(' '),
    before: parcel.mornings,
    after: news,
  });
  await tx.services.notices.tell({ kind: 'mornings-said', parcelId: parcel.id });
}

function checkMornings(mornings: readonly { date: string }[], today: string): void {
  const seen = new Set<string>();
  const errors: FieldProblem[] = [];
  mornings.forEach(({ date }, i) => {
    const complain = (message: string) => errors.push({ path: `mornings.${i}.date`, message });
    if (date < today) complain('That morning is over.');
    else if (date > addDays(today, morningsAheadDays)) complain(`At most ${morningsAheadDays} days ahead.`);
    else if (seen.has(date)) complain('This morning is named twice.');
    seen.add(date);
  });
  if (errors.length > 0) throw badInput(errors);
}

const outcomeTexts = {
  'arrived-well': 'Arrived well.',
  'arrived-weak': 'Arrived, but weak.',
  doa: 'Dead on arrival.',
  'not-arrived': 'Has not arrived.',
} as const;

async function keepReport(tx: Deps, token: string, body: z.output<typeof reportBody>): Promise<void> {
  const { parcel, row } = await found(tx, token);
  const arrived = body.outcome !== 'not-arrived';
  if (!onItsWay.includes(parcel.state))
    throw new AppError(
      'move-not-allowed',
      'It has not been handed over to the carrier yet, so there is nothing to report.',
    );
  if (row.report_outcome !== null && (row.report_outcome !== 'not-arrived' || !arrived))
    throw new AppError(
      'conflict',
      'You have reported this arrival already. Call the breeder about anything new.',
    );
  if (!arrived && parcel.state !== 'handed-over')
    throw new AppError('conflict', 'It is noted as arrived. Call the breeder if it is not with you.');
  await saveReport(tx.db, parcel.id, { outcome: body.outcome, text: body.text, at: tx.clock.nowIso() });
  const text = `${outcomeTexts[body.outcome]} ${body.text}`.trim();
  const buyer = {
    id: parcel.buyer.id,
    name: parcel.buyer.name,
    email: parcel.buyer.email,
    roles: [],
    zone: parcel.destination.zone,
  };
  if (arrived && parcel.state === 'handed-over')
    await tx.services.parcels.move(parcel.id, 'arrived', buyer, text);
  else {
    await touchParcel(tx.db, parcel.id, tx.clock.nowIso());
    await tx.services.history.add({
      actorId: buyer.id,
      actorName: buyer.name,
      subjectKind: 'parcel',
      subjectId: parcel.id,
      action: 'reported',
      text,
      after: body,
    });
  }
  await tx.services.notices.tell({ kind: 'arrival-reported', parcelId: parcel.id });
}
