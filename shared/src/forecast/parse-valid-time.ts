import { Duration, Interval } from 'luxon';
import { unreadable } from './forecast-shape';

/** A span of time, UTC epoch ms; the start counts, the end does not. */
export interface TimeSpan {
  readonly startMs: number;
  readonly endMs: number;
}

/**
 * Reads an ISO 8601 interval in any of its forms: start/duration (`2026-12-01T06:00:00+00:00/PT3H`), start/end, or
 * duration/end. Throws `forecast-unavailable` when it is none, is empty or runs backwards.
 */
export function parseValidTime(text: string): TimeSpan {
  const [first = '', second = '', ...rest] = text.split('/').map((part) => part.trim());
  // An instant without an offset would be read on this machine's clock.
  const zoned = [first, second].every((part) => /^P/i.test(part) || /(?:z|[+-]\d{2}:?\d{2})$/i.test(part));
  const forwards = [first, second].every(
    (part) => !/^P/i.test(part) || Duration.fromISO(part).toMillis() > 0,
  );
  const interval = Interval.fromISO(`${first}/${second}`, { zone: 'utc' });
  if (
    rest.length > 0 ||
    !zoned ||
    !forwards ||
    !interval.isValid ||
    interval.start === null ||
    interval.end === null
  )
    throw unreadable('forecast', `“${text}” is not a span of time.`);
  const span = { startMs: interval.start.toMillis(), endMs: interval.end.toMillis() };
  if (span.endMs <= span.startMs) throw unreadable('forecast', `“${text}” is an empty span of time.`);
  return span;
}
