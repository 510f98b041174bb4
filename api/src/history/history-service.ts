import type { HistoryEntry } from '@shared/contract';
import type { Deps } from '../deps';
import { wake } from '../jobs/wake';

export interface HistoryRecord {
  /** Null for the system itself (a recheck, a job). */
  readonly actorId: number | null;
  readonly actorName: string;
  readonly subjectKind: 'parcel' | 'run' | 'blackout' | 'person' | 'counter' | 'species' | 'box' | 'policy';
  readonly subjectId: number;
  readonly action: string;
  /** A sentence for people. */
  readonly text: string;
  readonly before?: unknown;
  readonly after?: unknown;
}

export interface HistoryService {
  /** Appends one entry; nothing ever changes or removes one. */
  add(record: HistoryRecord): Promise<void>;
  /** Newest first. */
  of(subjectKind: HistoryRecord['subjectKind'], subjectId: number): Promise<HistoryEntry[]>;
}

interface HistoryRow {
  id: number;
  at: string;
  actor_name: string;
  action: string;
  text: string;
}

/** The append-only record of who or what changed something. */
export function createHistoryService(deps: Deps): HistoryService {
  const { db, clock } = deps;
  return {
    async add(record) {
      await db('history').insert({
        at: clock.nowIso(),
        actor_id: record.actorId,
        actor_name: record.actorName,
        subject_kind: record.subjectKind,
        subject_id: record.subjectId,
        action: record.action,
        text: record.text,
        before: record.before === undefined ? null : JSON.stringify(record.before),
        after: record.after === undefined ? null : JSON.stringify(record.after),
      });
      deps.afterCommit(() => wake(deps.config, 'live'));
    },
    async of(subjectKind, subjectId) {
      const rows = await db<HistoryRow>('history')
        .where({ subject_kind: subjectKind, subject_id: subjectId } as never)
        .orderBy('id', 'desc')
        .limit(200);
      return rows.map((row) => ({
        id: row.id,
        at: row.at,
        who: row.actor_name,
        action: row.action,
        text: row.text,
      }));
    },
  };
}
