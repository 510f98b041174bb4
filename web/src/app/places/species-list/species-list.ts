import { httpResource } from '@angular/common/http';
import { ChangeDetectionStrategy, Component, computed, inject } from '@angular/core';
import { MatButton } from '@angular/material/button';
import { MatIcon } from '@angular/material/icon';
import { MatProgressBar } from '@angular/material/progress-bar';
import { RouterLink } from '@angular/router';
import type { Species } from '@shared/contract';
import { SessionStore } from '../../core/session/session-store';
import { rangeText, temperatureText } from '../../core/temperature';
import { UnitPreference } from '../../core/unit-preference';
import { errorText } from '../../ui/call-state';
import { EmptyState } from '../../ui/empty-state/empty-state';
import { NextAction } from '../../ui/next-action/next-action';
import { PageHeader } from '../../ui/page-header/page-header';
import { ProblemNote } from '../../ui/problem-note/problem-note';
import { BandBar } from '../band-bar/band-bar';

/** The species of the circle with their bands. An admin opens one to change it. */
@Component({
  selector: 'db-species-list',
  imports: [
    BandBar,
    EmptyState,
    MatButton,
    MatIcon,
    MatProgressBar,
    NextAction,
    PageHeader,
    ProblemNote,
    RouterLink,
  ],
  templateUrl: './species-list.html',
  styleUrl: './species-list.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class SpeciesList {
  private readonly session = inject(SessionStore);

  protected readonly unit = inject(UnitPreference).unit;
  protected readonly canEdit = computed(() => this.session.has('admin'));
  protected readonly listed = httpResource<Species[]>(() => '/api/species');
  protected readonly problem = computed(() => errorText(this.listed.error()));
  protected readonly cards = computed(() =>
    this.listed.hasValue()
      ? this.listed.value().map((species) => ({
          species,
          band: rangeText({ lowF: species.bandLowF, highF: species.bandHighF }, this.unit()),
          endurance: rangeText({ lowF: species.enduranceLowF, highF: species.enduranceHighF }, this.unit()),
          outdoor: this.outdoor(species),
        }))
      : null,
  );

  private outdoor({ outdoorLowF, outdoorHighF }: Species): string {
    const parts = [
      ...(outdoorLowF === null ? [] : [`not under ${temperatureText(outdoorLowF, this.unit())}`]),
      ...(outdoorHighF === null ? [] : [`not over ${temperatureText(outdoorHighF, this.unit())}`]),
    ];
    return parts.join(', ') || "the circle's limits";
  }
}
