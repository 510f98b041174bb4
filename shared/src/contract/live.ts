import * as z from 'zod';
import { id } from './common';

export const liveKinds = [
  'parcel',
  'run',
  'blackout',
  'person',
  'counter',
  'species',
  'box',
  'policy',
  'meeting-place',
  'solve',
  'recheck',
] as const;
export const liveKind = z.enum(liveKinds);
export type LiveKind = z.infer<typeof liveKind>;

/** Something changed. A hint and nothing more: what it is now is read by the ordinary call, with its own rule of who may. */
export const liveChange = z.object({ kind: liveKind, id });
export type LiveChange = z.infer<typeof liveChange>;

/** Names of the events in a stream: what changed; too much was missed to tell, so read anew; the session is over. */
export const liveEvents = { change: 'change', missed: 'missed', over: 'over' } as const;
