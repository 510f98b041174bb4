import { ChangeDetectionStrategy, Component, input } from '@angular/core';
import type { Verdict } from '@shared/contract';

/** The sign of a verdict: ring, half ring, bar, dotted ring. Decorative: its word always stands beside it. */
@Component({
  selector: 'db-verdict-glyph',
  template: `<svg
    viewBox="0 0 16 16"
    width="16"
    height="16"
    aria-hidden="true"
    fill="none"
    stroke="currentColor"
    stroke-width="2.2"
  >
    @switch (verdict()) {
      @case ('open') {
        <circle cx="8" cy="8" r="5.5" />
      }
      @case ('tight') {
        <path d="M2.5 8a5.5 5.5 0 0 1 11 0M2.5 11h11" />
      }
      @case ('shut') {
        <path d="M2 8h12" stroke-width="3" />
      }
      @default {
        <circle cx="8" cy="8" r="5.5" stroke-width="1.6" stroke-dasharray="2.2 2.6" />
      }
    }
  </svg>`,
  styles: `
    :host {
      display: inline-flex;
      flex: none;
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class VerdictGlyph {
  readonly verdict = input.required<Verdict>();
}
