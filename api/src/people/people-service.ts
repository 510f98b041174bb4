import type * as z from 'zod';
import type {
  Availability,
  BreederSummary,
  CoordinatorSummary,
  mePatch,
  Person,
  personNew,
  personPatch,
} from '@shared/contract';
import { AppError, badInput, notFound } from '@shared/errors';
import type { Deps } from '../deps';
import type { Actor } from '../http/actor';
import { checkVersion } from '../http/router';
import { canDrive } from './can-drive';
import * as queries from './people-queries';
import { checkAvailability, checkPerson, keepAnAdmin, positionOf } from './person-rules';

type Patch = z.output<typeof personPatch>;

export interface PeopleService {
  /** Throws 404. */
  get(id: number): Promise<Person>;
  list(): Promise<Person[]>;
  /** Active people who hold the role, with their profiles. */
  withRole(role: 'breeder' | 'coordinator'): Promise<Person[]>;
  availability(personId: number): Promise<Availability>;
  /** Whether a coordinator is free to drive on a date: the weekly pattern, single days, days away. */
  canDrive(person: Person, availability: Availability, date: string): boolean;
  /** The id of the person with this e-mail, made a buyer; created without a password when new. Never changes a name. */
  ensureBuyer(buyer: { name: string; email: string; phone: string | null; zone: string }): Promise<number>;
  /** Adds a person and sends the invitation. */
  add(actor: Actor, body: z.output<typeof personNew>): Promise<Person>;
  /** An admin's change. Throws 400, 404, 409 (last admin), 412. */
  change(actor: Actor, id: number, ifMatch: number | null, patch: Patch): Promise<Person>;
  /** What a person changes of themselves. */
  changeMe(actor: Actor, ifMatch: number | null, patch: z.output<typeof mePatch>): Promise<Person>;
  setAvailability(actor: Actor, availability: Availability): Promise<Availability>;
  /** Sends a fresh invitation link; older ones end. */
  invite(actor: Actor, id: number): Promise<void>;
  coordinators(): Promise<CoordinatorSummary[]>;
  breeders(): Promise<BreederSummary[]>;
}

/** People, their roles, profiles and days. */
export function createPeopleService(deps: Deps): PeopleService {
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
      subjectKind: 'person',
      subjectId: id,
      action,
      text,
      before,
      after,
    });

  const get = async (id: number): Promise<Person> => {
    const [person] = await queries.findPeople(deps.db, [id]);
    if (!person) throw notFound('The person');
    return person;
  };

  const withRole = async (role: 'breeder' | 'coordinator') =>
    (await queries.findPeople(deps.db)).filter((person) => person.active && person.roles.includes(role));

  const change: PeopleService['change'] = (actor, id, ifMatch, patch) =>
    deps.transaction(async (tx) => {
      const before = await tx.services.people.get(id);
      checkVersion(ifMatch, before.version, before);
      const moved =
        patch.postalCode !== undefined && patch.postalCode !== before.postalCode && patch.lat === undefined;
      const next = await positionOf({ ...before, ...(moved ? { lat: null, lon: null } : {}), ...patch });
      await checkPerson(tx, next);
      keepAnAdmin(await tx.services.people.list(), before, next);
      await save(tx, before, next);
      const after = await tx.services.people.get(id);
      await note(tx, actor, id, 'changed', `${after.name} was changed.`, before, after);
      return after;
    });

  const save = async (tx: Deps, before: Person, next: Person): Promise<void> => {
    const endSessions = before.active && !next.active;
    const set = { version: before.version + 1, at: tx.clock.nowIso(), endSessions };
    await queries.updatePerson(tx.db, before.id, next, set);
    await queries.replaceRoles(tx.db, before.id, next.roles);
    if (next.breeder) await queries.saveBreeder(tx.db, before.id, next.breeder);
    if (next.coordinator) await queries.saveCoordinator(tx.db, before.id, next.coordinator);
  };

  return {
    get,
    withRole,
    canDrive,
    change,
    list: () => queries.findPeople(deps.db),
    availability: (personId) => queries.findAvailability(deps.db, personId),
    ensureBuyer: (buyer) => deps.transaction((tx) => ensureBuyer(tx, buyer)),

    add: (actor, body) =>
      deps.transaction(async (tx) => {
        if ((await queries.findIdByEmail(tx.db, body.email)) !== null)
          throw badInput([{ path: 'email', message: 'Somebody with this e-mail address is here already.' }]);
        const { policy } = await tx.services.policy.current();
        const draft = await positionOf({
          ...body,
          zone: body.zone ?? policy.circleZone,
          temperatureUnit: 'F' as const,
          active: true,
        });
        await checkPerson(tx, draft);
        const id = await queries.insertPerson(tx.db, draft, tx.clock.nowIso());
        await queries.replaceRoles(tx.db, id, draft.roles);
        if (draft.breeder) await queries.saveBreeder(tx.db, id, draft.breeder);
        if (draft.coordinator) await queries.saveCoordinator(tx.db, id, draft.coordinator);
        await tx.services.session.sendLink(id, 'invitation');
        const added = await tx.services.people.get(id);
        await note(tx, actor, id, 'added', `${added.name} was added and invited.`, undefined, added);
        return added;
      }),

    async changeMe(actor, ifMatch, { breeder, coordinator, ...own }) {
      const me = await get(actor.id);
      if (breeder && !me.breeder)
        throw badInput([{ path: 'breeder', message: 'You are not a breeder of this circle.' }]);
      if (coordinator && !me.coordinator)
        throw badInput([{ path: 'coordinator', message: 'You are not a coordinator of this circle.' }]);
      const patch: Patch & { temperatureUnit?: 'F' | 'C' } = { ...own };
      if (breeder && me.breeder) patch.breeder = { ...me.breeder, ...breeder };
      if (coordinator && me.coordinator) patch.coordinator = { ...me.coordinator, ...coordinator };
      return change(actor, actor.id, ifMatch ?? me.version, patch);
    },

    setAvailability: (actor, availability) =>
      deps.transaction(async (tx) => {
        checkAvailability(await tx.services.people.get(actor.id), availability);
        const before = await queries.findAvailability(tx.db, actor.id);
        await queries.replaceAvailability(tx.db, actor.id, availability);
        const after = await queries.findAvailability(tx.db, actor.id);
        await note(
          tx,
          actor,
          actor.id,
          'availability',
          `${actor.name} changed their free days.`,
          before,
          after,
        );
        return after;
      }),

    invite: (actor, id) =>
      deps.transaction(async (tx) => {
        const person = await tx.services.people.get(id);
        if (!person.active)
          throw new AppError('conflict', `${person.name}'s account is shut. Open it first.`);
        await tx.services.session.sendLink(id, 'invitation');
        await note(tx, actor, id, 'invited', `${person.name} was sent a new invitation.`);
      }),

    coordinators: async () =>
      (await withRole('coordinator')).flatMap(({ id, name, coordinator }) =>
        coordinator
          ? [{ id, name, capacityL: coordinator.capacityL, freeWeekdays: coordinator.freeWeekdays }]
          : [],
      ),

    breeders: async () =>
      (await withRole('breeder')).flatMap(({ id, name, businessName, breeder }) =>
        breeder ? [{ id, name, businessName, dropOffCounterId: breeder.dropOffCounterId }] : [],
      ),
  };
}

async function ensureBuyer(
  tx: Deps,
  buyer: { name: string; email: string; phone: string | null; zone: string },
): Promise<number> {
  const known = await queries.findIdByEmail(tx.db, buyer.email);
  const fresh = {
    ...buyer,
    email: buyer.email.toLowerCase(),
    businessName: null,
    street: null,
    city: null,
    state: null,
    postalCode: null,
    lat: null,
    lon: null,
    temperatureUnit: 'F' as const,
    active: true,
  };
  const id = known ?? (await queries.insertPerson(tx.db, fresh, tx.clock.nowIso()));
  await queries.addRole(tx.db, id, 'buyer');
  return id;
}
