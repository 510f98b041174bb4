import type { Availability, BreederProfile, CoordinatorProfile, Person, Role } from '@shared/contract';
import { AppError, badInput, type FieldProblem } from '@shared/errors';
import type { Deps } from '../deps';
import { findPostalCode } from '../places/postal-codes';

/** What the rules of a person look at, as it would stand after the change. */
export interface PersonDraft {
  readonly roles: readonly Role[];
  readonly active: boolean;
  readonly lat: number | null;
  readonly lon: number | null;
  readonly breeder: BreederProfile | null;
  readonly coordinator: CoordinatorProfile | null;
}

/** A role needs its profile, a window opens before it closes, a stop needs a position. Throws 400 field by field. */
export async function checkPerson(tx: Deps, draft: PersonDraft): Promise<void> {
  const errors: FieldProblem[] = [];
  const isBreeder = draft.roles.includes('breeder');
  const isCoordinator = draft.roles.includes('coordinator');
  if (isBreeder && !draft.breeder)
    errors.push({ path: 'breeder', message: 'A breeder needs a collection window and a counter.' });
  if (isCoordinator && !draft.coordinator)
    errors.push({
      path: 'coordinator',
      message: 'A coordinator needs a vehicle, a longest run and free days.',
    });
  if ((isBreeder || isCoordinator) && (draft.lat === null || draft.lon === null))
    errors.push({
      path: 'postalCode',
      message: 'Enter a ZIP code we know, or a position: a run starts or stops there.',
    });
  if (draft.breeder) errors.push(...(await breederProblems(tx, draft.breeder, draft.active && isBreeder)));
  if (errors.length > 0) throw badInput(errors);
}

async function breederProblems(tx: Deps, profile: BreederProfile, inUse: boolean): Promise<FieldProblem[]> {
  const errors: FieldProblem[] = [];
  if (profile.windowCloseMinute <= profile.windowOpenMinute)
    errors.push({ path: 'breeder.windowCloseMinute', message: 'The window closes before it opens.' });
  const counters = await tx.services.places.counters();
  const counter = counters.find((one) => one.id === profile.dropOffCounterId);
  if (!counter || (inUse && !(counter.active && counter.canDropOff)))
    errors.push({ path: 'breeder.dropOffCounterId', message: 'Choose a counter that takes parcels in.' });
  return errors;
}

/** The last active admin who can sign in keeps the role and the account. Throws 409. */
export function keepAnAdmin(everyone: readonly Person[], before: Person, after: PersonDraft): void {
  const wasAdmin = before.active && before.roles.includes('admin');
  const isAdmin = after.active && after.roles.includes('admin');
  if (!wasAdmin || isAdmin) return;
  const others = everyone.filter(
    (p) => p.id !== before.id && p.active && p.hasPassword && p.roles.includes('admin'),
  );
  if (others.length === 0)
    throw new AppError(
      'conflict',
      `${before.name} is the last admin who can sign in. Make somebody else an admin first.`,
    );
}

/** No day twice, and driving days only for those who drive. Throws 400. */
export function checkAvailability(person: Person, availability: Availability): void {
  const errors: FieldProblem[] = [];
  const seen = new Set<string>();
  availability.drivingDays.forEach((day, index) => {
    if (seen.has(day.date))
      errors.push({ path: `drivingDays.${index}.date`, message: 'That day stands here twice.' });
    seen.add(day.date);
  });
  if (availability.drivingDays.length > 0 && !person.roles.includes('coordinator'))
    errors.push({ path: 'drivingDays', message: 'Only coordinators have driving days.' });
  if (errors.length > 0) throw badInput(errors);
}

/** The position of a ZIP code when none was entered: good enough to plan a run with. */
export async function positionOf<
  T extends { lat: number | null; lon: number | null; postalCode: string | null },
>(given: T): Promise<T> {
  if (given.lat !== null && given.lon !== null) return given;
  const found = given.postalCode === null ? null : await findPostalCode(given.postalCode);
  return found ? { ...given, lat: found.lat, lon: found.lon } : given;
}
