import { DateTime } from 'luxon';

/** The plain date on the clock of `zone` at an instant (UTC epoch ms). */
export const dateAt = (atMs: number, zone: string): string =>
  DateTime.fromMillis(atMs, { zone }).toISODate() ?? '';
