import { ChangeDetectionStrategy, Component, computed, input, linkedSignal, output } from '@angular/core';
import { MatProgressBar } from '@angular/material/progress-bar';
import type { DaysAnswer, TemperatureUnit } from '@shared/contract';
import { dayLabel } from '../../core/dates';
import { ProblemNote } from '../problem-note/problem-note';
import { BoxTrace } from './box-trace';

/** The box trace of one day on a sheet of its own; nothing at all while no day has one. */
@Component({
  selector: 'db-trace-sheet',
  imports: [BoxTrace, MatProgressBar, ProblemNote],
  template: `@if (shown() || isLoading() || problem()) {
    <section class="db-sheet" aria-labelledby="trace-heading">
      <h2 id="trace-heading">What the animal will feel</h2>
      @if (isLoading()) {
        <mat-progress-bar mode="indeterminate" aria-label="Working out the journey" />
      }
      <db-problem-note [message]="problem()" retry="Ask again" (again)="again.emit()" />
      @if (shown(); as one) {
        <p class="db-hint">{{ one.title }}</p>
        <db-box-trace [rows]="one.rows" [band]="one.band" [endurance]="one.endurance" [unit]="unit()" />
      }
    </section>
  }`,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class TraceSheet {
  /** The answer of one day asked for with its trace; null without one. */
  readonly answer = input.required<DaysAnswer | null>();
  readonly unit = input<TemperatureUnit>('F');
  readonly isLoading = input(false);
  readonly problem = input<string | null>(null);
  readonly again = output();

  private readonly traced = computed(() => {
    const answer = this.answer();
    const day = answer?.days[0];
    if (!answer || !day?.trace || day.trace.length < 2) return null;
    return {
      title: `The air in the box hour by hour when shipped on ${dayLabel(day.date)}, by the clock of each place.`,
      rows: day.trace,
      band: answer.band,
      endurance: answer.endurance ?? null,
    };
  });
  /** The last picture stays while the next one is on its way. */
  protected readonly shown = linkedSignal<Traced, Traced>({
    source: () => this.traced(),
    computation: (now, before) => (this.isLoading() ? (now ?? before?.value ?? null) : now),
  });
}

interface TracedDay {
  readonly title: string;
  readonly rows: NonNullable<DaysAnswer['days'][number]['trace']>;
  readonly band: DaysAnswer['band'];
  readonly endurance: DaysAnswer['band'];
}
type Traced = TracedDay | null;
