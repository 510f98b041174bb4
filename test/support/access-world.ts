import { makeLink } from '@api/session/account-links';
import { addParcel, addRun } from './run-rows';
import type { TestSite } from './test-site';

/** Paths of the things that access tests ask for, all of them Bea's where they are a breeder's. */
export interface AccessWorld {
  readonly bookedParcel: string;
  readonly draftParcel: string;
  readonly confirmedRun: string;
  readonly blackout: string;
  readonly failedMail: string;
  readonly accountLink: string;
  readonly arrival: string;
  readonly calendar: string;
  readonly policyVersion: string;
}

/** One of everything: two parcels of Bea's for Bo, a confirmed run with the first, a blackout, a failed mail, links. */
export async function createAccessWorld(site: TestSite): Promise<AccessWorld> {
  const { db, deps, ids } = site;
  const own = { breederId: ids.breeder, buyerId: ids.buyer, holdCounterId: ids.phoenixCounter };
  const booked = await addParcel(site, { ...own, code: 'TD-1', shipDate: '2026-12-08' });
  const draft = await addParcel(site, { ...own, code: 'TD-2', shipDate: null, state: 'draft' });
  const run = await addRun(site, {
    date: '2026-12-08',
    departAt: '2026-12-08T14:30:00.000Z',
    arriveAt: '2026-12-08T18:00:00.000Z',
    cutOffAt: '2026-12-08T23:00:00.000Z',
    stops: [
      {
        breederId: ids.breeder,
        arriveAt: '2026-12-08T16:30:00.000Z',
        leaveAt: '2026-12-08T16:40:00.000Z',
        parcelIds: [booked],
      },
    ],
  });
  const now = deps.clock.nowIso();
  const [blackout] = await db('blackouts').insert({
    title: 'Stock-taking',
    kind: 'date',
    start_date: '2026-12-24',
    scope: 'everywhere',
    created_at: now,
  });
  const [mail] = await db('outbox').insert({
    idempotency_key: 'failed',
    to_email: 'bo@example.org',
    to_name: 'Bo',
    subject: 's',
    text: 't',
    html: 'h',
    state: 'failed',
    next_attempt_at: now,
    message_id: '<m@example.org>',
    created_at: now,
  });
  await db('proposals').insert({ created_at: now, result: JSON.stringify(emptyProposal(now)) });
  const [policy] = await db('policies').insert({ values: '{}', created_at: now });
  const link = await makeLink(deps, ids.otherBuyer, 'reset');
  const feed = await deps.services.calendars.feedOf(ids.breeder);
  return {
    bookedParcel: `/parcels/${booked}`,
    draftParcel: `/parcels/${draft}`,
    confirmedRun: `/runs/${run}`,
    blackout: `/blackouts/${blackout}`,
    failedMail: `/desk/mail/${mail}`,
    accountLink: `/account-links/${link.url.split('/').at(-1)}`,
    policyVersion: `/policy/versions/${policy}`,
    arrival: '/arrivals/arrival-token-of-TD-1',
    calendar: new URL(feed.url).pathname.replace(/^\/api/, ''),
  };
}

const emptyProposal = (at: string) => ({
  at,
  runs: [],
  unplaced: [],
  costCents: 0,
  objectiveCents: 0,
  boundCents: 0,
  gap: 0,
  boundKind: 'proven',
  aloneCents: 0,
  aloneMinutes: 0,
  driveMinutes: 0,
  seconds: 0,
});
