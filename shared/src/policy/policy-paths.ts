import { defaultPolicy, policySchema, type Policy } from './policy';

/** One value of the policy: a number, a text, or a list of texts, which counts as one value. */
export type PolicyValue = number | string | readonly string[];

/** Every value of a policy by its dotted path (`guardRails.hold.lowF`, `sigmaF.3`), in the order of the policy. */
export function policyValues(policy: Policy): ReadonlyMap<string, PolicyValue> {
  const found = new Map<string, PolicyValue>();
  walk(policy, '', found);
  return found;
}

/** The paths at which two policies differ. */
export function changedPaths(before: Policy, after: Policy): string[] {
  const old = policyValues(before);
  const now = policyValues(after);
  const paths = new Set([...old.keys(), ...now.keys()]);
  return [...paths].filter((path) => JSON.stringify(old.get(path)) !== JSON.stringify(now.get(path)));
}

/** Reads stored values; a version stored before a setting existed takes that setting's default. Throws ZodError. */
export function readPolicy(stored: unknown): Policy {
  return policySchema.parse(filled(defaultPolicy, stored));
}

function walk(value: unknown, path: string, found: Map<string, PolicyValue>): void {
  const at = (key: string | number): string => (path === '' ? String(key) : `${path}.${key}`);
  if (typeof value === 'number' || typeof value === 'string') found.set(path, value);
  else if (isTexts(value)) found.set(path, value);
  else if (Array.isArray(value)) value.forEach((one, index) => walk(one, at(index), found));
  else if (isRecord(value)) for (const [key, one] of Object.entries(value)) walk(one, at(key), found);
}

function filled(defaults: unknown, stored: unknown): unknown {
  if (!isRecord(defaults)) return stored ?? defaults;
  const own = isRecord(stored) ? stored : {};
  return Object.fromEntries(Object.entries(defaults).map(([key, value]) => [key, filled(value, own[key])]));
}

const isTexts = (value: unknown): value is readonly string[] =>
  Array.isArray(value) && value.every((one) => typeof one === 'string');
const isRecord = (value: unknown): value is Readonly<Record<string, unknown>> =>
  typeof value === 'object' && value !== null && !Array.isArray(value);
