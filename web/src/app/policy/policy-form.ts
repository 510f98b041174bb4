import { FormControl, FormRecord, type ValidatorFn } from '@angular/forms';
import type { TemperatureUnit } from '@shared/contract';
import { rangeWords, readValue, type PolicyRow } from '../ui/policy-table/policy-values';

export type PolicyForm = FormRecord<FormControl<string>>;

/** A form with one text control a value, named by the path without its dots. */
export function policyForm(rows: readonly PolicyRow[], unit: TemperatureUnit): PolicyForm {
  return new FormRecord(
    Object.fromEntries(
      rows.map((row) => [
        row.key,
        new FormControl(row.text, { nonNullable: true, validators: inRange(row, unit) }),
      ]),
    ),
  );
}

/** The server's paths to the names of the controls. */
export const controlNames = (rows: readonly PolicyRow[]): Record<string, string> =>
  Object.fromEntries(rows.map(({ path, key }) => [path, key]));

/** A number within the range of its note; the complaint names the range in the person's unit. */
function inRange(row: PolicyRow, unit: TemperatureUnit): ValidatorFn {
  return ({ value }) => {
    if (row.kind === 'line') return String(value).trim() === '' ? { required: true } : null;
    if (row.kind === 'lines') return null;
    const { min = -Infinity, max = Infinity } = row.note;
    const number = readValue(String(value), row, unit);
    const isFine = typeof number === 'number' && number >= min && number <= max;
    return isFine ? null : { range: rangeWords(row, unit) };
  };
}
