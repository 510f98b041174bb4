import ICAL from 'ical.js';
import { simpleParser, type Attachment, type ParsedMail } from 'mailparser';
import { createMailFake, type MailFake } from '@api/fakes/mail/mail-fake';
import { createTestSite, type TestSite, type TestSiteOptions } from './test-site';

export interface ReceivedMail {
  readonly to: readonly string[];
  readonly raw: string;
  readonly parsed: ParsedMail;
  readonly invitation: ReceivedInvitation | null;
}

/** The text/calendar part of a mail, read by ical.js. */
export interface ReceivedInvitation {
  /** The MIME parameters of the part. */
  readonly mime: { readonly value: string; readonly params: Readonly<Record<string, string>> };
  readonly text: string;
  readonly calendar: ICAL.Component;
  readonly vevent: ICAL.Component;
  readonly event: ICAL.Event;
}

export interface MailSite {
  readonly site: TestSite;
  readonly fake: MailFake;
  /** Drains the outbox and answers what has arrived since the last call, oldest first. */
  receive(): Promise<ReceivedMail[]>;
  close(): Promise<void>;
}

/** A test site whose mail goes over a real SMTP connection to the mail fake on a free port. */
export async function createMailSite(options: TestSiteOptions = {}): Promise<MailSite> {
  const fake = createMailFake();
  const { smtpUrl } = await fake.listen({ smtpPort: 0, httpPort: 0 });
  const site = await createTestSite({ ...options, env: { SMTP_URL: smtpUrl, ...options.env } });
  let seen = 0;
  return {
    site,
    fake,
    async receive() {
      await site.deps.services.notices.drain();
      const fresh = fake.messages().filter((mail) => mail.id > seen);
      seen = Math.max(seen, ...fresh.map((mail) => mail.id));
      return Promise.all(fresh.toReversed().map(({ raw, to }) => readMail(raw, to)));
    },
    async close() {
      await site.close();
      await fake.close();
    },
  };
}

/** Reads one mail as it came over the wire. */
export async function readMail(raw: string, to: readonly string[]): Promise<ReceivedMail> {
  const parsed = await simpleParser(raw);
  const part = parsed.attachments.find((one) => one.contentType === 'text/calendar');
  return { to, raw, parsed, invitation: part ? readInvitation(part) : null };
}

function readInvitation(part: Attachment): ReceivedInvitation {
  const text = part.content.toString('utf8');
  const calendar = new ICAL.Component(ICAL.parse(text));
  const vevent = calendar.getFirstSubcomponent('vevent');
  if (!vevent) throw new Error('The invitation has no event.');
  for (const vtimezone of calendar.getAllSubcomponents('vtimezone')) {
    const zone = new ICAL.Timezone(vtimezone);
    ICAL.TimezoneService.register(zone, zone.tzid);
  }
  return {
    mime: part.headers.get('content-type') as unknown as ReceivedInvitation['mime'],
    text,
    calendar,
    vevent,
    event: new ICAL.Event(vevent),
  };
}

/** The mail to one address; fails unless there is exactly one. */
export function onlyMailTo(mails: readonly ReceivedMail[], email: string): ReceivedMail {
  const own = mails.filter((mail) => mail.to.includes(email));
  if (own.length !== 1) throw new Error(`${email} got ${own.length} mails.`);
  return own[0] as ReceivedMail;
}

/** The invitation to one address; fails unless there is exactly one mail with one. */
export function invitationTo(mails: readonly ReceivedMail[], email: string): ReceivedInvitation {
  const { invitation } = onlyMailTo(mails, email);
  if (!invitation) throw new Error(`The mail to ${email} carries no invitation.`);
  return invitation;
}

/** A property's first value as text. */
export const textOf = (component: ICAL.Component, name: string): string =>
  String(component.getFirstPropertyValue(name) ?? '');

/** An iCalendar time as a UTC ISO instant, by the VTIMEZONE in the message. */
export const instantOf = (time: ICAL.Time): string => time.toJSDate().toISOString();
