import { ChangeDetectionStrategy, Component, computed, input } from '@angular/core';
import type { Species, TemperatureUnit } from '@shared/contract';
import { rangeText, temperatureText } from '../../core/temperature';

/** The scale of the bar, in °F; wide enough for any outdoor day that is worth drawing. */
const scale = { lowF: 30, highF: 110 };
const width = 320;
const marks = [32, 50, 68, 86, 104];

type Band = Pick<
  Species,
  'bandLowF' | 'bandHighF' | 'enduranceLowF' | 'enduranceHighF' | 'outdoorLowF' | 'outdoorHighF'
>;

/** Where a temperature stands on the bar; what lies beyond the scale stands at its end. */
export function bandX(valueF: number): number {
  const inside = Math.min(scale.highF, Math.max(scale.lowF, valueF));
  return Math.round(((inside - scale.lowF) / (scale.highF - scale.lowF)) * width * 10) / 10;
}

/** A species' band as a thick bar in its thinner endurance band, with its own outdoor limits as ticks. */
@Component({
  selector: 'db-band-bar',
  template: `<svg [attr.viewBox]="'0 0 ' + width + ' 58'" role="img" [attr.aria-label]="words()">
    <line class="axis" x1="0" [attr.x2]="width" y1="38" y2="38" />
    @for (mark of marks(); track mark.x) {
      <line class="axis" [attr.x1]="mark.x" [attr.x2]="mark.x" y1="36" y2="41" />
      <text [attr.x]="mark.x" y="55">{{ mark.text }}</text>
    }
    <rect
      class="endurance"
      [attr.x]="x().eLow"
      [attr.width]="x().eHigh - x().eLow"
      y="17"
      height="8"
      rx="4"
    />
    <rect class="band" [attr.x]="x().low" [attr.width]="x().high - x().low" y="11" height="20" rx="6" />
    @for (tick of ticks(); track tick) {
      <path class="tick" [attr.d]="'M' + tick + ' 4v34'" />
    }
  </svg>`,
  styles: `
    :host {
      display: block;
    }
    svg {
      display: block;
      width: 100%;
      max-width: 420px;
      overflow: visible;
    }
    .axis {
      stroke: var(--db-outline);
    }
    text {
      font-size: 12px;
      text-anchor: middle;
      fill: var(--db-ink-2);
    }
    .endurance {
      fill: var(--db-ochre-soft);
      stroke: var(--db-ochre);
    }
    .band {
      fill: var(--db-juniper);
    }
    .tick {
      stroke: var(--db-clay);
      stroke-width: 2.5;
      stroke-dasharray: 3 3;
      fill: none;
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class BandBar {
  readonly species = input.required<Band>();
  readonly unit = input.required<TemperatureUnit>();

  protected readonly width = width;
  protected readonly x = computed(() => {
    const band = this.species();
    return {
      low: bandX(band.bandLowF),
      high: bandX(band.bandHighF),
      eLow: bandX(band.enduranceLowF),
      eHigh: bandX(band.enduranceHighF),
    };
  });
  protected readonly ticks = computed(() =>
    [this.species().outdoorLowF, this.species().outdoorHighF].filter((limit) => limit !== null).map(bandX),
  );
  protected readonly marks = computed(() =>
    marks.map((valueF) => ({ x: bandX(valueF), text: temperatureText(valueF, this.unit()) })),
  );
  protected readonly words = computed(() => {
    const { bandLowF, bandHighF, enduranceLowF, enduranceHighF } = this.species();
    const band = rangeText({ lowF: bandLowF, highF: bandHighF }, this.unit());
    return `Band ${band}, endurance band ${rangeText({ lowF: enduranceLowF, highF: enduranceHighF }, this.unit())}`;
  });
}
