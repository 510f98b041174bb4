import { ChangeDetectionStrategy, Component } from '@angular/core';

/**
 * The bar for a page's one next action and its quieter companions. On a desk it stands where it is put; on a phone it
 * stays at the foot of the screen, within the thumb's reach. Use one a page, last in the page.
 */
@Component({
  selector: 'db-next-action',
  template: '<ng-content />',
  styles: `
    :host {
      display: flex;
      flex-wrap: wrap;
      gap: 10px;
      align-items: center;
    }
    @media (max-width: 760px) {
      :host {
        position: fixed;
        inset: auto 0 0;
        z-index: 5;
        flex-wrap: nowrap;
        padding: 10px 16px calc(10px + env(safe-area-inset-bottom));
        background: var(--db-paper);
        border-top: 1px solid var(--db-line);
      }
      :host ::ng-deep > * {
        flex: 1 1 0;
        min-width: 0;
      }
      :host ::ng-deep > .db-go {
        flex-grow: 1.6;
      }
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class NextAction {}
