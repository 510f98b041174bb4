import { ChangeDetectionStrategy, Component, computed, inject } from '@angular/core';
import { rxResource } from '@angular/core/rxjs-interop';
import { MatProgressBar } from '@angular/material/progress-bar';
import { RouterLink } from '@angular/router';
import { DayLabelPipe } from '../../core/day-label-pipe';
import { errorText } from '../../ui/call-state';
import { EmptyState } from '../../ui/empty-state/empty-state';
import { PageHeader } from '../../ui/page-header/page-header';
import { ProblemNote } from '../../ui/problem-note/problem-note';
import { statusWords } from '../arrival-words';
import { ArrivalsApi } from '../arrivals-api';

/** A signed-in buyer's arrivals, what is still to come first. */
@Component({
  selector: 'db-my-arrivals',
  imports: [DayLabelPipe, EmptyState, MatProgressBar, PageHeader, ProblemNote, RouterLink],
  template: `<db-page-header heading="My arrivals" sub="What is on its way to you, and what has come." />
    <db-problem-note [message]="problem()" retry="Try again" (again)="loading.reload()" />
    @if (loading.isLoading()) {
      <mat-progress-bar mode="indeterminate" aria-label="Loading" />
    }
    @if (loading.hasValue()) {
      @if (arrivals().length === 0) {
        <db-empty-state
          picture="counter"
          heading="Nothing is on its way to you"
          text="When a breeder enters a parcel for you, it stands here and you get a mail."
        />
      }
      <ul>
        @for (arrival of arrivals(); track arrival.token) {
          <li class="db-sheet">
            <a [routerLink]="['/arrival', arrival.token]">
              <span class="day">{{
                arrival.arrivalDate ? (arrival.arrivalDate | dayLabel) : words[arrival.status]
              }}</span>
              <span>{{ arrival.what }}, {{ arrival.code }}</span>
              <span class="soft">{{ arrival.place }}</span>
              @if (arrival.arrivalDate) {
                <span class="soft">{{ words[arrival.status] }}</span>
              }
            </a>
          </li>
        }
      </ul>
    }`,
  styles: `
    ul {
      list-style: none;
      padding: 0;
      margin: 0;
      display: grid;
      gap: 14px;
      grid-template-columns: repeat(auto-fill, minmax(min(100%, 320px), 1fr));
    }
    li.db-sheet {
      padding: 0;
      margin: 0;
    }
    a {
      display: grid;
      gap: 2px;
      padding: 18px 20px;
      color: var(--db-ink);
      text-decoration: none;
      border-radius: var(--db-radius);
    }
    a:hover .day {
      text-decoration: underline;
      text-underline-offset: 4px;
    }
    .day {
      font-size: 20px;
      font-weight: 600;
      letter-spacing: -0.01em;
    }
    .day::first-letter {
      text-transform: uppercase;
    }
    .soft {
      color: var(--db-ink-2);
      font-size: 13.5px;
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class MyArrivals {
  private readonly api = inject(ArrivalsApi);
  protected readonly loading = rxResource({ stream: () => this.api.own() });
  protected readonly problem = computed(() => errorText(this.loading.error()));
  protected readonly words = statusWords;
  protected readonly arrivals = computed(() => {
    const all = this.loading.hasValue() ? this.loading.value() : [];
    const isOver = (status: string) => status === 'arrived' || status === 'cancelled';
    const key = (one: (typeof all)[number]) => `${isOver(one.status) ? 1 : 0}${one.arrivalDate ?? '9999'}`;
    return all.toSorted((a, b) => key(a).localeCompare(key(b)));
  });
}
