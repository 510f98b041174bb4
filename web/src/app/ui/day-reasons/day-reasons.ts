import { ChangeDetectionStrategy, Component, computed, input } from '@angular/core';
import type { DayVerdict, TemperatureUnit } from '@shared/contract';
import { ageText, clock, dateAt, dayLabel } from '../../core/dates';
import { sentenceInUnit } from '../../core/temperature';
import { chanceText } from '../chance-text';
import { VerdictChip } from '../verdict-chip/verdict-chip';
import { VerdictGlyph } from '../verdict-glyph/verdict-glyph';
import { emphasis } from './emphasis';

/** One day: its verdict, the planned arrival and every reason with its numbers, the deciding ones first. */
@Component({
  selector: 'db-day-reasons',
  imports: [VerdictChip, VerdictGlyph],
  template: `<h3>{{ title() }}</h3>
    <p class="line">
      <db-verdict-chip [verdict]="day().verdict" />
      @if (arrival(); as text) {
        <span>{{ text }}</span>
      }
    </p>
    @if (chance(); as text) {
      <p class="chance">{{ text }}</p>
    }
    <ul>
      @for (reason of reasons(); track $index) {
        <li [attr.data-verdict]="reason.verdict">
          <db-verdict-glyph [verdict]="reason.verdict" />
          <span>
            @for (piece of reason.pieces; track $index) {
              <span [class.number]="piece.isNumber">{{ piece.text }}</span>
            }
            <span class="db-sr"> ({{ reason.verdict }})</span>
          </span>
        </li>
      }
    </ul>
    @if (age(); as text) {
      <p class="age">{{ text }}</p>
    }`,
  styleUrl: './day-reasons.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class DayReasons {
  readonly day = input.required<DayVerdict>();
  readonly unit = input<TemperatureUnit>('F');
  /** Minutes since the oldest forecast used was issued; null without any. */
  readonly forecastAgeMinutes = input<number | null>(null);

  protected readonly title = computed(() => dayLabel(this.day().date));
  protected readonly arrival = computed(() => {
    const { verdict, arrival } = this.day();
    if (verdict === 'shut') return null;
    return `ready ${dayLabel(dateAt(arrival.at, arrival.zone), 'weekday')} at ${clock(arrival.at, arrival.zone)}, ${arrival.place}`;
  });
  /** How sure it is, as planned and a day late. */
  protected readonly chance = computed(() => {
    const { verdict, chance, lateChance } = this.day();
    if (chance === null) return null;
    const late = lateChance === null ? '' : ` If it comes a day late: endured ${chanceText(lateChance)}.`;
    // A shut day is not safe, however well the box would do.
    const head = verdict === 'shut' ? 'By the box alone: in its band' : 'Safe';
    return `${head} ${chanceText(chance)}.${late}`;
  });
  protected readonly reasons = computed(() =>
    this.day().reasons.map(({ verdict, text }) => ({
      verdict,
      pieces: emphasis(sentenceInUnit(text, this.unit())),
    })),
  );
  protected readonly age = computed(() => {
    const minutes = this.forecastAgeMinutes();
    if (minutes === null || this.day().forecastAt === null) return null;
    return minutes < 2 ? 'Forecast issued just now.' : `Oldest forecast used: ${ageText(minutes)} old.`;
  });
}
