import type { Deps } from '../deps';

/** What happened, in the words of the service it happened in. The notices feature decides whom it concerns and writes the mails. */
export type NoticeEvent =
  | { kind: 'account-link'; personId: number; link: 'invitation' | 'reset'; url: string; expiresAt: string }
  | { kind: 'parcel-created'; parcelId: number }
  | { kind: 'parcel-booked'; parcelId: number }
  | { kind: 'parcel-on-hold'; parcelId: number; reason: string; shipDate: string | null }
  | { kind: 'parcel-cancelled'; parcelId: number; shipDate: string | null }
  | { kind: 'run-confirmed'; runId: number }
  | { kind: 'run-changed'; runId: number; removedParcelIds: readonly number[]; addedParcelIds: readonly number[]; why: string }
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
  /** Puts a failed mail back into the queue. Throws 404. */
  resend(id: number): Promise<void>;
}

export function createNoticesService(deps: Deps): NoticesService {
  throw new Error(`not built yet ${deps.config.PORT}`);
}
