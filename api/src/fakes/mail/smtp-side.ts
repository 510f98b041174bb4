import { SMTPServer } from 'smtp-server';

/** How mails are refused: try again later (451), never (550), or the line goes dead before the answer (421). */
export type Mood = 'temporary' | 'permanent' | 'drop';

export interface Refusals {
  /** The next `count` mails are refused in this way. */
  reject(mood: Mood, count: number): void;
  /** Uses one refusal up if one is due. `data`: the whole mail is here already. */
  next(data: boolean): Error | null;
}

/** Refusals to come, in the reply codes of RFC 5321 4.2.3. */
export function createRefusals(): Refusals {
  let mood: Mood = 'temporary';
  let left = 0;
  return {
    reject(nextMood, count) {
      mood = nextMood;
      left = count;
    },
    next(data) {
      if (left <= 0 || (mood === 'drop') !== data) return null;
      left -= 1;
      if (mood === 'drop') return refusal('The line went dead', 421);
      return mood === 'permanent' ? refusal('No such mailbox', 550) : refusal('Try again later', 451);
    },
  };
}

const refusal = (message: string, responseCode: number) =>
  Object.assign(new Error(message), { responseCode });

/** An SMTP server that takes everything the refusals let through and hands it to `keep`. */
export function createSmtpSide(
  refusals: Refusals,
  keep: (raw: Buffer, to: readonly string[]) => Promise<void>,
): SMTPServer {
  const smtp = new SMTPServer({
    authOptional: true,
    disabledCommands: ['STARTTLS'],
    disableReverseLookup: true,
    onRcptTo: (_address, _session, done) => done(refusals.next(false)),
    onData: (stream, session, done) => {
      const chunks: Buffer[] = [];
      stream.on('data', (chunk: Buffer) => chunks.push(chunk));
      stream.on('end', () => {
        const error = refusals.next(true);
        if (error) return done(error);
        const to = session.envelope.rcptTo.map((one) => one.address);
        keep(Buffer.concat(chunks), to).then(
          () => done(),
          (thrown: unknown) => done(thrown instanceof Error ? thrown : new Error(String(thrown))),
        );
      });
    },
  });
  // A client that goes away in the middle is the client's affair.
  smtp.on('error', () => undefined);
  return smtp;
}
