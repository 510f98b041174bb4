import { ChangeDetectionStrategy, Component, computed, input } from '@angular/core';
import { sketchMap, type MapPlace } from './run-map-geometry';

const size = { width: 480, height: 330, padding: 42 };

/** A run's places in road order, drawn to scale. The list of stops says the same in words, so the picture is one image. */
@Component({
  selector: 'db-run-map',
  template: `<svg
    [attr.viewBox]="'0 0 ' + size.width + ' ' + size.height"
    role="img"
    [attr.aria-label]="label()"
  >
    <path class="grid" [attr.d]="sketch().grid" />
    <path class="road" [attr.d]="sketch().path" />
    @for (arrow of sketch().arrows; track $index) {
      <path
        class="arrow"
        d="M-5 -6L5 0L-5 6"
        [attr.transform]="'translate(' + arrow.x + ' ' + arrow.y + ') rotate(' + arrow.angle + ')'"
      />
    }
    @for (point of sketch().points; track $index) {
      @switch (point.kind) {
        @case ('start') {
          <circle class="start" [attr.cx]="point.x" [attr.cy]="point.y" r="6" />
        }
        @case ('stop') {
          <circle class="stop" [attr.cx]="point.x" [attr.cy]="point.y" r="11" />
          <text class="seq" [attr.x]="point.x" [attr.y]="point.y + 5" text-anchor="middle">
            {{ point.seq }}
          </text>
        }
        @case ('counter') {
          <rect class="counter" [attr.x]="point.x - 9" [attr.y]="point.y - 9" width="18" height="18" rx="4" />
        }
      }
      <text class="name" [attr.x]="point.labelX" [attr.y]="point.labelY" [attr.text-anchor]="point.anchor">
        {{ point.name }}
      </text>
    }
    @if (sketch().scale; as scale) {
      <path class="scale" [attr.d]="'M16 ' + (size.height - 16) + 'h' + scale.length" />
      <text class="small" x="16" [attr.y]="size.height - 24">{{ scale.miles }} mi</text>
    }
  </svg>`,
  styles: `
    :host {
      display: block;
      margin-top: 12px;
    }
    svg {
      display: block;
      width: 100%;
      height: auto;
      background: var(--db-oat);
      border-radius: var(--db-radius-s);
    }
    .road {
      fill: none;
      stroke: var(--db-juniper);
      stroke-width: 2.5;
      stroke-dasharray: 1 7;
      stroke-linecap: round;
    }
    .grid {
      fill: none;
      stroke: var(--db-line);
      stroke-width: 1;
    }
    .arrow {
      fill: none;
      stroke: var(--db-juniper);
      stroke-width: 2.4;
      stroke-linecap: round;
      stroke-linejoin: round;
    }
    .start {
      fill: var(--db-paper);
      stroke: var(--db-ink-2);
      stroke-width: 2.4;
    }
    .stop {
      fill: var(--db-juniper);
      stroke: var(--db-oat);
      stroke-width: 3;
    }
    .counter {
      fill: var(--db-clay);
    }
    text {
      font-family: 'Work Sans', sans-serif;
      fill: var(--db-ink);
      font-size: 14px;
    }
    .name {
      paint-order: stroke;
      stroke: var(--db-oat);
      stroke-width: 4px;
      stroke-linejoin: round;
    }
    .seq {
      fill: var(--db-on-juniper);
      font-weight: 600;
      font-size: 14px;
    }
    .scale {
      stroke: var(--db-ink-2);
      stroke-width: 2;
    }
    .small {
      font-size: 13px;
      fill: var(--db-ink-2);
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class RunMap {
  /** Start, stops in road order, counter. */
  readonly places = input.required<readonly MapPlace[]>();
  protected readonly size = size;
  protected readonly sketch = computed(() => sketchMap(this.places(), size));
  protected readonly label = computed(
    () =>
      `Sketch map: ${this.places()
        .map((place) => place.name)
        .join(', then ')}.`,
  );
}
