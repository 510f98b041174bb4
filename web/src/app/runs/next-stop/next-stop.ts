import { ChangeDetectionStrategy, Component, computed, input, linkedSignal } from '@angular/core';
import { MatButton } from '@angular/material/button';
import { MatIcon } from '@angular/material/icon';
import type { Run } from '@shared/contract';
import { ClockPipe } from '../../core/clock-pipe';
import { nextByClock, nextPlaces } from '../next-stops';

/** The next place of the drive in large type, for a phone on the dashboard; the driver may step on or back. */
@Component({
  selector: 'db-next-stop',
  imports: [ClockPipe, MatButton, MatIcon],
  template: `@if (place(); as now) {
    <section class="db-sheet" aria-labelledby="next-heading">
      <h2 id="next-heading" class="lead">
        {{ index() === places().length - 1 ? 'To the counter' : 'Next stop' }}
        @if (places().length > 1) {
          <small>{{ index() + 1 }} of {{ places().length }}</small>
        }
      </h2>
      <div aria-live="polite">
        <p class="time">{{ now.at | clock: run().zone }}</p>
        <p class="title">{{ now.title }}</p>
        <p>{{ now.address }}</p>
        <p class="soft">{{ now.text }}</p>
        @if (now.codes.length > 0) {
          <ul aria-label="Parcels to load">
            @for (code of now.codes; track code) {
              <li>{{ code }}</li>
            }
          </ul>
        }
      </div>
      <div class="ways">
        <a matButton="outlined" [href]="now.geo"
          ><mat-icon svgIcon="map" aria-hidden="true" />Show the way<span class="db-sr">
            to {{ now.title }}</span
          ></a
        >
        @if (now.phone; as phone) {
          <a matButton="outlined" [href]="'tel:' + phone"
            ><mat-icon svgIcon="call" aria-hidden="true" />Call<span class="db-sr"> {{ now.title }}</span>
            {{ phone }}</a
          >
        }
      </div>
      @if (places().length > 1) {
        <div class="steps">
          @if (index() > 0) {
            <button matButton type="button" (click)="index.set(index() - 1)">
              <mat-icon svgIcon="chevron-left" aria-hidden="true" />Back
            </button>
          }
          @if (index() < places().length - 1) {
            <button matButton type="button" class="on" (click)="index.set(index() + 1)">
              Loaded, next stop<mat-icon iconPositionEnd svgIcon="chevron-right" aria-hidden="true" />
            </button>
          }
        </div>
      }
    </section>
  }`,
  styles: `
    section {
      border-color: var(--db-juniper);
    }
    .lead {
      display: flex;
      gap: 10px;
      justify-content: space-between;
      align-items: baseline;
      font-size: 15px;
      color: var(--db-ink-2);
    }
    small {
      font-weight: 400;
      font-size: 13.5px;
    }
    p {
      margin: 0;
      font-size: 17px;
    }
    .time {
      margin-top: 6px;
      font-size: clamp(36px, 10vw, 46px);
      font-weight: 600;
      letter-spacing: -0.03em;
      line-height: 1.1;
    }
    .title {
      font-size: 24px;
      font-weight: 600;
      letter-spacing: -0.015em;
      line-height: 1.25;
      margin: 2px 0 4px;
    }
    .soft {
      color: var(--db-ink-2);
      margin-top: 4px;
    }
    ul {
      margin: 4px 0 0;
      padding-left: 20px;
    }
    .ways,
    .steps {
      display: flex;
      flex-wrap: wrap;
      gap: 10px;
      margin-top: 14px;
    }
    .ways a,
    .steps button {
      min-height: 48px;
    }
    .steps {
      margin: 10px 0 -6px;
    }
    .on {
      margin-left: auto;
    }
    @media print {
      :host {
        display: none;
      }
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class NextStop {
  readonly run = input.required<Run>();
  protected readonly places = computed(() => nextPlaces(this.run()));
  /** Follows the clock when the run comes in; the driver, who knows better, steps from there. */
  protected readonly index = linkedSignal(() => nextByClock(this.places(), Date.now()));
  protected readonly place = computed(() => this.places()[this.index()] ?? null);
}
