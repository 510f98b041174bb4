import { ChangeDetectionStrategy, Component, computed, input } from '@angular/core';
import { RouterLink } from '@angular/router';
import type { Parcel } from '@shared/contract';
import { StateChip } from '../../ui/state-chip/state-chip';
import { parcelTitle } from '../parcel-title';

/** One parcel of the list: what goes where, what it needs next, for whom, and its state. */
@Component({
  selector: 'db-parcel-row',
  imports: [RouterLink, StateChip],
  template: `<div class="what">
      <a [routerLink]="['/parcels', parcel().id]">{{ title() }}</a>
      <p class="need">{{ need() }}</p>
    </div>
    <p class="who">
      <span class="code">{{ parcel().code }}</span> for {{ parcel().buyer.name }}
      @if (withBreeder()) {
        <span class="breeder">{{ parcel().breeder.businessName ?? parcel().breeder.name }}</span>
      }
    </p>
    <db-state-chip [parcel]="parcel().state" />`,
  styleUrl: './parcel-row.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class ParcelRow {
  readonly parcel = input.required<Parcel>();
  readonly need = input.required<string>();
  readonly withBreeder = input(false);

  protected readonly title = computed(() => parcelTitle(this.parcel()));
}
