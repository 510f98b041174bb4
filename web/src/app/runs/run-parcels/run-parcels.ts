import { DecimalPipe } from '@angular/common';
import { ChangeDetectionStrategy, Component, input, output } from '@angular/core';
import { MatIconButton } from '@angular/material/button';
import { MatIcon } from '@angular/material/icon';
import { MatMenuModule } from '@angular/material/menu';
import { RouterLink } from '@angular/router';
import type { Run, RunParcel } from '@shared/contract';
import { DayLabelPipe } from '../../core/day-label-pipe';
import { MoneyPipe } from '../../ui/money-pipe';
import { VerdictChip } from '../../ui/verdict-chip/verdict-chip';

export type ParcelWish = 'pin' | 'unpin' | 'take-off';

/** The parcels of a run with their share; those who plan it may pin one or take it off. */
@Component({
  selector: 'db-run-parcels',
  imports: [
    DayLabelPipe,
    DecimalPipe,
    MatIcon,
    MatIconButton,
    MatMenuModule,
    MoneyPipe,
    RouterLink,
    VerdictChip,
  ],
  template: `<ul>
    @for (parcel of run().parcels; track parcel.id) {
      <li>
        <div class="what">
          <a [routerLink]="['/parcels', parcel.id]">{{ parcel.code }}, {{ parcel.what }}</a>
          <small
            >{{ parcel.breederName }} to {{ parcel.destination }},
            {{ parcel.volumeL | number: '1.0-1' }} L</small
          >
        </div>
        @if (parcel.pinned) {
          <span class="pin"><mat-icon svgIcon="pin" aria-hidden="true" />pinned</span>
        }
        @if (parcel.verdict; as verdict) {
          <db-verdict-chip [verdict]="verdict" />
        }
        <span class="share">{{ parcel.shareCents | money }}</span>
        @if (changeable()) {
          <button
            matIconButton
            type="button"
            [matMenuTriggerFor]="menu"
            [attr.aria-label]="'Change ' + parcel.code"
          >
            <mat-icon svgIcon="more" aria-hidden="true" />
          </button>
          <mat-menu #menu="matMenu">
            <button
              mat-menu-item
              type="button"
              (click)="wished.emit({ parcel, wish: parcel.pinned ? 'unpin' : 'pin' })"
            >
              <mat-icon svgIcon="pin" aria-hidden="true" />{{ parcel.pinned ? 'Unpin' : 'Pin: keep it here' }}
            </button>
            @for (target of targets().get(parcel.id) ?? []; track target.id) {
              <button mat-menu-item type="button" (click)="moved.emit({ parcel, target })">
                <mat-icon svgIcon="arrow-right" aria-hidden="true" />Move to
                {{ target.date | dayLabel: 'medium' }}, {{ target.coordinator.name }}
              </button>
            }
            <button mat-menu-item type="button" (click)="wished.emit({ parcel, wish: 'take-off' })">
              <mat-icon svgIcon="minus" aria-hidden="true" />Take off this run
            </button>
          </mat-menu>
        }
      </li>
    } @empty {
      <li class="none">No parcel is on this run yet.</li>
    }
  </ul>`,
  styles: `
    ul {
      list-style: none;
      margin: 0;
      padding: 0;
    }
    li {
      display: flex;
      flex-wrap: wrap;
      gap: 4px 12px;
      align-items: center;
      min-height: 56px;
      padding: 6px 0;
      border-top: 1px solid var(--db-line);
    }
    .what {
      flex: 1 1 220px;
      min-width: 0;
    }
    a {
      color: var(--db-ink);
      font-weight: 500;
      text-underline-offset: 3px;
      overflow-wrap: anywhere;
    }
    small {
      display: block;
      color: var(--db-ink-2);
      font-size: 13px;
    }
    .share {
      font-weight: 600;
      min-width: 64px;
      text-align: right;
    }
    .pin {
      display: inline-flex;
      gap: 4px;
      align-items: center;
      font-size: 13px;
      color: var(--db-dusk);
    }
    .pin mat-icon {
      width: 16px;
      height: 16px;
    }
    .none {
      color: var(--db-ink-2);
    }
    @media print {
      button {
        display: none;
      }
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class RunParcels {
  readonly run = input.required<Run>();
  readonly changeable = input(false);
  /** The other runs that could take a parcel, by its id. */
  readonly targets = input<ReadonlyMap<number, readonly Run[]>>(new Map());
  readonly moved = output<{ parcel: RunParcel; target: Run }>();
  readonly wished = output<{ parcel: RunParcel; wish: ParcelWish }>();
}
