import { email as emailSchema, line } from '../shared/src/contract';
import type { Deps } from '../api/src/deps';
import { makeLink } from '../api/src/session/account-links';
import { seedHolidays } from './seed-places';

/**
 * Starts a real circle: the federal holidays, its first admin, and (when named) the carrier with its sort hub. Answers the link
 * that sets the admin's password. Throws for a bad address, an unknown ZIP, or when there is an admin already.
 */
export async function seedFirstAdmin(
  deps: Deps,
  admin: { readonly email: string; readonly name: string },
  carrier: { readonly name: string; readonly hubZip: string } | null,
): Promise<string> {
  const email = emailSchema.parse(admin.email);
  const name = line(120, 'The name').parse(admin.name);
  const hub = carrier ? await deps.services.places.postalCode(carrier.hubZip) : null;
  if (carrier && !hub) throw new Error(`ZIP ${carrier.hubZip} is not known.`);
  return deps.transaction(async (tx) => {
    const now = tx.clock.nowIso();
    if (await tx.db('person_roles').where({ role: 'admin' }).first('person_id'))
      throw new Error('There is an admin already: ask them for an invitation.');
    if (!(await tx.db('blackouts').first('id'))) await seedHolidays(tx.db, now);
    if (carrier && hub) {
      const { city, state, lat, lon, zone } = hub;
      const [hubId] = await tx
        .db('hubs')
        .insert({ name: `${carrier.name} sort hub`, city, state, lat, lon, zone });
      await tx.db('carriers').insert({ name: carrier.name, hub_id: hubId });
    }
    const { policy } = await tx.services.policy.current();
    const [personId] = await tx
      .db('people')
      .insert({ email, name, zone: policy.circleZone, created_at: now, updated_at: now });
    if (personId === undefined) throw new Error('The admin was not written.');
    await tx.db('person_roles').insert({ person_id: personId, role: 'admin' });
    return (await makeLink(tx, personId, 'invitation')).url;
  });
}
