import * as z from 'zod';

/** A plain calendar date, `YYYY-MM-DD`, that exists (no 31 February) and that a person may mean: 1900 to 2199. */
export const plainDate = z
  .string()
  .regex(/^\d{4}-\d{2}-\d{2}$/, 'Use a date like 2026-12-08.')
  .refine((text) => {
    const [year = 0, month = 0, day = 0] = text.split('-').map(Number);
    const leap = year % 4 === 0 && (year % 100 !== 0 || year % 400 === 0);
    const lengths = [31, leap ? 29 : 28, 31, 30, 31, 30, 31, 31, 30, 31, 30, 31];
    return month >= 1 && month <= 12 && day >= 1 && day <= (lengths[month - 1] ?? 0);
  }, 'That date does not exist.')
  .refine((text) => /^(19|20|21)/.test(text), 'Use a year from 1900 to 2199.');

/** An instant as UTC ISO 8601 text, e.g. `2026-12-08T22:00:00.000Z`. */
export const instant = z.iso.datetime({ offset: true, message: 'Use an ISO 8601 instant.' });

export const id = z.number().int().positive();
/** An id as it stands in a path; anything that is not a positive whole number is simply not found. */
export const idParams = z.object({ id: z.coerce.number().int().positive() });

export const email = z
  .email({ message: 'Enter an e-mail address like name@example.org.' })
  .max(254, 'An e-mail address has at most 254 characters.')
  .transform((text) => text.toLowerCase());

/** A one-line text a person typed: trimmed, no control characters, 1 to `max` characters. */
export const line = (max: number, what = 'This') =>
  z
    .string({ error: `${what} is missing.` })
    .trim()
    .min(1, `${what} is missing.`)
    .max(max, `${what} has at most ${max} characters.`)
    // eslint-disable-next-line no-control-regex -- control characters are exactly what is refused: they could forge mail headers
    .regex(/^[^\u0000-\u001f\u007f]*$/, `${what} has a character that is not allowed.`);

/** A longer text with line breaks, possibly empty. */
export const prose = (max: number) => z.string().trim().max(max, `At most ${max} characters.`);

export const zipCode = z
  .string()
  .trim()
  .regex(/^\d{5}$/, 'A ZIP code has five digits.');
export const stateCode = z
  .string()
  .trim()
  .toUpperCase()
  .regex(/^[A-Z]{2}$/, 'Use the two-letter state.');
export const latitude = z.number().min(-90).max(90);
export const longitude = z.number().min(-180).max(180);
/** An IANA zone name, checked by the runtime's own table. */
export const zone = z.string().refine((name) => {
  try {
    new Intl.DateTimeFormat('en-US', { timeZone: name });
    return true;
  } catch {
    return false;
  }
}, 'That time zone is not known.');
/** Minutes after local midnight, 0 to 1440. */
export const minuteOfDay = z.number().int().min(0).max(1440);
/** ISO weekday, 1 = Monday to 7 = Sunday. */
export const weekday = z.number().int().min(1).max(7);
export const version = z.number().int().positive();
export const cents = z.number().int();

export const roles = ['breeder', 'coordinator', 'buyer', 'admin'] as const;
export const role = z.enum(roles);
export type Role = z.infer<typeof role>;

export const service = z.enum(['hold', 'door']);
export type Service = z.infer<typeof service>;

/** A position with a name and the clock of that place. */
export const place = z.object({ name: z.string(), city: z.string(), state: z.string(), zone: z.string() });
export type Place = z.infer<typeof place>;
