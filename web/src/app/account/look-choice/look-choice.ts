import { ChangeDetectionStrategy, Component, inject } from '@angular/core';
import { MatButtonToggleModule, type MatButtonToggleChange } from '@angular/material/button-toggle';
import { MatIcon } from '@angular/material/icon';
import { SchemePreference, type Scheme } from '../../core/scheme-preference';

/** Light, dark or as the device says; takes effect at once and stays in this browser. */
@Component({
  selector: 'db-look-choice',
  imports: [MatButtonToggleModule, MatIcon],
  template: `<h2>Colors</h2>
    <p class="db-hint">Kept in this browser.</p>
    <mat-button-toggle-group
      hideSingleSelectionIndicator
      aria-label="Colors"
      [value]="scheme()"
      (change)="choose($event)"
    >
      @for (one of choices; track one.scheme) {
        <mat-button-toggle [value]="one.scheme"
          ><mat-icon [svgIcon]="one.icon" aria-hidden="true" /> {{ one.word }}</mat-button-toggle
        >
      }
    </mat-button-toggle-group>`,
  styleUrl: '../section.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class LookChoice {
  private readonly preference = inject(SchemePreference);

  protected readonly scheme = this.preference.scheme;
  protected readonly choices: readonly { scheme: Scheme; word: string; icon: string }[] = [
    { scheme: 'auto', word: 'As the device', icon: 'half' },
    { scheme: 'light', word: 'Light', icon: 'sun' },
    { scheme: 'dark', word: 'Dark', icon: 'moon' },
  ];

  protected choose(change: MatButtonToggleChange): void {
    const chosen = this.choices.find((one) => one.scheme === change.value);
    if (chosen) this.preference.choose(chosen.scheme);
  }
}
