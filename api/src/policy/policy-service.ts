import { defaultPolicy, policySchema, type Policy } from '@shared/policy/policy';
import type { Deps } from '../deps';

export interface PolicyService {
  /** The policy in force and the id of its version (null: the built-in default). */
  current(): Promise<{ id: number | null; policy: Policy }>;
}

interface PolicyRow {
  id: number;
  values: string;
}

/** The circle's settings; the newest stored version is in force. */
export function createPolicyService({ db }: Deps): PolicyService {
  return {
    async current() {
      const row = await db<PolicyRow>('policies').orderBy('id', 'desc').first();
      // A version stored before a setting existed takes that setting's default.
      if (row)
        return {
          id: row.id,
          policy: policySchema.parse({ ...defaultPolicy, ...(JSON.parse(row.values) as object) }),
        };
      return { id: null, policy: defaultPolicy };
    },
  };
}
