import type { Reason } from '../contract/days';
import { reasonText } from './reason-text';

/** A reason without its sentence. */
export type DraftReason = Omit<Reason, 'text'>;

/** A look at one side of a day: every reason it finds, good or bad. */
export type Check<Facts> = (facts: Facts) => DraftReason[];

/** Gives a reason its sentence. */
export const worded = (reason: DraftReason): Reason => ({ ...reason, text: reasonText(reason) });
