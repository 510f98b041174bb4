import type { Config } from '../config';

/** What a job may wait for: mail in the outbox, or something that happened and that open pages want to hear of. */
export type WakeFor = 'mail' | 'live';

/** Keyed by the configuration, the one object that a site and its transactions share. */
const listeners = new WeakMap<Config, Map<WakeFor, Set<() => void>>>();

/** Calls `listener` whenever the site of this configuration says that there is something of the kind; the answer ends that. */
export function onWake(config: Config, what: WakeFor, listener: () => void): () => void {
  const kinds = listeners.get(config) ?? new Map<WakeFor, Set<() => void>>();
  const set = kinds.get(what) ?? new Set();
  listeners.set(config, kinds.set(what, set.add(listener)));
  return () => void set.delete(listener);
}

/** Says that there is something. Call it after the commit. */
export function wake(config: Config, what: WakeFor): void {
  for (const listener of listeners.get(config)?.get(what) ?? []) listener();
}
