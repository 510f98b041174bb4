import { ChangeDetectionStrategy, Component, computed, input, output } from '@angular/core';
import { MatIcon } from '@angular/material/icon';
import type { Blackout, BlackoutList } from '@shared/contract';
import { longDate, monthText } from '../../ui/plain-dates';
import { weekdays } from '../../ui/weekdays';
import { scopeIcons, scopeText } from '../blackout-words';
import type { ScopeNames } from '../blackouts-api';
import { calendarMonth, dateForKey, type CalendarDay } from '../calendar-grid';

const sundayFirst = [...weekdays.slice(6), ...weekdays.slice(0, 6)];

/** One month as a grid of days with the blackouts as named bars. The arrow keys move the chosen day (WAI-ARIA grid). */
@Component({
  selector: 'db-month-calendar',
  imports: [MatIcon],
  templateUrl: './month-calendar.html',
  styleUrl: './month-calendar.scss',
  host: { '(keydown)': 'onKey($event)' },
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class MonthCalendar {
  readonly month = input.required<string>();
  readonly list = input.required<BlackoutList>();
  readonly names = input.required<ScopeNames>();
  readonly today = input.required<string>();
  /** The chosen day; the only one the Tab key reaches. */
  readonly chosen = input.required<string>();
  /** A day was chosen; `byKey` when the focus has to follow it. */
  readonly choose = output<{ date: string; byKey: boolean }>();

  protected readonly weekdays = sundayFirst;
  protected readonly icons = scopeIcons;
  protected readonly title = computed(() => monthText(this.month()));
  protected readonly weeks = computed(() => calendarMonth(this.month(), this.list(), this.today()).weeks);
  /** The month in words under a grid too narrow for titles: each blackout once, with its days. */
  protected readonly legend = computed(() => {
    const days = this.list().days.filter(({ date }) => date.startsWith(this.month()));
    return this.list()
      .blackouts.flatMap((blackout) => {
        const own = days
          .filter(({ blackoutId }) => blackoutId === blackout.id)
          .map(({ date }) => Number(date.slice(8)));
        const [first, last] = [own[0], own.at(-1)];
        if (first === undefined || last === undefined) return [];
        const isRun = last - first === own.length - 1;
        return [
          {
            blackout,
            first,
            days: first === last ? String(first) : isRun ? `${first}–${last}` : own.join(', '),
          },
        ];
      })
      .toSorted((a, b) => a.first - b.first);
  });

  protected onKey(event: KeyboardEvent): void {
    const date = dateForKey(this.chosen(), event.key);
    if (!date) return;
    event.preventDefault();
    this.choose.emit({ date, byKey: true });
  }

  protected label(day: CalendarDay): string {
    const closed = day.bars.map(({ blackout }) => `${blackout.title} (${scopeText(blackout, this.names())})`);
    const parts = [longDate(day.date), ...(day.isToday ? ['today'] : [])];
    return [...parts, closed.length > 0 ? `closed: ${closed.join('; ')}` : 'no blackout'].join(', ');
  }

  protected scope(bar: { readonly blackout: Blackout }): string {
    return scopeText(bar.blackout, this.names());
  }
}
