import { ChangeDetectionStrategy, Component } from '@angular/core';

/** The picture of the signed-out pages: hills at first light and the road to the counter. Decorative. */
@Component({
  selector: 'db-first-light',
  template: `<svg viewBox="0 0 640 900" preserveAspectRatio="xMidYMax slice" aria-hidden="true">
    <rect width="640" height="900" class="sky" />
    <circle cx="330" cy="560" r="236" class="glow" />
    <circle cx="330" cy="560" r="150" class="glow" />
    <circle cx="330" cy="560" r="84" class="sun" />
    <path class="far" d="M0 560c80-70 130-40 200-76s150-28 220 24 150 10 220 44v348H0z" />
    <path class="mid" d="M0 640c110-60 190-10 280-30s150-70 230-34 90 40 130 30v294H0z" />
    <path class="near" d="M0 742c120-50 220-20 330-8s210-62 310-22v188H0z" />
    <path class="road" d="M262 900c30-70 116-86 116-128s-74-34-60-66 62-24 76-56-28-36-20-62" />
    <path class="house" d="M420 724v-34l26-20 26 20v34zM438 724v-18h16v18" />
    <path
      class="plant"
      d="M96 760c0-40-6-64-24-84M96 760c4-44 18-60 36-70M96 760c-2-30-26-44-44-46M560 770c0-34 8-52 22-66M560 770c-4-36-16-48-32-56"
    />
  </svg>`,
  styles: `
    :host {
      display: block;
      overflow: hidden;
    }
    svg {
      display: block;
      width: 100%;
      height: 100%;
    }
    .sky {
      fill: light-dark(#f3e6d3, #182229);
    }
    .glow {
      fill: light-dark(#f0d3b4, #2a2f33);
      opacity: 0.5;
    }
    .sun {
      fill: none;
      stroke: var(--db-juniper);
      stroke-width: 7;
    }
    .far {
      fill: light-dark(#bfd3cb, #1d3837);
    }
    .mid {
      fill: light-dark(#86ada5, #1a3032);
    }
    .near {
      fill: light-dark(#1f6f68, #123230);
    }
    .road {
      fill: none;
      stroke: light-dark(#f6e9d4, #e58a5c);
      stroke-width: 9;
      stroke-linecap: round;
      stroke-dasharray: 1 20;
    }
    .house {
      fill: var(--db-paper);
      stroke: var(--db-ink);
      stroke-width: 4;
      stroke-linejoin: round;
    }
    .plant {
      fill: none;
      stroke: light-dark(#d9ebe7, #6fc3b7);
      stroke-width: 5;
      stroke-linecap: round;
      opacity: 0.7;
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class FirstLight {}
