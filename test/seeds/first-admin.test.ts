import type { Knex } from 'knex';
import { pino } from 'pino';
import request from 'supertest';
import { createApp } from '@api/app';
import { createClock } from '@api/clock';
import { readConfig } from '@api/config';
import { migrate, openDatabase } from '@api/database/connection';
import { createDeps, type Deps } from '@api/deps';
import { seedFirstAdmin } from '../../seeds/seed-first-admin';

describe('the first admin of a real circle', () => {
  let db: Knex;
  let deps: Deps;
  const admin = { email: 'You@Example.org', name: 'Ida Keeper' };

  beforeEach(async () => {
    const config = readConfig({
      NODE_ENV: 'test',
      PUBLIC_URL: 'http://circle.example.org',
      SESSION_SECRET: 'a secret for tests only, forty characters',
      SMTP_URL: 'smtp://127.0.0.1:9',
      MAIL_FROM: 'circle@example.org',
      FORECAST_URL: 'http://127.0.0.1:9',
      FORECAST_USER_AGENT: '(dayberth tests, admin@example.org)',
      LOG_LEVEL: 'silent',
    });
    db = openDatabase(':memory:');
    await migrate(db);
    const clock = createClock('2026-12-01T12:00:00.000Z');
    deps = createDeps({ config, db, clock, log: pino({ level: 'silent' }) });
  });
  afterEach(() => db.destroy());

  it('gets a link that opens the account once, and no mail', async () => {
    const url = await seedFirstAdmin(deps, admin, null);
    expect(url).toMatch(/^http:\/\/circle\.example\.org\/account-link\/[\w-]{43}$/);
    expect(await db('outbox').select('id')).toEqual([]);
    const token = url.slice(url.lastIndexOf('/') + 1);
    const agent = request.agent(createApp(deps));
    const { headers } = await agent.get('/api/session');
    const cookie = (headers['set-cookie'] as unknown as string[]).find((text) =>
      text.startsWith('XSRF-TOKEN='),
    );
    const form = decodeURIComponent(cookie?.slice('XSRF-TOKEN='.length).split(';')[0] ?? '');
    const use = () =>
      agent
        .post(`/api/account-links/${token}`)
        .set('X-XSRF-TOKEN', form)
        .send({ password: 'slow tortoise lane' });
    expect((await use()).status).toBeLessThan(300);
    expect((await use()).status).toBe(410);
  });

  it('brings the federal holidays, and the carrier with its sort hub by ZIP when it is named', async () => {
    await seedFirstAdmin(deps, admin, { name: 'Slate Overnight', hubZip: '46241' });
    expect((await deps.services.blackouts.all()).map(({ source }) => source)).toEqual(
      Array.from({ length: 11 }, () => 'federal-holiday'),
    );
    const [carrier] = await deps.services.places.carriers();
    const [hub] = await deps.services.places.hubs();
    expect(carrier?.name).toBe('Slate Overnight');
    // ZIP 46241 is in Indianapolis (USPS); Indiana keeps its own zone name.
    expect(hub).toMatchObject({ city: 'Indianapolis', state: 'IN', zone: 'America/Indiana/Indianapolis' });
  });

  it('refuses a second one, an address that is none, and a ZIP that is not known, and then leaves nothing behind', async () => {
    await expect(seedFirstAdmin(deps, { ...admin, email: 'nobody' }, null)).rejects.toThrow('e-mail address');
    await expect(seedFirstAdmin(deps, admin, { name: 'Slate', hubZip: '00000' })).rejects.toThrow('00000');
    expect(await db('people').select('id')).toEqual([]);
    await seedFirstAdmin(deps, admin, null);
    await expect(seedFirstAdmin(deps, { ...admin, email: 'two@example.org' }, null)).rejects.toThrow(
      'admin already',
    );
    expect(await db('people').select('id')).toHaveLength(1);
  });
});
