import { ChangeDetectionStrategy, Component, computed, input } from '@angular/core';
import { MatIcon } from '@angular/material/icon';
import { RouterLink } from '@angular/router';
import type { Run } from '@shared/contract';
import { ClockPipe } from '../../core/clock-pipe';
import { StateChip } from '../../ui/state-chip/state-chip';
import { load, sharePerParcel, slackText, stopText } from '../run-figures';

/** One run on the board: who drives, how full, its clock and its stops. */
@Component({
  selector: 'db-run-card',
  imports: [ClockPipe, MatIcon, RouterLink, StateChip],
  templateUrl: './run-card.html',
  styleUrl: './run-card.scss',
  host: { '[attr.data-state]': 'run().state' },
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class RunCard {
  readonly run = input.required<Run>();
  protected readonly load = computed(() => load(this.run()));
  protected readonly share = computed(() => sharePerParcel(this.run()));
  protected readonly slack = computed(() => slackText(this.run().slackMinutes));
  protected readonly firstName = computed(() => this.run().coordinator.name.split(' ')[0] ?? '');
  protected readonly stops = computed(() =>
    this.run().stops.map((stop) => ({ stop, text: stopText(stop, this.run()) })),
  );
}
