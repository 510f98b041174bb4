import type { Response } from 'express';
import { liveEvents, type LiveChange } from '@shared/contract';

/** Who listens: a person with a session, or the holder of one arrival's link. */
export type Listener =
  | {
      readonly kind: 'person';
      readonly personId: number;
      readonly sessionEpoch: number;
      readonly sessionId: string;
    }
  | { readonly kind: 'arrival'; readonly parcelId: number };

export interface Connection {
  readonly listener: Listener;
  readonly res: Response;
}

/** A slow reader is let go at this many unread bytes; the browser comes back by itself and asks for what it missed. */
const mostUnreadBytes = 64 * 1024;

/** Begins the stream: proxies must neither keep nor pack it, and the browser waits three seconds before it comes back. */
export function openStream(res: Response): void {
  res.status(200).set({
    'Content-Type': 'text/event-stream; charset=utf-8',
    'Cache-Control': 'no-store, no-transform',
    'X-Accel-Buffering': 'no',
  });
  res.flushHeaders();
  res.write('retry: 3000\n\n');
}

/** `historyId` null: something that leaves no trace in the history, so that nobody can ask for it later. */
export function sendChange({ res }: Connection, historyId: number | null, change: LiveChange): void {
  const name = historyId === null ? '' : `id: ${historyId}\n`;
  write(res, `${name}event: ${liveEvents.change}\ndata: ${JSON.stringify(change)}\n\n`);
}

/** What was missed is more than can be told: the page reads anew what it shows. */
export function sendMissed({ res }: Connection, historyId: number): void {
  write(res, `id: ${historyId}\nevent: ${liveEvents.missed}\ndata: {}\n\n`);
}

/** A comment line: it keeps proxies from closing a quiet stream, and finds out that nobody is there any more. */
export const sendBeat = ({ res }: Connection): void => write(res, ':\n\n');

/** Ends a stream; the page must not come back by itself when its session is over. */
export function endStream({ res }: Connection, over: boolean): void {
  if (over) write(res, `event: ${liveEvents.over}\ndata: {}\n\n`);
  res.end();
}

function write(res: Response, text: string): void {
  if (res.writableEnded || res.destroyed) return;
  if (res.writableLength > mostUnreadBytes) res.destroy();
  else res.write(text);
}
