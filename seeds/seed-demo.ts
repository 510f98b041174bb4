import { createClock } from '../api/src/clock';
import { createDeps, type Deps } from '../api/src/deps';
import { demoPassword } from '../api/src/session/password-rules';
import { hashPassword } from '../api/src/session/password-hash';
import { seedComing } from './seed-coming';
import { seedPast } from './seed-past';
import { seedPeople } from './seed-people';
import { seedHolidays, seedPlaces } from './seed-places';
import type { SeedWorld } from './seed-world';

/**
 * Fills an empty database with the Hill Country circle, placed round today. Everything ahead goes through the same services
 * as a person's clicks, so its verdicts, shares, mails and history are real; needs the forecast service to answer.
 */
export async function seedDemo(deps: Deps): Promise<void> {
  const { db, clock } = deps;
  const now = clock.nowIso();
  const places = await seedPlaces(db);
  await seedHolidays(db, now);
  const people = await seedPeople(db, places, await hashPassword(demoPassword), now);
  const { policy } = await deps.services.policy.current();
  const world: SeedWorld = {
    deps,
    at: (epochMs) =>
      createDeps({
        config: deps.config,
        db,
        log: deps.log,
        clock: createClock(new Date(epochMs).toISOString()),
      }),
    places,
    people,
    zone: policy.circleZone,
    today: clock.today(policy.circleZone),
  };
  await seedPast(world);
  await seedComing(world);
}
