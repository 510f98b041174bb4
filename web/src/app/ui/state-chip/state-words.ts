import type { ParcelState, RunState } from '@shared/contract';

export type Tone = 'juniper' | 'ochre' | 'slate' | 'dusk' | 'clay' | 'plain';
export interface StateWord {
  readonly word: string;
  readonly tone: Tone;
  /** Name of an icon of ours. */
  readonly icon: string;
}

/** How each parcel state reads: word, tone and glyph; the word alone must do. */
export const parcelWords: Readonly<Record<ParcelState, StateWord>> = {
  draft: { word: 'no day yet', tone: 'plain', icon: 'edit' },
  seeking: { word: 'day left open', tone: 'dusk', icon: 'search' },
  booked: { word: 'booked', tone: 'juniper', icon: 'calendar' },
  packed: { word: 'packed', tone: 'juniper', icon: 'box' },
  aboard: { word: 'aboard', tone: 'juniper', icon: 'van' },
  'handed-over': { word: 'handed over', tone: 'juniper', icon: 'counter' },
  arrived: { word: 'arrived', tone: 'juniper', icon: 'check' },
  closed: { word: 'closed', tone: 'slate', icon: 'check' },
  'on-hold': { word: 'on hold', tone: 'ochre', icon: 'warn' },
  cancelled: { word: 'cancelled', tone: 'slate', icon: 'close' },
};

/** How each run state reads. */
export const runWords: Readonly<Record<RunState, StateWord>> = {
  proposed: { word: 'proposed', tone: 'dusk', icon: 'edit' },
  confirmed: { word: 'confirmed', tone: 'juniper', icon: 'check' },
  underway: { word: 'under way', tone: 'juniper', icon: 'van' },
  'handed-over': { word: 'handed over', tone: 'juniper', icon: 'counter' },
  closed: { word: 'closed', tone: 'slate', icon: 'check' },
  'called-off': { word: 'called off', tone: 'slate', icon: 'close' },
};
