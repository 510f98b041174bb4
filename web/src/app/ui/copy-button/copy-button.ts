import { Clipboard } from '@angular/cdk/clipboard';
import { ChangeDetectionStrategy, Component, DestroyRef, inject, input, signal } from '@angular/core';
import { MatButton } from '@angular/material/button';
import { MatIcon } from '@angular/material/icon';

const shownMs = 2500;

/** Copies a text and says that it did. */
@Component({
  selector: 'db-copy-button',
  imports: [MatButton, MatIcon],
  template: `<button matButton="outlined" type="button" (click)="copy()">
      <mat-icon [svgIcon]="state() === 'copied' ? 'check' : 'copy'" aria-hidden="true" />{{
        state() === 'copied' ? 'Copied' : label()
      }}
    </button>
    <span class="db-sr" role="status">{{
      state() === 'copied' ? 'Copied.' : state() === 'failed' ? 'Your browser does not allow copying.' : ''
    }}</span>`,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class CopyButton {
  private readonly clipboard = inject(Clipboard);

  readonly text = input.required<string>();
  readonly label = input('Copy');

  protected readonly state = signal<'idle' | 'copied' | 'failed'>('idle');
  private timer: ReturnType<typeof setTimeout> | undefined;

  constructor() {
    inject(DestroyRef).onDestroy(() => clearTimeout(this.timer));
  }

  protected copy(): void {
    this.state.set(this.clipboard.copy(this.text()) ? 'copied' : 'failed');
    clearTimeout(this.timer);
    this.timer = setTimeout(() => this.state.set('idle'), shownMs);
  }
}
