import { ChangeDetectionStrategy, Component, computed, input } from '@angular/core';
import { MatIcon } from '@angular/material/icon';
import type { ParcelState, RunState } from '@shared/contract';
import { parcelWords, runWords, type StateWord } from './state-words';

/** The state of a parcel or a run with glyph and word: `<db-state-chip [parcel]="state" />` or `[run]`. */
@Component({
  selector: 'db-state-chip',
  imports: [MatIcon],
  template: `<mat-icon [svgIcon]="shown().icon" aria-hidden="true" />{{ shown().word }}`,
  host: { '[attr.data-tone]': 'shown().tone' },
  styles: `
    :host {
      display: inline-flex;
      align-items: center;
      gap: 6px;
      white-space: nowrap;
      font-weight: 600;
      font-size: 13.5px;
      line-height: 1.4;
      padding: 3px 11px 3px 8px;
      border-radius: 99px;
      color: var(--db-ink-2);
      box-shadow: inset 0 0 0 1px var(--db-outline);
    }
    mat-icon {
      width: 16px;
      height: 16px;
    }
    :host([data-tone='juniper']) {
      background: var(--db-juniper-soft);
      color: var(--db-juniper);
      box-shadow: none;
    }
    :host([data-tone='ochre']) {
      background: var(--db-ochre-soft);
      color: var(--db-ochre);
      box-shadow: none;
    }
    :host([data-tone='slate']) {
      background: var(--db-slate-soft);
      color: var(--db-slate);
      box-shadow: none;
    }
    :host([data-tone='dusk']) {
      background: var(--db-dusk-soft);
      color: var(--db-dusk);
      box-shadow: none;
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class StateChip {
  readonly parcel = input<ParcelState>();
  /** A run state; the contract leaves room for later ones. */
  readonly run = input<string>();

  protected readonly shown = computed<StateWord>(() => {
    const parcel = this.parcel();
    if (parcel) return parcelWords[parcel];
    const run = this.run() ?? '';
    return isRunState(run) ? runWords[run] : { word: run, tone: 'plain', icon: 'info' };
  });
}

const isRunState = (text: string): text is RunState => text in runWords;
