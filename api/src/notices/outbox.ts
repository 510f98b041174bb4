import { randomUUID } from 'node:crypto';
import type { Deps } from '../deps';
import { publicHost } from './addresses';
import { backOffMinutes, maxAttempts } from './back-off';
import type { Mailbox } from './calendar-text';
import { wake } from '../jobs/wake';
import { claimMails, insertMail, settleMail, type CalendarPart, type ClaimedMail } from './outbox-queries';
import { createMailSender, type MailSender } from './smtp';
import type { Letter } from './templates/letter';
import { oneLine } from './words';

export interface Mail {
  /** One effect, one key: posting it again is ignored. */
  readonly key: string;
  readonly to: Mailbox;
  readonly letter: Letter;
  readonly calendar?: CalendarPart | null;
}

/** RFC 5321 4.5.3.1.3 allows 254 characters; no spaces, brackets or commas that could make it more than one address. */
const usable = /^[^\s<>,;:"()[\]\\@]{1,64}@[^\s<>,;:"()[\]\\@]{1,190}$/;

/**
 * Puts a mail into the outbox, in the present transaction; it goes out after the commit. An address that cannot be one
 * is filed as failed, so that the admin's desk shows it and the change that caused the mail still stands.
 */
export async function post(deps: Deps, mail: Mail): Promise<void> {
  const { config, clock, db } = deps;
  const error = usable.test(mail.to.email) ? null : 'That is not an e-mail address that mail can be sent to.';
  await insertMail(
    db,
    {
      key: mail.key,
      toEmail: oneLine(mail.to.email),
      toName: oneLine(mail.to.name),
      subject: oneLine(mail.letter.subject),
      text: mail.letter.text,
      html: mail.letter.html,
      calendar: mail.calendar ?? null,
      messageId: `<${randomUUID()}@${publicHost(config)}>`,
    },
    clock.nowIso(),
    error,
  );
  deps.afterCommit(() => wake(config, 'mail'));
}

/** A claim older than this belonged to a process that stopped. */
const claimMinutes = 5;
/** Few at a time: even if each takes its whole deadline, a batch ends well within its claim. */
const batchSize = 5;
const batchesADrain = 100;

/**
 * Sends what is due. Claiming and filing are single statements and nothing is awaited from the network inside a
 * transaction. `goOn` is asked between batches.
 */
export async function drainOutbox(
  deps: Deps,
  goOn: () => boolean = () => true,
): Promise<{ sent: number; failed: number }> {
  const total = { sent: 0, failed: 0 };
  let mailSender: MailSender | null = null;
  try {
    for (let batch = 0; batch < batchesADrain && goOn(); batch++) {
      const mails = await claim(deps);
      if (mails.length === 0) break;
      mailSender ??= createMailSender(deps.config);
      const from = mailSender;
      const results = await Promise.all(mails.map((mail) => sendOne(deps, from, mail)));
      total.sent += results.filter((result) => result === 'sent').length;
      total.failed += results.filter((result) => result === 'failed').length;
      if (results.includes('unreachable')) break;
    }
  } finally {
    mailSender?.close();
  }
  return total;
}

function claim({ db, clock }: Deps): Promise<ClaimedMail[]> {
  const staleBefore = new Date(clock.nowMs() - claimMinutes * 60_000).toISOString();
  return claimMails(db, clock.nowIso(), staleBefore, { count: batchSize, maxAttempts });
}

async function sendOne(
  { db, clock, log }: Deps,
  from: MailSender,
  mail: ClaimedMail,
): Promise<'sent' | 'failed' | 'later' | 'unreachable'> {
  const result = await from.send(mail);
  if (result.ok) {
    await settleMail(db, mail, { state: 'sent', at: clock.nowIso() });
    return 'sent';
  }
  const { error } = result;
  const given = result.permanent || mail.attempts >= maxAttempts;
  log.warn({ mail: mail.id, attempt: mail.attempts, error, given }, 'a mail was not sent');
  if (given) {
    await settleMail(db, mail, { state: 'failed', error });
    return 'failed';
  }
  const nextAttemptAt = new Date(clock.nowMs() + backOffMinutes(mail.attempts) * 60_000).toISOString();
  await settleMail(db, mail, { state: 'waiting', error, nextAttemptAt });
  return result.unreachable ? 'unreachable' : 'later';
}
