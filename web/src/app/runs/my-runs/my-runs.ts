import { ChangeDetectionStrategy, Component, computed, inject } from '@angular/core';
import { rxResource } from '@angular/core/rxjs-interop';
import { MatProgressBar } from '@angular/material/progress-bar';
import { RouterLink } from '@angular/router';
import type { Run } from '@shared/contract';
import { clock } from '../../core/dates';
import { DayLabelPipe } from '../../core/day-label-pipe';
import { SessionStore } from '../../core/session/session-store';
import { errorText } from '../../ui/call-state';
import { EmptyState } from '../../ui/empty-state/empty-state';
import { MoneyPipe } from '../../ui/money-pipe';
import { PageHeader } from '../../ui/page-header/page-header';
import { addDays, dateIn } from '../../ui/plain-dates';
import { ProblemNote } from '../../ui/problem-note/problem-note';
import { StateChip } from '../../ui/state-chip/state-chip';
import { RunsApi } from '../runs-api';

const daysBack = 21;
const daysAhead = 42;

/** A breeder's own collections: when the driver comes, which boxes must stand ready, what it costs them. */
@Component({
  selector: 'db-my-runs',
  imports: [
    DayLabelPipe,
    EmptyState,
    MatProgressBar,
    MoneyPipe,
    PageHeader,
    ProblemNote,
    RouterLink,
    StateChip,
  ],
  template: `<db-page-header
      heading="My collections"
      sub="When the driver comes to you, and which boxes have to stand ready."
    />
    <db-problem-note [message]="problem()" retry="Try again" (again)="loading.reload()" />
    @if (loading.isLoading()) {
      <mat-progress-bar mode="indeterminate" aria-label="Loading" />
    }
    @if (loading.hasValue()) {
      @for (group of groups(); track group.title) {
        <section [attr.aria-label]="group.title">
          <h2>{{ group.title }}</h2>
          @if (group.runs.length === 0) {
            <db-empty-state
              picture="road"
              heading="No collection is planned"
              text="Book a parcel onto a day, or leave its day open; a coordinator pools them into a run."
            />
          }
          <ul>
            @for (run of group.runs; track run.id) {
              <li class="db-sheet">
                <div class="head">
                  <a [routerLink]="['/runs', run.id]">{{ run.date | dayLabel }}</a>
                  <db-state-chip [run]="run.state" />
                </div>
                <p class="when">{{ comes(run) }}</p>
                <ul class="boxes">
                  @for (parcel of run.parcels; track parcel.id) {
                    <li>
                      <a [routerLink]="['/parcels', parcel.id]">{{ parcel.code }}</a> {{ parcel.what }} to
                      {{ parcel.destination }}, your share {{ parcel.shareCents | money }}
                    </li>
                  }
                </ul>
              </li>
            }
          </ul>
        </section>
      }
    }`,
  styles: `
    ul {
      list-style: none;
      margin: 12px 0 24px;
      padding: 0;
      display: grid;
      gap: 14px;
      grid-template-columns: repeat(auto-fill, minmax(min(100%, 340px), 1fr));
    }
    li.db-sheet {
      margin: 0;
    }
    .head {
      display: flex;
      flex-wrap: wrap;
      gap: 4px 12px;
      justify-content: space-between;
      align-items: center;
    }
    .head a {
      font-size: 19px;
      font-weight: 600;
      letter-spacing: -0.01em;
      color: var(--db-ink);
      text-underline-offset: 4px;
    }
    .when {
      margin: 6px 0;
    }
    .boxes {
      display: block;
      margin: 0;
    }
    .boxes li {
      padding: 4px 0;
      font-size: 14px;
    }
    .boxes a {
      display: inline-block;
      min-height: 24px;
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class MyRuns {
  private readonly api = inject(RunsApi);
  private readonly today = dateIn(inject(SessionStore).circleZone(), new Date());
  protected readonly loading = rxResource({
    stream: () => this.api.list(addDays(this.today, -daysBack), addDays(this.today, daysAhead)),
  });
  protected readonly problem = computed(() => errorText(this.loading.error()));
  protected readonly groups = computed(() => {
    const runs = this.loading.hasValue()
      ? this.loading.value().filter((run) => run.state !== 'called-off')
      : [];
    const coming = runs.filter((run) => run.date >= this.today);
    const past = runs.filter((run) => run.date < this.today).reverse();
    return [
      { title: 'Coming', runs: coming },
      ...(past.length > 0 ? [{ title: 'Past three weeks', runs: past }] : []),
    ];
  });

  protected comes(run: Run): string {
    const stop = run.stops[0];
    const driver = run.coordinator.name;
    if (!stop) return `${driver} drives.`;
    const at = clock(stop.arriveAt, run.zone);
    if (run.state === 'underway') return `${driver} was planned at ${at} and is on the way to the counter.`;
    return run.state === 'handed-over' || run.state === 'closed'
      ? `${driver} was planned at ${at}; it is handed over.`
      : `${driver} comes at about ${at}.`;
  }
}
