import { FormArray, FormControl, FormGroup, Validators } from '@angular/forms';
import type { ContentLine, Species } from '@shared/contract';

export type ContentLineForm = FormGroup<{
  speciesId: FormControl<number | null>;
  quantity: FormControl<number | null>;
  massG: FormControl<number | null>;
}>;
export type ContentsForm = FormArray<ContentLineForm>;

/** As many kinds as the contract lets into one box. */
export const mostLines = 10;

const wholeNumber = Validators.pattern(/^\d+$/);

/** One row: the limits are those of the contract (shared/src/contract/days.ts), which has the last word. */
export function contentLineForm(line: ContentLine | null = null): ContentLineForm {
  return new FormGroup({
    speciesId: new FormControl<number | null>(line?.speciesId ?? null, Validators.required),
    quantity: new FormControl<number | null>(line?.quantity ?? 1, [
      Validators.required,
      wholeNumber,
      Validators.min(1),
      Validators.max(50),
    ]),
    massG: new FormControl<number | null>(line?.massG ?? null, [
      Validators.required,
      Validators.min(0.1),
      Validators.max(50000),
    ]),
  });
}

/** The rows for these lines; one empty row when there is none. */
export function contentsForm(lines: readonly ContentLine[] = []): ContentsForm {
  return new FormArray(lines.length === 0 ? [contentLineForm()] : lines.map((line) => contentLineForm(line)));
}

/** Replaces all rows. */
export function resetContents(form: ContentsForm, lines: readonly ContentLine[]): void {
  form.clear({ emitEvent: false });
  const rows = lines.length === 0 ? [contentLineForm()] : lines.map((line) => contentLineForm(line));
  rows.forEach((row) => form.push(row, { emitEvent: false }));
  form.updateValueAndValidity();
}

/** The rows as they go to the API; null while one is not filled in or not valid. */
export function contentLines(form: ContentsForm): ContentLine[] | null {
  const lines = form.getRawValue();
  const whole = lines.flatMap(({ speciesId, quantity, massG }) =>
    speciesId !== null && quantity !== null && massG !== null ? [{ speciesId, quantity, massG }] : [],
  );
  return whole.length === lines.length && rowsValid(form) ? whole : null;
}

/** A complaint of the server's lasts until the next edit and must not keep the answer from being asked again. */
function rowsValid(form: ContentsForm): boolean {
  return form.controls.every((row) =>
    Object.values(row.controls).every((control) => control.valid || control.hasError('server')),
  );
}

/** The typical mass of a freshly chosen species, unless somebody weighed the animal and typed it in. */
export function prefillMass(row: ContentLineForm, species: readonly Species[]): void {
  const { speciesId, massG } = row.controls;
  const chosen = species.find((one) => one.id === speciesId.value);
  if (chosen && !massG.dirty) massG.setValue(chosen.typicalMassG);
}

/** Number and mass of everything in the box, in words: `3 animals, 355 g`; empty while unknown. */
export function loadText(lines: readonly ContentLine[] | null): string {
  if (!lines) return '';
  const animals = lines.reduce((sum, line) => sum + line.quantity, 0);
  const massG = lines.reduce((sum, line) => sum + line.quantity * line.massG, 0);
  return `${animals} animal${animals === 1 ? '' : 's'}, ${massText(massG)}`;
}

/** `355 g`, `1.35 kg`. */
export function massText(massG: number): string {
  return massG < 1000 ? `${Math.round(massG * 10) / 10} g` : `${Math.round(massG / 10) / 100} kg`;
}
