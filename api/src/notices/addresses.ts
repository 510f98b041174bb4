import type { Config } from '../config';
import type { Mailbox } from './calendar-text';

/** MAIL_FROM (`Name <address>` or an address) taken apart; it is also the ORGANIZER of every invitation. */
export function sender(config: Config): Mailbox {
  const match = /^(.*?)\s*<([^<>]+)>$/.exec(config.MAIL_FROM.trim());
  if (!match) return { name: 'Dayberth', email: config.MAIL_FROM.trim() };
  const name = (match[1] ?? '').replace(/^"(.*)"$/, '$1').trim();
  return { name: name === '' ? 'Dayberth' : name, email: match[2] ?? '' };
}

/** The host that people reach the site under: the right-hand side of calendar UIDs and message ids. */
export const publicHost = (config: Config): string => new URL(config.PUBLIC_URL).hostname;

/** A page's address, e.g. `pageUrl(config, '/parcels/7')`. */
export const pageUrl = (config: Config, path: string): string =>
  `${config.PUBLIC_URL.replace(/\/+$/, '')}${path}`;
