import * as z from 'zod';
import { policySchema } from '../policy/policy';
import { instant } from './common';

export { policyChange } from '../policy/policy-change';

const madeBy = {
  /** The id of the version; 0 while the circle has never changed what the program came with. */
  version: z.number().int().min(0),
  since: instant.nullable(),
  /** Who saved it; null for the values the program came with and for the system. */
  by: z.string().nullable(),
};

/** One stored version of the policy; a member that came later than the version has its default. */
export const policyVersion = z.object({ ...madeBy, values: policySchema });
export type PolicyVersion = z.infer<typeof policyVersion>;

/** What the list of versions says about each: the dotted paths at which it differs from the one before. */
export const policyVersionSummary = z.object({ ...madeBy, changed: z.array(z.string()) });
export type PolicyVersionSummary = z.infer<typeof policyVersionSummary>;

/** The policy in force, what the program came with, and all versions, newest first. */
export const policyAnswer = policyVersion.extend({
  defaults: policySchema,
  versions: z.array(policyVersionSummary),
});
export type PolicyAnswer = z.infer<typeof policyAnswer>;
