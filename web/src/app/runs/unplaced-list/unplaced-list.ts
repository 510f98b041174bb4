import { ChangeDetectionStrategy, Component, input, output } from '@angular/core';
import { MatButton } from '@angular/material/button';
import { MatIcon } from '@angular/material/icon';
import { MatMenuModule } from '@angular/material/menu';
import { RouterLink } from '@angular/router';
import type { Parcel, Run } from '@shared/contract';
import { DayLabelPipe } from '../../core/day-label-pipe';
import { runsFor } from '../run-actions';
import type { UnplacedItem } from '../unplaced-items';

/** What is not placed, with the reason and the cheapest help. */
@Component({
  selector: 'db-unplaced-list',
  imports: [DayLabelPipe, MatButton, MatIcon, MatMenuModule, RouterLink],
  template: `<section aria-labelledby="unplaced-heading">
    <h2 id="unplaced-heading">Not on a run</h2>
    @if (items().length === 0) {
      <p class="calm">Every open parcel has its run.</p>
    }
    <ul>
      @for (item of items(); track item.id) {
        <li>
          <a [routerLink]="['/parcels', item.id]">{{ item.title }}</a>
          <p>{{ item.text }}</p>
          @if (item.help; as help) {
            <p class="help">{{ help }}</p>
          }
          @if (choicesOf(item); as choices) {
            <button matButton type="button" class="put" [matMenuTriggerFor]="menu">
              Put on a run<span class="db-sr">: {{ item.title }}</span>
              <mat-icon iconPositionEnd svgIcon="chevron-down" aria-hidden="true" />
            </button>
            <mat-menu #menu="matMenu">
              @for (run of choices; track run.id) {
                <button
                  mat-menu-item
                  type="button"
                  (click)="item.parcel && wished.emit({ parcel: item.parcel, run })"
                >
                  {{ run.date | dayLabel: 'medium' }}, {{ run.coordinator.name }}
                </button>
              }
            </mat-menu>
          }
        </li>
      }
    </ul>
  </section>`,
  styles: `
    section {
      background: var(--db-paper);
      border: 1px solid var(--db-line);
      border-radius: 16px;
      padding: 15px 17px;
    }
    h2 {
      font-size: 15px;
      margin-bottom: 6px;
    }
    ul {
      list-style: none;
      margin: 0;
      padding: 0;
    }
    li {
      padding: 9px 0;
      border-top: 1px solid var(--db-line);
      font-size: 14px;
      line-height: 1.4;
    }
    a {
      font-weight: 500;
      color: var(--db-ink);
      text-underline-offset: 3px;
    }
    p {
      margin: 2px 0 0;
      font-size: 13px;
      color: var(--db-ink-2);
    }
    .help {
      color: var(--db-dusk);
    }
    .put {
      min-height: 44px;
      margin: 2px 0 -4px -12px;
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class UnplacedList {
  readonly items = input.required<readonly UnplacedItem[]>();
  /** The runs of the board, and its today: a parcel is offered those that could take it. */
  readonly runs = input<readonly Run[]>([]);
  readonly today = input('');
  readonly wished = output<{ parcel: Parcel; run: Run }>();

  /** Null rather than an empty list, so that the menu is not there at all. */
  protected choicesOf({ parcel }: UnplacedItem): Run[] | null {
    const runs = parcel ? runsFor(parcel, this.runs(), this.today()) : [];
    return runs.length > 0 ? runs : null;
  }
}
