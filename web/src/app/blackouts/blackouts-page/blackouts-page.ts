import { BreakpointObserver } from '@angular/cdk/layout';
import {
  ApplicationRef,
  ChangeDetectionStrategy,
  Component,
  computed,
  ElementRef,
  inject,
  linkedSignal,
  signal,
} from '@angular/core';
import { rxResource, toSignal } from '@angular/core/rxjs-interop';
import { MatButton, MatIconButton } from '@angular/material/button';
import { MatIcon } from '@angular/material/icon';
import { MatProgressBar } from '@angular/material/progress-bar';
import { RouterLink } from '@angular/router';
import { map } from 'rxjs';
import type { BlackoutList } from '@shared/contract';
import { DayLabelPipe } from '../../core/day-label-pipe';
import { SessionStore } from '../../core/session/session-store';
import { errorText } from '../../ui/call-state';
import { EmptyState } from '../../ui/empty-state/empty-state';
import { NextAction } from '../../ui/next-action/next-action';
import { PageHeader } from '../../ui/page-header/page-header';
import { addMonths, dateIn, endOfMonth, monthText } from '../../ui/plain-dates';
import { ProblemNote } from '../../ui/problem-note/problem-note';
import { scopeIcons, scopeText } from '../blackout-words';
import { BlackoutsApi, type ScopeNames } from '../blackouts-api';
import { MonthCalendar } from '../month-calendar/month-calendar';
import { RuleList } from '../rule-list/rule-list';

const noNames: ScopeNames = { carriers: [], counters: [] };

/** The calendar: months with the days nothing is shipped, the rules behind them beside it. All read, an admin edits. */
@Component({
  selector: 'db-blackouts-page',
  imports: [
    DayLabelPipe,
    EmptyState,
    MatButton,
    MatIcon,
    MatIconButton,
    MatProgressBar,
    MonthCalendar,
    NextAction,
    PageHeader,
    ProblemNote,
    RouterLink,
    RuleList,
  ],
  templateUrl: './blackouts-page.html',
  styleUrl: './blackouts-page.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class BlackoutsPage {
  private readonly api = inject(BlackoutsApi);
  private readonly session = inject(SessionStore);
  private readonly host = inject<ElementRef<HTMLElement>>(ElementRef);
  private readonly app = inject(ApplicationRef);

  protected readonly icons = scopeIcons;
  protected readonly canEdit = computed(() => this.session.has('admin'));
  protected readonly today = dateIn(this.session.circleZone(), new Date());
  protected readonly chosen = signal(this.today);
  protected readonly first = signal(this.today.slice(0, 7));
  private readonly isWide = toSignal(
    inject(BreakpointObserver)
      .observe('(min-width: 1000px)')
      .pipe(map((state) => state.matches)),
    { initialValue: false },
  );
  protected readonly months = computed(() =>
    this.isWide() ? [this.first(), addMonths(this.first(), 1)] : [this.first()],
  );
  protected readonly span = computed(() => this.months().map(monthText).join(' and '));
  /** A year at a time, with the months that touch it, so that turning pages does not wait. */
  private readonly year = computed(() => Number(this.first().slice(0, 4)));
  private readonly listed = rxResource({
    params: () => this.year(),
    stream: ({ params }) => this.api.list(`${params - 1}-12-01`, endOfMonth(`${params + 1}-02`)),
  });
  private readonly named = rxResource({ stream: () => this.api.names() });
  protected readonly names = computed(() => (this.named.hasValue() ? this.named.value() : noNames));
  protected readonly isLoading = computed(() => this.listed.isLoading());
  protected readonly problem = computed(() => errorText(this.listed.error() ?? this.named.error()));
  /** The rules stay in view while the next year's days are fetched. */
  protected readonly list = linkedSignal<BlackoutList | null, BlackoutList | null>({
    source: () => (this.listed.hasValue() ? this.listed.value() : null),
    computation: (now, before) => now ?? before?.value ?? null,
  });
  protected readonly onChosen = computed(() => {
    const list = this.list();
    const ids = list?.days.filter(({ date }) => date === this.chosen()).map(({ blackoutId }) => blackoutId);
    return (list?.blackouts ?? [])
      .filter(({ id }) => ids?.includes(id))
      .map((blackout) => ({ blackout, scope: scopeText(blackout, this.names()) }));
  });

  protected turn(months: number): void {
    this.show(addMonths(this.first(), months));
    this.chosen.set(`${this.first()}-01`);
  }

  protected goToday(): void {
    this.show(this.today.slice(0, 7));
    this.chosen.set(this.today);
  }

  protected choose({ date, byKey }: { date: string; byKey: boolean }): void {
    const month = date.slice(0, 7);
    if (!this.months().includes(month))
      this.show(month < this.first() ? month : addMonths(month, 1 - this.months().length));
    this.chosen.set(date);
    if (!byKey) return;
    // Keys come faster than frames: the new day has to stand there, focused, before the next key arrives.
    this.app.tick();
    this.host.nativeElement.querySelector<HTMLElement>(`[data-date="${date}"]`)?.focus();
  }

  protected again(): void {
    this.listed.reload();
    this.named.reload();
  }

  private show(month: string): void {
    this.first.set(month);
  }
}
