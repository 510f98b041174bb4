import { ChangeDetectionStrategy, Component, input } from '@angular/core';
import type { Parcel } from '@shared/contract';
import { DayLabelPipe } from '../../core/day-label-pipe';
import { CopyButton } from '../../ui/copy-button/copy-button';

/** The buyer: how to reach them, their link, and which mornings they said suit. */
@Component({
  selector: 'db-buyer-card',
  imports: [CopyButton, DayLabelPipe],
  template: `<h2 id="buyer-heading">The buyer</h2>
    <p class="who">
      <b>{{ parcel().buyer.name }}</b><br /><a [href]="'mailto:' + parcel().buyer.email">{{
        parcel().buyer.email
      }}</a>
      @if (parcel().buyer.phone; as phone) {
        <br /><a [href]="'tel:' + phone">{{ phone }}</a>
      }
    </p>
    <h3>Mornings they said</h3>
    @if (parcel().mornings.length > 0) {
      <ul>
        @for (morning of parcel().mornings; track morning.date) {
          <li [class.not]="!morning.suits">
            <span aria-hidden="true">{{ morning.suits ? '○' : '–' }}</span>
            {{ morning.date | dayLabel: 'medium' }}: {{ morning.suits ? 'suits' : 'does not suit' }}
          </li>
        }
      </ul>
    } @else {
      <p class="db-hint">Nothing yet. The buyer says it through the link.</p>
    }
    <h3>Their link</h3>
    <p class="link">
      <a [href]="parcel().arrivalUrl">{{ parcel().arrivalUrl }}</a>
    </p>
    <db-copy-button [text]="parcel().arrivalUrl" label="Copy the link" />
    <p class="db-hint after">Whoever has it sees the arrival and may answer for the buyer.</p>`,
  styles: `
    :host {
      display: block;
    }
    h3 {
      font-size: 14px;
      margin: 14px 0 4px;
    }
    .who {
      margin: 8px 0 0;
    }
    a {
      overflow-wrap: anywhere;
    }
    ul {
      list-style: none;
      padding: 0;
      margin: 0;
    }
    li {
      padding: 2px 0;
    }
    .not {
      color: var(--db-ink-2);
    }
    .link {
      font-size: 13px;
      margin: 0 0 8px;
    }
    .after {
      margin: 8px 0 0;
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class BuyerCard {
  readonly parcel = input.required<Parcel>();
}
