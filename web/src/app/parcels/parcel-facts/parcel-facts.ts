import { ChangeDetectionStrategy, Component, computed, input } from '@angular/core';
import type { Parcel } from '@shared/contract';
import { contentsText } from '@shared/parcels/contents-text';
import { dayLabel } from '../../core/dates';
import { massText } from '../../ui/contents-rows/contents-form';

interface Fact {
  readonly label: string;
  readonly value: string;
  readonly more?: string;
}

/** What is known of a parcel, as a list of facts. */
@Component({
  selector: 'db-parcel-facts',
  template: `<dl>
    @for (fact of facts(); track fact.label) {
      <div>
        <dt>{{ fact.label }}</dt>
        <dd>
          {{ fact.value }}
          @if (fact.more) {
            <small>{{ fact.more }}</small>
          }
        </dd>
      </div>
    }
  </dl>`,
  styles: `
    dl {
      margin: 0;
    }
    div {
      display: grid;
      grid-template-columns: 108px minmax(0, 1fr);
      gap: 12px;
      padding: 8px 0;
      border-top: 1px solid var(--db-line);
    }
    div:first-child {
      border-top: 0;
    }
    dt {
      color: var(--db-ink-2);
    }
    dd {
      margin: 0;
      overflow-wrap: anywhere;
    }
    small {
      display: block;
      font-size: 13px;
      color: var(--db-ink-2);
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class ParcelFacts {
  readonly parcel = input.required<Parcel>();

  protected readonly facts = computed(() => factsOf(this.parcel()));
}

/** The facts in the order a packer needs them; what was not said is left out. */
function factsOf(parcel: Parcel): readonly Fact[] {
  const { destination, dropOff, breeder, buyer } = parcel;
  const kinds = parcel.contents.map(
    (line) => `${line.scientificName}, ${line.quantity} × ${massText(line.massG)}`,
  );
  const address = [
    destination.street,
    `${destination.city}, ${destination.state} ${destination.postalCode}`,
  ].filter(Boolean);
  return [
    {
      label: 'Contents',
      value: `${contentsText(parcel.contents)}, ${massText(parcel.totalMassG)}`,
      more: kinds.join('; '),
    },
    {
      label: 'Box',
      value: parcel.box.name,
      more: `takes ${Math.round(parcel.box.volumeL * 10) / 10} L of a vehicle`,
    },
    {
      label: parcel.service === 'hold' ? 'Held at' : 'To the door',
      value: parcel.service === 'hold' ? destination.name : buyer.name,
      more: address.join(', '),
    },
    { label: 'Drop-off', value: dropOff.name, more: `${dropOff.city}, ${dropOff.state}` },
    {
      label: 'Ready',
      value: `${dayLabel(parcel.readyFrom, 'medium')} to ${dayLabel(parcel.latestDate, 'medium')}`,
    },
    ...(parcel.lastMealDate ? [{ label: 'Last meal', value: dayLabel(parcel.lastMealDate, 'medium') }] : []),
    {
      label: 'Breeder',
      value: breeder.name,
      ...(breeder.businessName ? { more: breeder.businessName } : {}),
    },
    ...(parcel.note ? [{ label: 'Note', value: parcel.note }] : []),
  ];
}
