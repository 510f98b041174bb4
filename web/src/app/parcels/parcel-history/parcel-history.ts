import { ChangeDetectionStrategy, Component, input } from '@angular/core';
import type { HistoryEntry } from '@shared/contract';
import { dayAndClock } from '../../core/dates';

/** What happened to a parcel, newest first, on the clock of its drop-off counter. */
@Component({
  selector: 'db-parcel-history',
  template: `<ol>
    @for (entry of entries(); track entry.id) {
      <li>
        <p>{{ entry.text }}</p>
        <p class="when">
          <time [attr.datetime]="entry.at">{{ when(entry.at) }}</time> · {{ entry.who }}
        </p>
      </li>
    } @empty {
      <li><p>Nothing has happened yet.</p></li>
    }
  </ol>`,
  styles: `
    ol {
      list-style: none;
      margin: 8px 0 0;
      padding: 0;
    }
    li {
      border-left: 2px solid var(--db-line);
      padding: 0 0 12px 14px;
    }
    p {
      margin: 0;
      overflow-wrap: anywhere;
    }
    .when {
      font-size: 13px;
      color: var(--db-ink-2);
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class ParcelHistory {
  readonly entries = input.required<readonly HistoryEntry[]>();
  readonly zone = input.required<string>();

  protected when(at: string): string {
    return dayAndClock(at, this.zone());
  }
}
