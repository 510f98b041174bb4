import type * as z from 'zod';
import { AppError } from '../errors';

/** The error of every parser here: the service answered, but not in a shape we know how to read. */
export const unreadable = (what: string, why: string): AppError =>
  new AppError('forecast-unavailable', `The ${what} from the forecast service cannot be read: ${why}`);

/** Parses `json` by `schema`; throws `forecast-unavailable` that names the first member in the wrong shape. */
export function readShape<S extends z.ZodType>(schema: S, json: unknown, what: string): z.output<S> {
  const result = schema.safeParse(json);
  if (result.success) return result.data;
  const first = result.error.issues[0];
  const path = first && first.path.length > 0 ? `${first.path.join('.')}: ` : '';
  throw unreadable(what, `${path}${first?.message ?? 'unknown shape'}.`);
}

/** An instant with its offset as UTC epoch ms; throws `forecast-unavailable` when it is none. */
export function readInstant(text: string, what: string): number {
  // Without an offset the text would be read on this machine's clock.
  const ms = /(?:[zZ]|[+-]\d{2}:?\d{2})$/.test(text) ? Date.parse(text) : Number.NaN;
  if (Number.isNaN(ms)) throw unreadable(what, `“${text}” is not an instant with an offset.`);
  return ms;
}
