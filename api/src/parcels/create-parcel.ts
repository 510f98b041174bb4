import { randomBytes } from 'node:crypto';
import type * as z from 'zod';
import type { Parcel, parcelNew, Person } from '@shared/contract';
import { badInput, isAppError } from '@shared/errors';
import { contentsText } from '@shared/parcels/contents-text';
import type { Deps } from '../deps';
import { has, type Actor } from '../http/actor';
import { codePrefix } from './code-prefix';
import { checkFacts, type ParcelFacts } from './parcel-facts';
import { insertParcel } from './parcel-writes';

/** 32 random bytes: the buyer's link is all that guards the page. */
export const newArrivalToken = (): string => randomBytes(32).toString('base64url');

/** Enters a draft for the breeder themselves, or (coordinator, admin) for a named one. Throws 400 field by field. */
export async function createParcel(
  deps: Deps,
  actor: Actor,
  body: z.output<typeof parcelNew>,
): Promise<Parcel> {
  const breeder = await breederFor(deps, actor, body.breederId);
  const dropOffCounterId = body.dropOffCounterId ?? breeder.breeder?.dropOffCounterId;
  if (dropOffCounterId === undefined)
    throw badInput([{ path: 'dropOffCounterId', message: 'Choose the counter where it is dropped off.' }]);
  const facts: ParcelFacts = { ...body, dropOffCounterId };
  const { doorPlace, zone } = await checkFacts(deps, facts, null);
  return deps.transaction(async (tx) => {
    const { policy } = await tx.services.policy.current();
    const id = await insertParcel(tx.db, facts, doorPlace, {
      breederId: breeder.id,
      buyerId: await tx.services.people.ensureBuyer({ ...facts.buyer, zone }),
      token: newArrivalToken(),
      codePrefix: codePrefix(policy.circleName),
      now: tx.clock.nowIso(),
    });
    const parcel = await tx.services.parcels.get(id);
    await tx.services.history.add({
      actorId: actor.id,
      actorName: actor.name,
      subjectKind: 'parcel',
      subjectId: id,
      action: 'created',
      text: `Entered ${parcel.code}: ${contentsText(parcel.contents)} for ${parcel.buyer.name} in ${parcel.destination.city}, ${parcel.destination.state}.`,
      after: facts,
    });
    await tx.services.notices.tell({ kind: 'parcel-created', parcelId: id });
    return parcel;
  });
}

async function breederFor(deps: Deps, actor: Actor, breederId: number | undefined): Promise<Person> {
  const { people } = deps.services;
  const complain = (message: string) => badInput([{ path: 'breederId', message }]);
  const forOthers = has(actor, 'coordinator', 'admin');
  if (breederId === undefined && !has(actor, 'breeder')) throw complain('Say which breeder it is for.');
  if (breederId !== undefined && breederId !== actor.id && !forOthers)
    throw complain('You enter parcels for yourself only.');
  const breeder = await people.get(breederId ?? actor.id).catch((error: unknown) => {
    if (isAppError(error, 'not-found')) throw complain('That breeder is not on the list.');
    throw error;
  });
  if (!breeder.active || !breeder.roles.includes('breeder'))
    throw complain('That person does not ship as a breeder.');
  return breeder;
}
