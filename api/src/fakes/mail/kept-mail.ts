import { simpleParser, type ParsedMail } from 'mailparser';

/** A mail as the mailbox keeps it. */
export interface KeptMail {
  readonly id: number;
  readonly at: string;
  readonly from: string;
  readonly to: readonly string[];
  readonly subject: string;
  readonly text: string;
  readonly html: string;
  readonly calendar: string | null;
  readonly messageId: string;
  readonly raw: string;
}

/** Reads a mail as it came over the wire; `to` are the recipients of the envelope. */
export async function keptMail(id: number, raw: Buffer, to: readonly string[]): Promise<KeptMail> {
  return toKept(id, await simpleParser(raw), to, raw.toString('utf8'));
}

function toKept(id: number, parsed: ParsedMail, to: readonly string[], raw: string): KeptMail {
  const calendar = parsed.attachments.find((one) => one.contentType === 'text/calendar');
  return {
    id,
    at: (parsed.date ?? new Date(0)).toISOString(),
    from: parsed.from?.text ?? '',
    to,
    subject: parsed.subject ?? '',
    text: parsed.text ?? '',
    html: parsed.html === false ? '' : (parsed.html ?? ''),
    calendar: calendar ? calendar.content.toString('utf8') : null,
    messageId: parsed.messageId ?? '',
    raw,
  };
}
