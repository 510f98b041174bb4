import { tzlib_get_ical_block } from 'timezones-ical-library';

const known = new Map<string, string | null>();

/**
 * The VTIMEZONE component of an IANA zone (CRLF lines), or null where there is none under exactly that name: a TZID
 * without its VTIMEZONE would break RFC 5545, so such times are written in UTC.
 */
export function timeZoneBlock(zone: string): string | null {
  const cached = known.get(zone);
  if (cached !== undefined) return cached;
  const answer = tzlib_get_ical_block(zone);
  const block = Array.isArray(answer) ? (answer[0] ?? '') : '';
  const result = block.includes(`\r\nTZID:${zone}\r\n`) ? block : null;
  known.set(zone, result);
  return result;
}
