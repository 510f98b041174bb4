import { ChangeDetectionStrategy, Component, input, output } from '@angular/core';
import { MatButton } from '@angular/material/button';
import { MatIcon } from '@angular/material/icon';
import { ProblemNote } from '../../ui/problem-note/problem-note';
import type { SaveState } from '../../ui/save-state';

/** The foot of a form: what went wrong, the button, and that it was saved. */
@Component({
  selector: 'db-save-foot',
  imports: [MatButton, MatIcon, ProblemNote],
  template: `<db-problem-note
      [message]="state().message()"
      [retry]="state().isStale() ? 'Load it again' : undefined"
      (again)="again.emit()"
    />
    <div class="db-row">
      <button matButton="outlined" type="submit" [disabled]="state().busy()" [disabledInteractive]="true">
        {{ label() }}
      </button>
      <span role="status">
        @if (isDone()) {
          <mat-icon svgIcon="check" aria-hidden="true" />{{ done() }}
        }
      </span>
    </div>`,
  styles: `
    :host {
      display: block;
      margin-top: 14px;
    }
    span {
      display: inline-flex;
      gap: 6px;
      align-items: center;
      color: var(--db-juniper);
    }
    mat-icon {
      width: 18px;
      height: 18px;
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class SaveFoot {
  readonly state = input.required<SaveState>();
  readonly isDone = input(false);
  readonly label = input('Save');
  readonly done = input('Saved.');
  readonly again = output();
}
