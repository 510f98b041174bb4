import type * as z from 'zod';
import { notFound } from '@shared/errors';
import type { Deps } from '../deps';
import type { HistoryRecord } from '../history/history-service';
import type { Actor } from '../http/actor';
import { inputError } from '../http/problem';
import { checkVersion } from '../http/router';

/** What tells one kind of editable thing (counters, species, boxes) from another. */
export interface CatalogKind<New extends object, Full extends New & { id: number; version: number }> {
  readonly table: string;
  readonly subjectKind: HistoryRecord['subjectKind'];
  /** As it stands in messages, e.g. `The counter`. */
  readonly what: string;
  readonly order: readonly string[];
  readonly schema: z.ZodType<New>;
  toRow(value: New): Record<string, unknown>;
  fromRow(row: never): Full;
  nameOf(value: New): string;
  /** Rules that need other records; throws. `current` is null for a new one. */
  check?(tx: Deps, next: New, current: Full | null): Promise<void>;
}

export interface Catalog<New extends object, Full> {
  list(): Promise<Full[]>;
  /** Throws 404. */
  get(id: number): Promise<Full>;
  add(actor: Actor, body: New): Promise<Full>;
  /** Changes some fields; the whole must still keep the rules. Throws 400, 404, 412. */
  change(actor: Actor, id: number, ifMatch: number | null, patch: Partial<New>): Promise<Full>;
}

/** Reading and editing one kind of thing, with versions and history. */
export function createCatalog<New extends object, Full extends New & { id: number; version: number }>(
  deps: Deps,
  kind: CatalogKind<New, Full>,
): Catalog<New, Full> {
  const read = async ({ db }: Deps, id: number): Promise<Full> => {
    const row: unknown = await db(kind.table).where({ id }).first();
    if (!row) throw notFound(kind.what);
    return kind.fromRow(row as never);
  };
  const note = (tx: Deps, actor: Actor, after: Full, before: Full | null) =>
    tx.services.history.add({
      actorId: actor.id,
      actorName: actor.name,
      subjectKind: kind.subjectKind,
      subjectId: after.id,
      action: before ? 'changed' : 'added',
      text: `${kind.nameOf(after)} was ${before ? 'changed' : 'added'}.`,
      before: before ?? undefined,
      after,
    });
  return {
    async list() {
      const rows: unknown[] = await deps.db(kind.table).orderBy(kind.order.map((column) => ({ column })));
      return rows.map((row) => kind.fromRow(row as never));
    },
    get: (id) => read(deps, id),
    add: (actor, body) =>
      deps.transaction(async (tx) => {
        await kind.check?.(tx, body, null);
        const [id]: number[] = await tx.db(kind.table).insert(kind.toRow(body));
        const added = await read(tx, id ?? 0);
        await note(tx, actor, added, null);
        return added;
      }),
    change: (actor, id, ifMatch, patch) =>
      deps.transaction(async (tx) => {
        const current = await read(tx, id);
        checkVersion(ifMatch, current.version, current);
        const merged = kind.schema.safeParse({ ...current, ...patch });
        if (!merged.success) throw inputError(merged.error);
        await kind.check?.(tx, merged.data, current);
        await tx
          .db(kind.table)
          .where({ id })
          .update({ ...kind.toRow(merged.data), version: current.version + 1 });
        const changed = await read(tx, id);
        await note(tx, actor, changed, current);
        return changed;
      }),
  };
}
