import { ChangeDetectionStrategy, Component, input, output } from '@angular/core';
import { MatButton } from '@angular/material/button';
import { MatIcon } from '@angular/material/icon';

/**
 * Something went wrong, in words, announced at once. `retry` (its label) offers a way on and emits `again`.
 * Without a message nothing is shown, but the live region stays so that a later message is read out.
 */
@Component({
  selector: 'db-problem-note',
  imports: [MatButton, MatIcon],
  template: `
    <div role="alert">
      @if (message(); as text) {
        <div class="note">
          <mat-icon svgIcon="warn" aria-hidden="true" />
          <p>{{ text }}</p>
          @if (retry(); as label) {
            <button matButton type="button" (click)="again.emit()">{{ label }}</button>
          }
        </div>
      }
    </div>
  `,
  styles: `
    .note {
      display: flex;
      flex-wrap: wrap;
      gap: 8px 12px;
      align-items: center;
      background: var(--db-clay-soft);
      border-radius: var(--db-radius-s);
      padding: 12px 16px;
      margin-bottom: 16px;
    }
    p {
      margin: 0;
      flex: 1 1 220px;
    }
    mat-icon {
      color: var(--db-clay-ink);
      flex: none;
    }
    button {
      --mat-button-text-label-text-color: var(--db-ink);
      text-decoration: underline;
      text-underline-offset: 3px;
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class ProblemNote {
  readonly message = input<string | null | undefined>();
  readonly retry = input<string>();
  readonly again = output();
}
