import type { Parcel, ParcelNew, Proposal, Run } from '@shared/contract';
import { createForecastFake, type ForecastFake } from '@api/fakes/forecast/forecast-fake';
import { createTestSite, type Caller, type TestSite } from './test-site';

// Each of these tests enters parcels, fetches weather and pools: seconds on a busy machine.
jest.setTimeout(30_000);

/** The days of the tests, seen from Tuesday 1 December 2026, 06:00 in Texas. */
export const today = '2026-12-01';
export const wednesday = '2026-12-02';
/** Its parcels arrive on a Friday, with no working day after: never better than tight. */
export const thursday = '2026-12-03';
/** Its parcels would arrive on a Saturday: shut. */
export const friday = '2026-12-04';
export const saturday = '2026-12-05';
export const monday = '2026-12-07';

export const breeder = 'breeder@example.org';
export const otherBreeder = 'other@example.org';
export const coordinator = 'coordinator@example.org';
export const admin = 'admin@example.org';
export const buyer = 'buyer@example.org';

export interface RunSite extends TestSite {
  readonly fake: ForecastFake;
  /** Somebody signed in; the same caller each time. */
  who(email: string): Promise<Caller>;
  /** Enters a draft through the API. */
  draft(email: string, change?: Partial<ParcelNew>): Promise<Parcel>;
  /** Enters a parcel and books it on a day, in words when the day is tight. */
  booked(email: string, date: string, change?: Partial<ParcelNew>): Promise<Parcel>;
  /** Enters a parcel and leaves it open for a span. */
  seeking(email: string, from: string, to: string, change?: Partial<ParcelNew>): Promise<Parcel>;
  parcel(id: number): Promise<Parcel>;
  propose(): Promise<Proposal>;
  /** A run by hand with parcels on it. */
  byHand(date: string, parcels: readonly Parcel[]): Promise<Run>;
  run(id: number): Promise<Run>;
  confirm(run: Run): Promise<Run>;
  /** Outbox rows, oldest first, as `to: subject`, with whether an invitation hangs on them. */
  mails(): Promise<{ to: string; subject: string; invites: boolean; method: string | null }[]>;
}

/** The small circle in steady, mild weather: working days are open, but for the days before a weekend. */
export async function createRunSite(now = '2026-12-01T12:00:00.000Z'): Promise<RunSite> {
  const clock = { now };
  // A day further than usual, so that a late parcel of next Monday's is covered.
  const fake = createForecastFake({ seed: 1, now: () => Date.parse(clock.now), furtherHours: 24 });
  fake.script({ steady: { lowF: 47, highF: 60 } });
  const port = await fake.listen(0);
  const site = await createTestSite({ now, env: { FORECAST_URL: `http://127.0.0.1:${port}` } });
  const callers = new Map<string, Promise<Caller>>();
  const who = (email: string) => {
    const caller = callers.get(email) ?? site.as(email);
    callers.set(email, caller);
    return caller;
  };
  const draft: RunSite['draft'] = async (email, change = {}) => {
    const answer = await (
      await who(email)
    )
      .post('/api/parcels')
      .send({ ...parcelBody(site), ...change })
      .expect(201);
    return answer.body as Parcel;
  };
  const book = async (email: string, id: number, body: object) =>
    (await (await who(email)).put(`/api/parcels/${id}/booking`).send(body).expect(200)).body as Parcel;
  const run = async (id: number) =>
    (await (await who(coordinator)).get(`/api/runs/${id}`).expect(200)).body as Run;
  return {
    ...site,
    fake,
    who,
    draft,
    run,
    setNow: (iso) => {
      clock.now = iso;
      site.setNow(iso);
    },
    booked: async (email, date, change) =>
      book(email, (await draft(email, change)).id, {
        date,
        ...(date === thursday ? { acceptTight: 'Seen; the buyer collects at nine.' } : {}),
      }),
    seeking: async (email, from, to, change) =>
      book(email, (await draft(email, change)).id, { flexible: { from, to } }),
    parcel: async (id) =>
      (await (await who(coordinator)).get(`/api/parcels/${id}`).expect(200)).body as Parcel,
    propose: async () =>
      (await (await who(coordinator)).post('/api/runs/proposals').send({}).expect(200)).body as Proposal,
    byHand: async (date, parcels) =>
      (
        await (
          await who(coordinator)
        )
          .post('/api/runs')
          .send({ coordinatorId: site.ids.coordinator, date, parcelIds: parcels.map(({ id }) => id) })
          .expect(201)
      ).body as Run,
    confirm: async ({ id, version }) =>
      (
        await (
          await who(coordinator)
        )
          .post(`/api/runs/${id}/confirmation`)
          .set('If-Match', `"${version}"`)
          .expect(200)
      ).body as Run,
    async mails() {
      const rows = (await site.db('outbox').orderBy('id')) as {
        to_email: string;
        subject: string;
        ical: string | null;
        ical_method: string | null;
      }[];
      return rows.map((row) => ({
        to: row.to_email,
        subject: row.subject,
        invites: row.ical !== null,
        method: row.ical_method,
      }));
    },
    close: async () => {
      await site.close();
      await fake.close();
    },
  };
}

const parcelBody = ({ ids }: TestSite): ParcelNew => ({
  buyer: { name: 'Bo Buyer', email: buyer },
  contents: [{ speciesId: ids.cornSnake, quantity: 1, massG: 160 }],
  boxId: ids.smallBox,
  service: 'hold',
  holdCounterId: ids.phoenixCounter,
  readyFrom: today,
  latestDate: '2026-12-14',
});

/** What a run's shares add up to. */
export const sharesOf = (run: Run): number => run.parcels.reduce((sum, parcel) => sum + parcel.shareCents, 0);

/** A room of the large box, litres: 16 × 12 × 12 in. */
export const largeBoxL = (16 * 12 * 12 * 16.387064) / 1000;
