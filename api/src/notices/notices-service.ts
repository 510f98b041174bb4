import { notFound } from '@shared/errors';
import type { Deps } from '../deps';
import { wake } from '../jobs/wake';
import { invitationsOf, type Invitation } from './invitation-queries';
import { countMails, failedMails, requeueMail } from './outbox-queries';
import { drainOutbox } from './outbox';
import {
  accountLink,
  arrivalReported,
  morningsSaid,
  parcelBooked,
  parcelCancelled,
  parcelCreated,
  parcelOnHold,
} from './tell-parcel';
import { leftTheRun, runCalledOff, runHandedOver, runPlanned } from './tell-run';
import { tokenOf } from './write-mail';

/** What happened, in the words of the service it happened in. The notices feature decides whom it concerns and writes the mails. */
export type NoticeEvent =
  | { kind: 'account-link'; personId: number; link: 'invitation' | 'reset'; url: string; expiresAt: string }
  | { kind: 'parcel-created'; parcelId: number }
  | { kind: 'parcel-booked'; parcelId: number }
  | { kind: 'parcel-on-hold'; parcelId: number; reason: string; shipDate: string | null }
  | { kind: 'parcel-cancelled'; parcelId: number; shipDate: string | null }
  | { kind: 'run-confirmed'; runId: number }
  | {
      kind: 'run-changed';
      runId: number;
      removedParcelIds: readonly number[];
      addedParcelIds: readonly number[];
      why: string;
    }
  | { kind: 'run-called-off'; runId: number; parcelIds: readonly number[]; reason: string }
  | { kind: 'run-handed-over'; runId: number }
  | { kind: 'mornings-said'; parcelId: number }
  | { kind: 'arrival-reported'; parcelId: number };

export interface NoticesService {
  /**
   * Writes the mails (and calendar invitations) that an event calls for into the outbox, in the present transaction.
   * `at` with the event makes the idempotency key: the same event told twice is sent once.
   */
  tell(event: NoticeEvent): Promise<void>;
  /** Sends what is due in the outbox; answers how many were sent and failed. Safe to run beside itself. */
  drain(): Promise<{ sent: number; failed: number }>;
  queue(): Promise<{ waiting: number; failed: number }>;
  failedMail(): Promise<{ id: number; to: string; subject: string; error: string; at: string }[]>;
  /** Everything a person was ever invited to, as it was last said: REQUEST stands, CANCEL was taken back. */
  invitationsOf(personId: number): Promise<Invitation[]>;
  /** Puts a failed mail back into the queue. Throws 404. */
  resend(id: number): Promise<void>;
}

/** Who hears of what, and the queue the mails wait in. */
export function createNoticesService(deps: Deps): NoticesService {
  const { services, db, clock } = deps;
  return {
    async tell(event) {
      switch (event.kind) {
        case 'account-link':
          return accountLink(deps, event);
        case 'parcel-created':
          return parcelCreated(deps, await services.parcels.get(event.parcelId));
        case 'parcel-booked':
          return parcelBooked(deps, await services.parcels.get(event.parcelId));
        case 'parcel-on-hold':
          return parcelOnHold(deps, await services.parcels.get(event.parcelId), event);
        case 'parcel-cancelled':
          return parcelCancelled(deps, await services.parcels.get(event.parcelId));
        case 'run-confirmed':
          return runPlanned(deps, await services.runs.get(event.runId), null);
        case 'run-changed': {
          const run = await services.runs.get(event.runId);
          await leftTheRun(deps, run, event.removedParcelIds, event.why);
          return runPlanned(deps, run, event.why);
        }
        case 'run-called-off':
          return runCalledOff(deps, await services.runs.get(event.runId), event);
        case 'run-handed-over':
          return runHandedOver(deps, await services.runs.get(event.runId));
        case 'mornings-said':
          return morningsSaid(deps, await services.parcels.get(event.parcelId));
        case 'arrival-reported': {
          const parcel = await services.parcels.get(event.parcelId);
          return arrivalReported(deps, parcel, tokenOf(parcel));
        }
      }
    },
    drain: () => drainOutbox(deps),
    queue: () => countMails(db),
    failedMail: () => failedMails(db, 100),
    invitationsOf: (personId) => invitationsOf(db, personId),
    async resend(id) {
      if (!(await requeueMail(db, id, clock.nowIso()))) throw notFound('That failed mail');
      deps.afterCommit(() => wake(deps.config, 'mail'));
    },
  };
}
