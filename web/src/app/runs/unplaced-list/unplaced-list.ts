import { ChangeDetectionStrategy, Component, input } from '@angular/core';
import { RouterLink } from '@angular/router';
import type { UnplacedItem } from '../unplaced-items';

/** What is not placed, with the reason and the cheapest help. */
@Component({
  selector: 'db-unplaced-list',
  imports: [RouterLink],
  template: `<section aria-labelledby="unplaced-heading">
    <h2 id="unplaced-heading">Not on a run</h2>
    @if (items().length === 0) {
      <p class="calm">Every open parcel has its run.</p>
    }
    <ul>
      @for (item of items(); track item.id) {
        <li>
          <a [routerLink]="['/parcels', item.id]">{{ item.title }}</a>
          <p>{{ item.text }}</p>
          @if (item.help; as help) {
            <p class="help">{{ help }}</p>
          }
        </li>
      }
    </ul>
  </section>`,
  styles: `
    section {
      background: var(--db-paper);
      border: 1px solid var(--db-line);
      border-radius: 16px;
      padding: 15px 17px;
    }
    h2 {
      font-size: 15px;
      margin-bottom: 6px;
    }
    ul {
      list-style: none;
      margin: 0;
      padding: 0;
    }
    li {
      padding: 9px 0;
      border-top: 1px solid var(--db-line);
      font-size: 14px;
      line-height: 1.4;
    }
    a {
      font-weight: 500;
      color: var(--db-ink);
      text-underline-offset: 3px;
    }
    p {
      margin: 2px 0 0;
      font-size: 13px;
      color: var(--db-ink-2);
    }
    .help {
      color: var(--db-dusk);
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class UnplacedList {
  readonly items = input.required<readonly UnplacedItem[]>();
}
