/** The zones of the United States that counters and people live by, as a choice; others may still be stored. */
export const usZones: readonly (readonly [zone: string, name: string])[] = [
  ['America/New_York', 'Eastern'],
  ['America/Chicago', 'Central'],
  ['America/Denver', 'Mountain'],
  ['America/Boise', 'Mountain (southern Idaho)'],
  ['America/Phoenix', 'Arizona (no daylight time)'],
  ['America/Los_Angeles', 'Pacific'],
  ['America/Anchorage', 'Alaska'],
  ['Pacific/Honolulu', 'Hawaii'],
];

/** `Central Time` of `America/Chicago`, for any zone the browser knows. */
export function zoneName(zone: string): string {
  const parts = new Intl.DateTimeFormat('en-US', {
    timeZone: zone,
    timeZoneName: 'longGeneric',
  }).formatToParts(0);
  return parts.find(({ type }) => type === 'timeZoneName')?.value ?? zone;
}

/** The choices of a zone field, with the present value among them even when it is another. */
export const zoneChoices = (present: string): readonly (readonly [string, string])[] =>
  present === '' || usZones.some(([zone]) => zone === present) ? usZones : [...usZones, [present, present]];
