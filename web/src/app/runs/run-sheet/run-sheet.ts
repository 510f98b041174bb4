import { ChangeDetectionStrategy, Component, computed, input } from '@angular/core';
import { MatIcon } from '@angular/material/icon';
import { RouterLink } from '@angular/router';
import type { Run } from '@shared/contract';
import { ClockPipe } from '../../core/clock-pipe';
import { geo } from '../next-stops';
import { duration, slackText, stopText } from '../run-figures';

/** The drive stop by stop with its clock: for the driver on the road, for a breeder who waits, and for the printer. */
@Component({
  selector: 'db-run-sheet',
  imports: [ClockPipe, MatIcon, RouterLink],
  template: `<ol>
    @if (showsStart()) {
      <li class="end">
        <time [attr.datetime]="run().departAt">{{ run().departAt | clock: run().zone }}</time>
        <div>
          <b>Leave home</b><small>{{ run().coordinator.name }}</small>
        </div>
      </li>
    }
    @for (row of rows(); track row.stop.seq) {
      <li>
        <time [attr.datetime]="row.stop.arriveAt">{{ row.stop.arriveAt | clock: run().zone : 'never' }}</time>
        <div>
          <b>{{ row.stop.businessName ?? row.stop.breederName }}</b>
          <small>{{ row.address }}</small>
          <small>{{ row.text }}</small>
          <ul aria-label="Parcels at this stop">
            @for (parcel of row.parcels; track parcel.id) {
              <li>
                <a [routerLink]="['/parcels', parcel.id]">{{ parcel.code }}</a> {{ parcel.what }} to
                {{ parcel.destination }}
              </li>
            }
          </ul>
          <a class="way" [href]="row.geo"
            ><mat-icon svgIcon="map" aria-hidden="true" />Show the way<span class="db-sr">
              to {{ row.stop.breederName }}</span
            ></a
          >
          @if (showsStart() && row.stop.phone; as phone) {
            <a class="way" [href]="'tel:' + phone"
              ><mat-icon svgIcon="call" aria-hidden="true" />{{ phone
              }}<span class="db-sr"> of {{ row.stop.breederName }}</span></a
            >
          }
        </div>
      </li>
    }
    <li class="end">
      <time [attr.datetime]="run().arriveAt">{{ run().arriveAt | clock: run().zone : 'never' }}</time>
      <div>
        <b>{{ run().counter.name }}</b>
        <small>{{ slack() }}, at {{ run().cutOffAt | clock: run().zone }}</small>
        @if (run().lastLegMinutes > 0) {
          <small>{{ lastLeg() }} from the last stop</small>
        }
      </div>
    </li>
  </ol>`,
  styles: `
    ol,
    ul {
      list-style: none;
      margin: 0;
      padding: 0;
    }
    ol > li {
      display: grid;
      grid-template-columns: 76px 1fr;
      gap: 10px;
      padding: 12px 0 12px 18px;
      position: relative;
      border-left: 2px solid var(--db-line);
      margin-left: 7px;
    }
    ol > li::before {
      content: '';
      position: absolute;
      left: -9px;
      top: 16px;
      width: 16px;
      height: 16px;
      border-radius: 50%;
      background: var(--db-paper);
      border: 2.4px solid var(--db-ink-2);
    }
    ol > li.end::before {
      background: var(--db-juniper);
      border-color: var(--db-juniper);
    }
    time {
      font-weight: 600;
      white-space: nowrap;
    }
    small {
      display: block;
      color: var(--db-ink-2);
      font-size: 13.5px;
    }
    ul {
      margin-top: 6px;
    }
    ul li {
      font-size: 14px;
      padding: 3px 0;
    }
    ul a {
      display: inline-block;
      min-height: 24px;
    }
    .way {
      display: inline-flex;
      gap: 6px;
      align-items: center;
      min-height: 44px;
      margin-right: 18px;
      font-weight: 600;
      text-underline-offset: 3px;
    }
    .way mat-icon {
      width: 20px;
      height: 20px;
    }
    @media print {
      .way {
        display: none;
      }
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class RunSheet {
  readonly run = input.required<Run>();
  /** The driver's own start is not a breeder's business. */
  readonly showsStart = input(true);
  protected readonly slack = computed(() => slackText(this.run().slackMinutes));
  protected readonly lastLeg = computed(() => duration(this.run().lastLegMinutes));
  protected readonly rows = computed(() =>
    this.run().stops.map((stop) => ({
      stop,
      text: stopText(stop, this.run()),
      address: [stop.street, stop.city].filter(Boolean).join(', '),
      geo: geo(stop),
      parcels: this.run().parcels.filter((parcel) => stop.parcelIds.includes(parcel.id)),
    })),
  );
}
