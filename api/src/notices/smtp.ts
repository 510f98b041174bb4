import nodemailer from 'nodemailer';
import type { Config } from '../config';
import { sender } from './addresses';
import type { OutboxMail } from './outbox-queries';
import { oneLine } from './words';

/** How a sending ended. `permanent`: trying again cannot help; `unreachable`: neither would any other mail get through. */
export type SendResult =
  | { readonly ok: true }
  | {
      readonly ok: false;
      readonly error: string;
      readonly permanent: boolean;
      readonly unreachable: boolean;
    };

export interface MailSender {
  send(mail: OutboxMail): Promise<SendResult>;
  close(): void;
}

/** Nothing waits longer than this for one mail, whatever the mail host does; a claim lasts five minutes. */
const deadlineMs = 45_000;

/** A pooled SMTP sender for one drain. */
export function createMailSender(config: Config): MailSender {
  const transport = nodemailer.createTransport({
    url: config.SMTP_URL,
    pool: true,
    maxConnections: 2,
    connectionTimeout: 10_000,
    greetingTimeout: 10_000,
    socketTimeout: 20_000,
    disableFileAccess: true,
    disableUrlAccess: true,
  });
  return {
    async send(mail) {
      try {
        await withDeadline(transport.sendMail(message(config, mail)));
        return { ok: true };
      } catch (thrown) {
        return failure(thrown);
      }
    },
    close: () => transport.close(),
  };
}

function message(config: Config, mail: OutboxMail) {
  const from = sender(config);
  return {
    from: { name: from.name, address: from.email },
    to: { name: oneLine(mail.toName), address: mail.toEmail },
    subject: oneLine(mail.subject),
    text: mail.text,
    html: mail.html,
    messageId: mail.messageId,
    headers: { 'Auto-Submitted': 'auto-generated' },
    alternatives: mail.calendar
      ? [
          {
            contentType: `text/calendar; method=${mail.calendar.method}; charset=UTF-8`,
            content: mail.calendar.text,
          },
        ]
      : [],
  };
}

interface SmtpError {
  readonly code?: string;
  readonly command?: string;
  readonly responseCode?: number;
}

function failure(thrown: unknown): SendResult {
  const { code, command, responseCode } = thrown as SmtpError;
  const error = oneLine(thrown instanceof Error ? thrown.message : String(thrown)).slice(0, 300);
  // RFC 5321 4.2.1: a 5yz reply says not to repeat the command. Only for the recipient or the message itself is that
  // about this mail; a refused sign-in or sender is a setting that somebody may correct.
  const refused = responseCode !== undefined && responseCode >= 500 && responseCode < 600;
  const aboutThisMail = command === 'RCPT TO' || command === 'DATA' || code === 'EMESSAGE';
  const unreachable =
    code === 'ECONNECTION' ||
    code === 'EDNS' ||
    code === 'ETIMEDOUT' ||
    code === 'ESOCKET' ||
    code === 'EAUTH';
  return { ok: false, error, permanent: refused && aboutThisMail, unreachable };
}

async function withDeadline<T>(work: Promise<T>): Promise<T> {
  let timer: NodeJS.Timeout | undefined;
  const late = new Promise<never>((_, reject) => {
    timer = setTimeout(
      () => reject(Object.assign(new Error('The mail host took too long.'), { code: 'ETIMEDOUT' })),
      deadlineMs,
    );
  });
  try {
    return await Promise.race([work, late]);
  } finally {
    clearTimeout(timer);
  }
}
