/** How a value is measured: decides its unit word, how it is typed in, and whether it follows the person's °F or °C. */
export type PolicyUnit =
  | 'temperature' // a temperature, stored in °F
  | 'difference' // a difference of temperatures, stored in °F
  | 'clock' // minutes after local midnight
  | 'minutes'
  | 'hours'
  | 'days'
  | 'share' // 0 to 1
  | 'cents'
  | 'cents a mile'
  | 'cents a minute'
  | 'cents a day'
  | 'times'
  | 'W/m·K'
  | 'mm'
  | 'm²K/W'
  | 'W/K'
  | 'J/K'
  | 'J/kg·K'
  | 'W'
  | 'kg'
  | 'kJ/kg'
  | 'text';

export interface PolicyNote {
  readonly label: string;
  readonly unit: PolicyUnit;
  readonly min?: number;
  readonly max?: number;
  /** Where the value was read; null: an assumption. */
  readonly source: string | null;
  /** What stands behind an assumption, or what the value does. */
  readonly remark?: string;
}

export interface PolicyGroup {
  readonly title: string;
  readonly lead: string;
  /** First members of the paths that belong here. */
  readonly members: readonly string[];
}

/** The groups of the policy in the order a person reads them; what no group names comes under the last one. */
export const policyGroups: readonly PolicyGroup[] = [
  {
    title: 'The circle',
    lead: 'Its name, and the clock its days are counted by.',
    members: ['circleName', 'circleZone'],
  },
  {
    title: 'Calendar and readiness',
    lead: 'Which days are looked at, and what a day needs before the weather counts.',
    members: ['minSlackDays', 'fastDays', 'packedBeforeCutOffMinutes', 'horizonDays'],
  },
  {
    title: 'Guard rails and alerts',
    lead: 'Plain outdoor limits and weather alerts that shut a day whatever the model says.',
    members: ['guardRails', 'hubRail', 'shutAlerts'],
  },
  {
    title: 'Forecast',
    lead: 'How old a forecast may be and how far it is usually off.',
    members: ['forecastMaxAgeHours', 'sigmaF'],
  },
  {
    title: 'Chance',
    lead: 'How sure a day has to be, as planned and when the box is a day late.',
    members: ['chance'],
  },
  {
    title: 'Packs',
    lead: 'When a heat or cold pack is considered, and what it gives.',
    members: ['heatPackBelowF', 'coldPackAboveF', 'heatPackSpareHours', 'heatPack', 'coldPack'],
  },
  {
    title: 'Journey',
    lead: 'Where the box is, how much of the outdoor air it feels there, and the air of the room or vehicle otherwise.',
    members: ['journey'],
  },
  { title: 'Box', lead: 'How the box keeps its heat.', members: ['boxModel'] },
  { title: 'Pooling', lead: 'What runs cost, so that they can be compared.', members: ['pooling'] },
];

const practice = 'Common practice, no source.';
const fromMemory = 'Common practice, from memory, no source.';

const assumed = (
  label: string,
  unit: PolicyUnit,
  range: readonly [number, number] | null = null,
  remark?: string,
): PolicyNote => ({
  label,
  unit,
  source: null,
  ...(range ? { min: range[0], max: range[1] } : {}),
  ...(remark ? { remark } : {}),
});
const sourced = (
  label: string,
  unit: PolicyUnit,
  range: readonly [number, number],
  source: string,
): PolicyNote => ({ label, unit, min: range[0], max: range[1], source });

const temperature = (label: string, remark?: string): PolicyNote =>
  assumed(label, 'temperature', [-40, 130], remark);
/** The two values of a leg's surroundings, under its path. */
const surroundings = (path: string, where: string): Record<string, PolicyNote> => ({
  [`${path}.exposure`]: assumed(`${where}: outdoor part`, 'share', [0, 1]),
  [`${path}.indoorF`]: assumed(`${where}: air indoors`, 'temperature', [0, 120]),
});
const rail = (path: string, where: string, remark?: string): Record<string, PolicyNote> => ({
  [`${path}.lowF`]: temperature(`${where}: lowest outdoors`, remark),
  [`${path}.highF`]: temperature(`${where}: highest outdoors`, remark),
});

const errorOfDay = (day: number): PolicyNote =>
  day === 1
    ? sourced(
        'Forecast error 1 day ahead',
        'difference',
        [0.1, 30],
        'NOAA/NSSL verification tables: RMSE 3.80 °F for 12–24 h high temperatures at an NWS office.',
      )
    : assumed(`Forecast error ${day} days ahead`, 'difference', [0.1, 30], 'One standard deviation.');

/** What every value of the policy is called, its unit and range, and whether it is sourced or an assumption; by path. */
export const policyNotes: Readonly<Record<string, PolicyNote>> = {
  circleName: assumed('Name of the circle', 'text', null, 'Chosen by the circle.'),
  circleZone: assumed('Time zone of the circle', 'text', null, 'An IANA name like America/Chicago.'),
  minSlackDays: assumed(
    'Fewest working days after the arrival',
    'days',
    [0, 2],
    '0 lets a day without slack be tight, 1 shuts it.',
  ),
  ...rail('guardRails.hold', 'Held at a counter', fromMemory),
  ...rail('guardRails.door', 'To the door', fromMemory),
  ...rail('hubRail', 'Sort hub overnight', 'The box is mostly indoors there.'),
  fastDays: assumed('Not fed before travelling', 'days', [0, 30], practice),
  forecastMaxAgeHours: assumed('Forecast no older than, to be open', 'hours', [1, 72]),
  ...Object.fromEntries(Array.from({ length: 8 }, (_, day) => [`sigmaF.${day}`, errorOfDay(day)])),
  heatPackBelowF: temperature('Heat pack when a high is under', practice),
  coldPackAboveF: temperature('Cold pack when a high is over', fromMemory),
  heatPackSpareHours: assumed('Heat pack lasts beyond the plan by', 'hours', [0, 72]),
  shutAlerts: assumed(
    'Alerts that shut a day',
    'text',
    null,
    'Names of the National Weather Service, one a line; capitals do not matter.',
  ),
  packedBeforeCutOffMinutes: assumed(
    'Collected before the cut-off',
    'minutes',
    [0, 1440],
    'Until a run says when.',
  ),
  horizonDays: assumed('Days ahead that can be asked for', 'days', [1, 365]),
  'journey.packedBeforeCollectionMinutes': assumed('Packed before collection', 'minutes', [0, 720]),
  ...surroundings('journey.packed', 'Packed at home'),
  ...surroundings('journey.vehicle', 'In the run’s vehicle'),
  'journey.handOverBeforeCutOffMinutes': assumed('Handed over before the cut-off', 'minutes', [0, 720]),
  'journey.dropOffUntilMinute': assumed('At the drop-off counter until', 'clock', [720, 1439]),
  ...surroundings('journey.dropOff', 'Drop-off counter'),
  ...surroundings('journey.linehaulOut', 'On the way to the sort hub'),
  'journey.hubUntilMinute': assumed('At the sort hub until', 'clock', [1, 720]),
  ...surroundings('journey.hub', 'Sort hub'),
  'journey.linehaulInUntilMinute': assumed('At the destination’s station from', 'clock', [1, 1080]),
  ...surroundings('journey.linehaulIn', 'On the way to the destination'),
  ...surroundings('journey.station', 'Destination’s station'),
  ...surroundings('journey.held', 'Held at the counter'),
  'journey.heldMinutes': assumed('Collected after it is ready', 'minutes', [0, 1440]),
  'journey.truckUntilMinute': assumed('To the door: in the truck until', 'clock', [1, 1439]),
  ...surroundings('journey.truck', 'Delivery truck'),
  'journey.truck.cabinF': assumed('Delivery truck: heat of the cabin', 'difference', [0, 60]),
  'journey.truck.cabinAboveF': temperature('Truck: cabin heats when outdoors over'),
  'journey.late.hours': assumed('A late box waits', 'hours', [1, 72]),
  ...surroundings('journey.late.hub', 'Late at the sort hub'),
  ...surroundings('journey.late.station', 'Late at the station'),
  'boxModel.foamWPerMK': sourced(
    'Foam: conductivity',
    'W/m·K',
    [0.01, 0.2],
    'ASTM C578 type I, R 3.85 an inch at 75 °F (manufacturers’ property table).',
  ),
  'boxModel.boardMm': assumed('Corrugated board: thickness', 'mm', [0, 20]),
  'boxModel.boardWPerMK': sourced(
    'Corrugated board: conductivity',
    'W/m·K',
    [0.01, 0.5],
    'Within 0.05–0.12 by ISO 8302, J. Renew. Mater. 2017, 10.7569/JRM.2017.634135.',
  ),
  'boxModel.filmM2KPerW': sourced(
    'Still air on each side',
    'm²K/W',
    [0, 1],
    'ASHRAE, vertical surface 0.68 h·ft²·°F/Btu (in Washington Administrative Code 51-11-0526).',
  ),
  'boxModel.holesWPerK': assumed('Air holes let through', 'W/K', [0, 2]),
  'boxModel.emptyJPerK': assumed('Heat capacity of the empty box', 'J/K', [50, 10_000]),
  'boxModel.contentsJPerKgK': assumed(
    'Heat capacity of the contents',
    'J/kg·K',
    [500, 5000],
    'About that of lizard tissue (Bartholomew & Lasiewski, from memory).',
  ),
  'boxModel.startF': assumed('Air in the box when it is closed', 'temperature', [40, 110]),
  'heatPack.powerW': assumed(
    'Heat pack: power',
    'W',
    [0.1, 30],
    '3.2 W for 40 h is the heat of about 62 g of iron, at 7.4 kJ a gram.',
  ),
  'heatPack.riseHours': assumed('Heat pack: hours to full power', 'hours', [0.05, 12]),
  'heatPack.tailShare': assumed('Heat pack: fades over a further', 'share', [0, 1]),
  'coldPack.wPerK': assumed('Cold pack: takes up', 'W/K', [0.001, 2]),
  'coldPack.massKg': assumed('Cold pack: mass', 'kg', [0.01, 5]),
  'coldPack.latentKJPerKg': assumed(
    'Cold pack: heat of melting',
    'kJ/kg',
    [50, 500],
    'Water ice, from memory.',
  ),
  'chance.open': assumed('Open from', 'share', [0, 1]),
  'chance.tight': assumed('Tight from', 'share', [0, 1]),
  'chance.lateOpen': assumed('A day late: open from', 'share', [0, 1]),
  'chance.lateTight': assumed('A day late: tight from', 'share', [0, 1]),
  'pooling.runFixedCents': assumed('A run costs at least', 'cents', [0, 100_000]),
  'pooling.driverMinuteCents': assumed('Driver’s time', 'cents a minute', [0, 1000]),
  'pooling.unplacedCents': assumed(
    'A parcel left over counts as',
    'cents',
    [0, 10_000_000],
    'Large, so that placing always wins.',
  ),
  'pooling.dayLaterCents': assumed('Each later day counts as', 'cents a day', [0, 100_000]),
  'pooling.tightCents': assumed('A tight day counts as', 'cents', [0, 100_000]),
  'pooling.circuity': assumed(
    'Road over straight line',
    'times',
    [1, 3],
    'Ballou et al. 2002: 1.20; Boscoe et al. 2012: 1.417 (from memory).',
  ),
  'pooling.cutOffSlackMinutes': assumed('Handed over before the cut-off, when planning', 'minutes', [0, 720]),
  'pooling.aloneCentsPerMile': sourced(
    'Driving alone',
    'cents a mile',
    [0, 1000],
    'IRS business mileage rate 2026: 72.5 ¢ a mile.',
  ),
};

/** The note of a path; a value nobody has described yet is shown by its path, as an assumption. */
export const policyNote = (path: string): PolicyNote => policyNotes[path] ?? assumed(path, 'text');
