import type { PolicyVersionSummary } from '@shared/contract';
import { policyNote } from '@shared/policy/policy-notes';

/** Who made a version: a person, the program itself, or somebody unknown. */
export function makerText({ version, by }: PolicyVersionSummary): string {
  if (version === 0) return 'came with the program';
  return by ?? 'the system';
}

/** What a version changed, by the labels of its values. */
export function changesText({ version, changed }: PolicyVersionSummary): string {
  if (version === 0) return 'All defaults.';
  if (changed.length === 0) return 'Nothing changed.';
  return `${changed.map((path) => policyNote(path).label).join('; ')}.`;
}
