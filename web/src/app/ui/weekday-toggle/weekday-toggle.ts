import { ChangeDetectionStrategy, Component, input } from '@angular/core';
import { type FormControl, ReactiveFormsModule } from '@angular/forms';
import { MatButtonToggleModule } from '@angular/material/button-toggle';
import { weekdays } from '../weekdays';

/** Seven buttons to choose weekdays with; each says its day and whether it is pressed. */
@Component({
  selector: 'db-weekday-toggle',
  imports: [MatButtonToggleModule, ReactiveFormsModule],
  template: `<mat-button-toggle-group
    multiple
    hideMultipleSelectionIndicator
    [formControl]="control()"
    [attr.aria-label]="label()"
  >
    @for (day of days; track day.iso) {
      <mat-button-toggle [value]="day.iso" [aria-label]="day.long">{{ day.short }}</mat-button-toggle>
    }
  </mat-button-toggle-group>`,
  styles: `
    :host {
      display: block;
    }
    mat-button-toggle-group {
      display: flex;
      max-width: 420px;
      border-radius: var(--db-radius-s);
      --mat-button-toggle-height: 44px;
      --mat-button-toggle-selected-state-background-color: var(--db-juniper-soft);
      --mat-button-toggle-divider-color: var(--db-outline);
    }
    mat-button-toggle {
      flex: 1 1 0;
      min-width: 0;
    }
    :host ::ng-deep .mat-button-toggle-label-content {
      padding: 0 4px;
      font-size: 14px;
    }
    :host ::ng-deep .mat-button-toggle-checked .mat-button-toggle-label-content {
      font-weight: 600;
      text-decoration: underline;
      text-underline-offset: 3px;
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class WeekdayToggle {
  readonly control = input.required<FormControl<number[]>>();
  readonly label = input.required<string>();

  protected readonly days = weekdays;
}
