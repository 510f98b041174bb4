import { DateTime } from 'luxon';
import type { DayVerdict, Parcel } from '@shared/contract';
import type { Deps } from '../deps';

export interface RecheckReport {
  readonly at: string;
  readonly looked: number;
  /** Parcels taken off their day, with the sentence why. */
  readonly held: readonly { readonly code: string; readonly shipDate: string; readonly reason: string }[];
  /** Parcels whose weather could not be read: left where they are, for a missing forecast is not a bad one. */
  readonly unknown: readonly string[];
}

export interface RechecksService {
  /** Looks at every booked or packed parcel again and puts those on hold whose day has turned shut. Safe to run twice. */
  run(): Promise<RecheckReport>;
}

/** Reason codes that say the weather is not known, as opposed to bad. */
const notKnown = /^(no-forecast|forecast-)/;

/** The second look at what is booked. */
export function createRechecksService(deps: Deps): RechecksService {
  return {
    async run() {
      const { services, clock } = deps;
      const parcels = (await services.parcels.inStates(['booked', 'packed'])).filter(
        (parcel) => parcel.shipDate !== null,
      );
      const verdicts = await verdictsOf(deps, parcels);
      const held: { code: string; shipDate: string; reason: string }[] = [];
      const unknown: string[] = [];
      for (const parcel of parcels) {
        const day = verdicts.get(parcel.id)?.find((one) => one.date === parcel.shipDate);
        if (day?.verdict !== 'shut') continue;
        const causes = day.reasons.filter((reason) => reason.verdict === 'shut');
        if (causes.every((reason) => notKnown.test(reason.code))) unknown.push(parcel.code);
        else if (await hold(parcel, causes[0]?.text ?? 'The day is shut.'))
          held.push({ code: parcel.code, shipDate: day.date, reason: causes[0]?.text ?? '' });
      }
      return { at: clock.nowIso(), looked: parcels.length, held, unknown };
    },
  };

  /** False when somebody moved the parcel meanwhile: then the verdict was about another day. */
  function hold(parcel: Parcel, reason: string): Promise<boolean> {
    return deps.transaction(async (tx) => {
      const now = await tx.services.parcels.get(parcel.id);
      if (now.version !== parcel.version) return false;
      await tx.services.parcels.putOnHold(parcel.id, reason, null);
      return true;
    });
  }
}

async function verdictsOf(
  deps: Deps,
  parcels: readonly Parcel[],
): Promise<ReadonlyMap<number, DayVerdict[]>> {
  const dates = parcels.map((parcel) => parcel.shipDate ?? '').sort();
  const [first, last] = [dates[0], dates.at(-1)];
  if (first === undefined || last === undefined) return new Map();
  const days = Math.round(DateTime.fromISO(last).diff(DateTime.fromISO(first), 'days').days) + 1;
  const ids = parcels.map((parcel) => parcel.id);
  return deps.services.days.forParcels(ids, { from: first, days });
}
