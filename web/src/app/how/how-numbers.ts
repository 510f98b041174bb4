import type { TemperatureUnit } from '@shared/contract';
import type { Policy } from '@shared/policy/policy';
import { boxModel } from '@shared/thermal/box-model';
import { minuteText } from '../core/dates';
import { rangeText, temperatureText } from '../core/temperature';

/** One leg of the journey in words. */
export interface LegWords {
  readonly name: string;
  readonly until: string;
  readonly outdoors: string;
  readonly indoors: string;
}

type Around = Policy['journey']['hub'];

/** The legs of a journey with the present values, in the order a parcel meets them; the late case last. */
export function legWords({ journey, packedBeforeCutOffMinutes }: Policy, unit: TemperatureUnit): LegWords[] {
  const leg = (name: string, until: string, around: Around): LegWords => ({
    name,
    until,
    outdoors: percent(around.exposure),
    indoors: around.exposure === 1 ? '–' : temperatureText(around.indoorF, unit),
  });
  const { late, truck } = journey;
  return [
    leg(
      'Packed at home',
      `collected, ${packedBeforeCutOffMinutes} min before the cut-off; packed ${journey.packedBeforeCollectionMinutes} min before that`,
      journey.packed,
    ),
    leg(
      'The run’s vehicle',
      `handed over, ${journey.handOverBeforeCutOffMinutes} min before the cut-off`,
      journey.vehicle,
    ),
    leg('Drop-off counter', minuteText(journey.dropOffUntilMinute), journey.dropOff),
    leg('On the way to the sort hub', 'midnight at the hub', journey.linehaulOut),
    leg('Sort hub', minuteText(journey.hubUntilMinute), journey.hub),
    leg('On the way to the destination', minuteText(journey.linehaulInUntilMinute), journey.linehaulIn),
    leg('Destination’s station', 'the commit time of the counter', journey.station),
    leg(
      'Held at the counter',
      `collected, ${journey.heldMinutes} min after it is ready and open`,
      journey.held,
    ),
    leg(
      'To the door instead: the truck',
      `${minuteText(journey.truckUntilMinute)}; the cabin adds ${difference(truck.cabinF, unit)} while it is over ${temperatureText(truck.cabinAboveF, unit)} outdoors`,
      truck,
    ),
    leg('Late at the sort hub', `${late.hours} h more`, late.hub),
    leg('Or late at the station', `${late.hours} h more`, late.station),
  ];
}

/** The numbers that the sentences of the page are filled in with. */
export function howNumbers(policy: Policy, unit: TemperatureUnit) {
  const { boxModel: box, guardRails, chance, heatPack, coldPack, sigmaF } = policy;
  const sample = boxModel({ lengthIn: 12, widthIn: 9, heightIn: 6, foamIn: 0.75 }, 200, box);
  return {
    slack:
      policy.minSlackDays === 0
        ? 'without one the day is at best tight'
        : `fewer than ${policy.minSlackDays} shut the day`,
    holdRail: rangeText(guardRails.hold, unit),
    doorRail: rangeText(guardRails.door, unit),
    hubRail: rangeText(policy.hubRail, unit),
    sampleUa: sample.uaWPerK.toFixed(3),
    sampleHeat: String(Math.round(sample.heatJPerK)),
    sampleHours: (sample.heatJPerK / sample.uaWPerK / 3600).toFixed(1),
    start: temperatureText(box.startF, unit),
    tail: percent(heatPack.tailShare),
    coldKJ: (coldPack.massKg * coldPack.latentKJPerKg).toFixed(0),
    sigmas: sigmaF.map((sigma, day) => ({ day, text: difference(sigma, unit) })),
    open: percent(chance.open),
    tight: percent(chance.tight),
    lateOpen: percent(chance.lateOpen),
    lateTight: percent(chance.lateTight),
    heatBelow: temperatureText(policy.heatPackBelowF, unit),
    coldAbove: temperatureText(policy.coldPackAboveF, unit),
  };
}
export type HowNumbers = ReturnType<typeof howNumbers>;

const percent = (share: number): string => `${Number((share * 100).toFixed(1))} %`;
/** A difference has no zero to shift: 9 °F are 5 °C. */
const difference = (valueF: number, unit: TemperatureUnit): string =>
  `${Number((unit === 'C' ? (valueF * 5) / 9 : valueF).toFixed(1))} °${unit}`;
