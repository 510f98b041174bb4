import { ChangeDetectionStrategy, Component } from '@angular/core';

/** The mark: a sun over the bench, its beam a clock hand. Decorative; the name stands beside it. */
@Component({
  selector: 'db-brand-mark',
  template: `<svg
    viewBox="0 0 30 30"
    width="30"
    height="30"
    aria-hidden="true"
    fill="none"
    stroke-width="2.4"
  >
    <path d="M3 20h24" class="ground" stroke-linecap="round" />
    <path d="M7 20a8 8 0 0 1 16 0" class="sun" />
    <path d="M15 20c0-3 4-3 4-6" class="hand" stroke-linecap="round" />
    <path d="M8 24.5h14" class="ground" stroke-linecap="round" opacity=".35" />
  </svg>`,
  styles: `
    :host {
      display: inline-flex;
    }
    .ground {
      stroke: var(--db-ink);
    }
    .sun {
      stroke: var(--db-juniper);
    }
    .hand {
      stroke: var(--db-clay);
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class BrandMark {}
