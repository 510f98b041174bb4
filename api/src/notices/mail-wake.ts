import type { Config } from '../config';

/** Keyed by the configuration, the one object that a site and its transactions share. */
const listeners = new WeakMap<Config, Set<() => void>>();

/** Calls `wake` whenever the site of this configuration has put mail into its outbox; the answer ends that. */
export function onMail(config: Config, wake: () => void): () => void {
  const set = listeners.get(config) ?? new Set();
  listeners.set(config, set.add(wake));
  return () => void set.delete(wake);
}

/** Says that mail is waiting. Call it after the commit. */
export function mailWaits(config: Config): void {
  for (const wake of listeners.get(config) ?? []) wake();
}
