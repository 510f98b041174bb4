import { ChangeDetectionStrategy, Component, input, output } from '@angular/core';
import { MatButtonToggleModule } from '@angular/material/button-toggle';
import type { Arrival } from '@shared/contract';
import { DayLabelPipe } from '../../core/day-label-pipe';

export interface MorningSaid {
  readonly date: string;
  readonly suits: boolean;
}

/** The mornings in question, each with the buyer's word; an answer counts at once. */
@Component({
  selector: 'db-mornings-choice',
  imports: [DayLabelPipe, MatButtonToggleModule],
  template: `<ul>
    @for (morning of mornings(); track morning.date) {
      <li>
        <span class="day" [id]="'morning-' + morning.date">{{ morning.date | dayLabel: 'medium' }}</span>
        <mat-button-toggle-group
          hideSingleSelectionIndicator
          [attr.aria-labelledby]="'morning-' + morning.date"
          [value]="morning.suits"
          [disabled]="disabled()"
          (change)="said.emit({ date: morning.date, suits: $event.value })"
        >
          <mat-button-toggle [value]="true">{{
            morning.suits === true ? '✓ Suits' : 'Suits'
          }}</mat-button-toggle>
          <mat-button-toggle [value]="false">{{
            morning.suits === false ? '✕ Cannot' : 'Cannot'
          }}</mat-button-toggle>
        </mat-button-toggle-group>
        @if (!morning.offered) {
          <span class="off">not offered now</span>
        }
      </li>
    }
  </ul>`,
  styles: `
    ul {
      list-style: none;
      padding: 0;
      margin: 0;
    }
    li {
      display: grid;
      grid-template-columns: minmax(104px, 1fr) auto;
      align-items: center;
      gap: 2px 12px;
      padding: 8px 0;
      border-top: 1px solid var(--db-line);
    }
    .day {
      font-weight: 500;
    }
    .off {
      grid-column: 1 / -1;
      font-size: 13px;
      color: var(--db-ink-2);
    }
    mat-button-toggle-group {
      --mat-button-toggle-height: 44px;
      --mat-button-toggle-shape: var(--db-radius-s);
    }
    mat-button-toggle {
      min-width: 96px;
      text-align: center;
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class MorningsChoice {
  readonly mornings = input.required<Arrival['mornings']>();
  readonly disabled = input(false);
  readonly said = output<MorningSaid>();
}
