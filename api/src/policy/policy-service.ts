import type { PolicyAnswer, PolicyVersion, PolicyVersionSummary } from '@shared/contract';
import { notFound } from '@shared/errors';
import { defaultPolicy, type Policy } from '@shared/policy/policy';
import { policyNote } from '@shared/policy/policy-notes';
import { changedPaths } from '@shared/policy/policy-paths';
import type { Deps } from '../deps';
import type { Actor } from '../http/actor';
import { checkVersion } from '../http/router';
import { addPolicy, allPolicies, newestPolicy, policyById, type StoredPolicy } from './policy-queries';

export interface PolicyService {
  /** The policy in force and the id of its version (null: the built-in default). */
  current(): Promise<{ id: number | null; policy: Policy }>;
  /** The policy in force with its defaults and all versions, newest first. */
  read(): Promise<PolicyAnswer>;
  /** One stored version. Throws 404. */
  version(id: number): Promise<PolicyVersion>;
  /** Puts a whole policy in force as a new version; the same values again change nothing. Throws 412. */
  replace(actor: Actor, ifMatch: number | null, values: Policy): Promise<PolicyAnswer>;
}

const builtIn: PolicyVersion = { version: 0, since: null, by: null, values: defaultPolicy };

/** The circle's settings; the newest stored version is in force. */
export function createPolicyService(deps: Deps): PolicyService {
  return {
    async current() {
      const newest = await newestPolicy(deps.db);
      return newest ? { id: newest.id, policy: newest.values } : { id: null, policy: defaultPolicy };
    },
    read: () => readAll(deps),
    async version(id) {
      const found = await policyById(deps.db, id);
      if (!found) throw notFound('That version of the policy');
      return toVersion(found);
    },
    replace: (actor, ifMatch, values) =>
      deps.transaction(async (tx) => {
        const now = await readAll(tx);
        checkVersion(ifMatch, now.version, now);
        const changed = changedPaths(now.values, values);
        if (changed.length === 0) return now;
        const id = await addPolicy(tx.db, values, tx.clock.nowIso(), actor.id);
        await tx.services.history.add({
          actorId: actor.id,
          actorName: actor.name,
          subjectKind: 'policy',
          subjectId: id,
          action: 'changed',
          text: changeText(changed),
          before: now.values,
          after: values,
        });
        return readAll(tx);
      }),
  };
}

async function readAll({ db }: Deps): Promise<PolicyAnswer> {
  const stored = (await allPolicies(db)).map(toVersion);
  const known = [builtIn, ...stored];
  const versions = known.map((one, index): PolicyVersionSummary => {
    const { version, since, by, values } = one;
    return { version, since, by, changed: changedPaths(known[index - 1]?.values ?? values, values) };
  });
  return { ...(stored.at(-1) ?? builtIn), defaults: defaultPolicy, versions: versions.toReversed() };
}

const toVersion = ({ id, since, by, values }: StoredPolicy): PolicyVersion => ({
  version: id,
  since,
  by,
  values,
});

/** "Policy changed: Open from, Tight from and 3 more." */
function changeText(paths: readonly string[]): string {
  const labels = paths.slice(0, 4).map((path) => policyNote(path).label);
  const more = paths.length - labels.length;
  return `Policy changed: ${labels.join(', ')}${more > 0 ? ` and ${more} more` : ''}.`;
}
