import type { TraceRow } from '@shared/contract';

/** An invented journey for specs: hourly from 2 pm in Texas, four legs in three zones, a day late at the hub. */
export function sampleTrace(): TraceRow[] {
  const hour = (count: number): string => new Date(Date.UTC(2026, 11, 8, 20 + count)).toISOString();
  const texas = { place: 'San Antonio airport counter', zone: 'America/Chicago' };
  const hub = { place: 'Larkspur sort hub', zone: 'America/Indiana/Indianapolis' };
  const arizona = { place: 'Flagstaff counter', zone: 'America/Phoenix' };
  const planned: [number, TraceRow['leg'], typeof texas][] = [
    [75, 'packed', texas],
    [76, 'packed', texas],
    [74, 'vehicle', texas],
    [70, 'hub', hub],
    [68, 'hub', hub],
    [66, 'held', arizona],
  ];
  const late = [64, 58, 52, 57];
  return [
    ...planned.map(([tempF, leg, where], index) => ({
      at: hour(index),
      tempF,
      lowF: tempF - index / 2,
      highF: tempF + index / 2,
      lateF: tempF - (index === 5 ? 1 : 0),
      leg,
      ...where,
    })),
    ...late.map((lateF, index) => ({
      at: hour(6 + index),
      tempF: null,
      lowF: null,
      highF: null,
      lateF,
      leg: index < 3 ? ('late' as const) : ('held' as const),
      ...(index < 3 ? hub : arizona),
    })),
  ];
}
