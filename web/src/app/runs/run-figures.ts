import type { Proposal, Run, RunStop } from '@shared/contract';
import { parcels } from './board-layout';

/** A number with what it means under it. */
export interface Figure {
  readonly value: string;
  readonly label: string;
}

/** Cents as dollars: `$9.40`; without cents from 100 dollars on, `$121`. */
export function dollars(cents: number): string {
  const digits = Math.abs(cents) >= 10000 ? 0 : 2;
  return new Intl.NumberFormat('en-US', {
    style: 'currency',
    currency: 'USD',
    minimumFractionDigits: digits,
    maximumFractionDigits: digits,
  }).format(cents / 100);
}

/** What pooling costs against every breeder driving alone; it is not always less, and then it says so. */
export function againstAlone(costCents: number, aloneCents: number): Figure {
  const less = aloneCents - costCents;
  if (less === 0) return { value: 'The same', label: 'as driving alone' };
  return { value: `${dollars(Math.abs(less))} ${less > 0 ? 'less' : 'more'}`, label: 'than driving alone' };
}

/** What pooling does to the hours on the road, against every breeder driving alone. */
export function roadAgainstAlone(driveMinutes: number, aloneMinutes: number): Figure {
  const less = Math.round(aloneMinutes) - Math.round(driveMinutes);
  if (less === 0) return { value: 'The same', label: 'on the road as driving alone' };
  return { value: `${duration(Math.abs(less))} ${less > 0 ? 'less' : 'more'}`, label: 'on the road' };
}

/** What the plan is measured by and how low the bound is, in a sentence; only a proven bound is called a limit. */
export function boundText({ objectiveCents, boundCents, boundKind }: Proposal): string {
  const valued = `With the driver's time and what is left over, the plan counts ${dollars(objectiveCents)}.`;
  return boundKind === 'proven'
    ? `${valued} No plan can count less than ${dollars(boundCents)}.`
    : `${valued} The best possible is estimated at ${dollars(boundCents)}; the estimate is no proof.`;
}

/** How far the plan can be from the best one: a promise when the bound is proven, an estimate otherwise. */
export function aboveBest(gap: number, boundKind: Proposal['boundKind']): Figure {
  const percent = `${(Math.max(gap, 0) * 100).toFixed(1)} %`;
  return boundKind === 'proven'
    ? { value: `${percent} at most`, label: 'above the best possible' }
    : { value: `About ${percent}`, label: 'above the best possible, an estimate' };
}

/** The figures of a proposal, in the order they are read. */
export function proposalFigures(proposal: Proposal): Figure[] {
  const left = proposal.unplaced.length;
  return [
    {
      value: dollars(proposal.costCents),
      label: proposal.runs.length === 1 ? 'for one run' : `for all ${proposal.runs.length} runs`,
    },
    againstAlone(proposal.costCents, proposal.aloneCents),
    roadAgainstAlone(proposal.driveMinutes, proposal.aloneMinutes),
    aboveBest(proposal.gap, proposal.boundKind),
    { value: String(left), label: left === 1 ? 'parcel not placed' : 'parcels not placed' },
  ];
}

/** The figures of the runs as they stand, when nothing was proposed just now. */
export function planFigures(runs: readonly Run[], waiting: number): Figure[] {
  const live = runs.filter(
    (run) => run.state === 'proposed' || run.state === 'confirmed' || run.state === 'underway',
  );
  const last = {
    value: String(waiting),
    label: waiting === 1 ? 'parcel not on a run' : 'parcels not on a run',
  };
  if (live.length === 0) return [last];
  const costCents = live.reduce((sum, run) => sum + run.costCents, 0);
  const aloneCents = live.reduce((sum, run) => sum + run.aloneCents, 0);
  return [
    { value: dollars(costCents), label: live.length === 1 ? 'for one run' : `for all ${live.length} runs` },
    againstAlone(costCents, aloneCents),
    last,
  ];
}

/** Share of a parcel on average, or null for an empty run. */
export function sharePerParcel(run: Run): string | null {
  return run.parcels.length === 0
    ? null
    : `about ${dollars(Math.round(run.costCents / run.parcels.length))} a parcel`;
}

/** Load against capacity: `61 of 120 L`, with the filled part of the bar in percent (100 at most). */
export function load(run: Run): {
  readonly text: string;
  readonly percent: number;
  readonly isOver: boolean;
} {
  const { capacityL } = run.coordinator;
  const percent = capacityL > 0 ? Math.min(100, Math.round((run.loadL / capacityL) * 100)) : 100;
  return {
    text: `${Math.round(run.loadL)} of ${Math.round(capacityL)} L`,
    percent,
    isOver: run.loadL > capacityL,
  };
}

/** What happens at a stop besides loading: `3 parcels, waits 10 min, 1 tight`. */
export function stopText(stop: RunStop, run: Run): string {
  const tight = run.parcels.filter(
    (parcel) => stop.parcelIds.includes(parcel.id) && parcel.verdict === 'tight',
  ).length;
  const parts = [parcels(stop.parcelIds.length)];
  if (Math.round(stop.waitMinutes) > 0) parts.push(`waits ${Math.round(stop.waitMinutes)} min`);
  if (tight > 0) parts.push(tight === stop.parcelIds.length && tight > 1 ? 'all tight' : `${tight} tight`);
  return parts.join(', ');
}

/** The room before the cut-off: `55 min before cut-off`, or how much too late it is. */
export function slackText(slackMinutes: number): string {
  const minutes = Math.round(slackMinutes);
  return minutes >= 0 ? `${minutes} min before cut-off` : `${-minutes} min after cut-off`;
}

/** Hours and minutes of a drive: `2 h 05 min`, `40 min`. */
export function duration(minutes: number): string {
  const whole = Math.round(minutes);
  return whole < 60
    ? `${whole} min`
    : `${Math.floor(whole / 60)} h ${String(whole % 60).padStart(2, '0')} min`;
}

/** A change of cost in words, for the preview of a move. */
export function costChange(cents: number, which = 'The run'): string {
  if (cents === 0) return `${which} costs the same.`;
  return `${which} costs ${dollars(Math.abs(cents))} ${cents > 0 ? 'more' : 'less'}.`;
}
