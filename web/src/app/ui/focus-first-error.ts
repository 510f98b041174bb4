/** After a refused form: the focus goes to the first field with a complaint, so that it is read out and in view. */
export function focusFirstError(host: HTMLElement): void {
  // The complaint is drawn with the next frame.
  requestAnimationFrame(() =>
    host
      .querySelector<HTMLElement>(
        ':is(input, textarea, mat-select).ng-invalid, .mat-form-field-invalid :is(input, textarea, mat-select)',
      )
      ?.focus(),
  );
}
