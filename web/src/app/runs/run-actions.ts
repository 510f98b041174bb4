import type { Parcel, Role, Run, RunState } from '@shared/contract';

export type RunAction = 'confirm' | 'depart' | 'hand-over' | 'call-off' | 'change';

const byState: Readonly<Record<RunState, readonly RunAction[]>> = {
  proposed: ['confirm', 'change', 'call-off'],
  confirmed: ['depart', 'change', 'call-off'],
  underway: ['hand-over', 'call-off'],
  'handed-over': [],
  closed: [],
  'called-off': [],
};

/** What somebody may do with a run as it stands, the next thing first; breeders only look, and nobody leaves before its day. */
export function runActions(run: Run, roles: readonly Role[], today: string): readonly RunAction[] {
  if (!roles.some((role) => role === 'coordinator' || role === 'admin')) return [];
  return byState[run.state].filter((action) => action !== 'depart' || run.date <= today);
}

/** What a run waits for, in a line under its title. */
export function runNeed(run: Run): string {
  switch (run.state) {
    case 'proposed':
      return run.problems.length > 0
        ? 'Something has to be put right before it can be confirmed.'
        : 'A proposal: nobody is told until it is confirmed.';
    case 'confirmed':
      return 'Everybody on it has an invitation.';
    case 'underway':
      return 'On the road. Hand over before the cut-off.';
    case 'handed-over':
    case 'closed':
      return 'Handed over to the carrier.';
    case 'called-off':
      return 'This run does not go.';
  }
}

/** Whom a confirmation tells: `Delia Marsh, 3 breeders and 4 buyers get a mail with a calendar invitation.` */
export function toldOnConfirmation(run: Run): string {
  const breeders = new Set(run.parcels.map((parcel) => parcel.breederId)).size;
  const count = (n: number, one: string) => `${n} ${one}${n === 1 ? '' : 's'}`;
  return `${run.coordinator.name}, ${count(breeders, 'breeder')} and the buyers of ${count(run.parcels.length, 'parcel')} get a mail with a calendar invitation. Parcels that were left open are booked on this day.`;
}

/** Parcels that could join: their day is this one or was left open for it, and no other confirmed run has them. */
export function couldJoin(waiting: readonly Parcel[], run: Run): Parcel[] {
  const on = new Set(run.parcels.map((parcel) => parcel.id));
  return waiting.filter(
    (parcel) =>
      !on.has(parcel.id) &&
      parcel.state !== 'on-hold' &&
      (parcel.run === null || parcel.run.state === 'proposed') &&
      (parcel.shipDate === run.date ||
        (parcel.flexible !== null && parcel.flexible.from <= run.date && run.date <= parcel.flexible.to)),
  );
}

/** The runs that could take a parcel: still to be driven, not the one it is on, and on a day that is open to it. */
export function runsFor(parcel: Parcel, runs: readonly Run[], today: string): Run[] {
  return runs.filter(
    (run) =>
      (run.state === 'proposed' || run.state === 'confirmed') &&
      run.date >= today &&
      run.id !== parcel.run?.id &&
      couldJoin([parcel], run).length > 0,
  );
}

export interface Share {
  readonly breederId: number;
  readonly name: string;
  readonly parcels: number;
  readonly cents: number;
  /** What driving there alone would cost this breeder; null when the run has no stop at them. */
  readonly aloneCents: number | null;
}

/** What each breeder pays, largest first. */
export function sharesOf(run: Run): Share[] {
  const shares = new Map<number, Share>();
  for (const { breederId, breederName: name, shareCents } of run.parcels) {
    const aloneCents = run.stops.find((stop) => stop.breederId === breederId)?.aloneCents ?? null;
    const before = shares.get(breederId) ?? { breederId, name, parcels: 0, cents: 0, aloneCents };
    shares.set(breederId, { ...before, parcels: before.parcels + 1, cents: before.cents + shareCents });
  }
  return [...shares.values()].sort((a, b) => b.cents - a.cents || a.name.localeCompare(b.name));
}
