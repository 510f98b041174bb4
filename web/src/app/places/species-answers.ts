import { FormControl, FormGroup, Validators } from '@angular/forms';
import type { Species, SpeciesNew, TemperatureUnit } from '@shared/contract';

export type SpeciesAnswers = ReturnType<typeof speciesAnswers>;

const limits = [
  'bandLowF',
  'bandHighF',
  'enduranceLowF',
  'enduranceHighF',
  'outdoorLowF',
  'outdoorHighF',
] as const;
type Limit = (typeof limits)[number];

const temperature = (isNeeded = true) =>
  new FormControl<number | null>(null, isNeeded ? Validators.required : null);

/** The form of a species. Temperatures stand in it in the person's unit, whatever their names say of the store. */
export function speciesAnswers() {
  const text = () => new FormControl('', { nonNullable: true, validators: Validators.required });
  return new FormGroup({
    commonName: text(),
    scientificName: text(),
    bandLowF: temperature(),
    bandHighF: temperature(),
    enduranceLowF: temperature(),
    enduranceHighF: temperature(),
    outdoorLowF: temperature(false),
    outdoorHighF: temperature(false),
    typicalMassG: new FormControl<number | null>(null, [Validators.required, Validators.min(0.1)]),
    venomous: new FormControl(false, { nonNullable: true }),
    note: new FormControl('', { nonNullable: true }),
    active: new FormControl(true, { nonNullable: true }),
  });
}

/** A stored temperature as the form shows it: °F as it is, °C to a tenth. */
export function shownTemperature(valueF: number | null, unit: TemperatureUnit): number | null {
  if (valueF === null || unit === 'F') return valueF;
  return Math.round(((valueF - 32) * 50) / 9) / 10;
}

/** What was typed, in °F to a tenth; the stored value where the form still shows it, so that no rounding creeps in. */
export function typedTemperature(
  shown: number | null,
  unit: TemperatureUnit,
  storedF: number | null,
): number | null {
  if (shown === null || unit === 'F') return shown;
  if (storedF !== null && shownTemperature(storedF, unit) === shown) return storedF;
  return Math.round(((shown * 9) / 5 + 32) * 10) / 10;
}

/** Puts a stored species into the form. */
export function fillSpecies(form: SpeciesAnswers, species: Species, unit: TemperatureUnit): void {
  const shown = Object.fromEntries(limits.map((name) => [name, shownTemperature(species[name], unit)]));
  form.reset({ ...shapeOf(species), ...shown });
}

const shapeOf = ({ id: _id, version: _version, ...shape }: Species): SpeciesNew => shape;

/** The form as a request; call it on a valid form. */
export function speciesBody(form: SpeciesAnswers, unit: TemperatureUnit, seen: Species | null): SpeciesNew {
  const { commonName, scientificName, typicalMassG, venomous, note, active } = form.getRawValue();
  const inF = (name: Limit) => typedTemperature(form.controls[name].value, unit, seen?.[name] ?? null);
  return {
    ...{ commonName, scientificName, venomous, note, active },
    typicalMassG: typicalMassG ?? 0,
    bandLowF: inF('bandLowF') ?? 0,
    bandHighF: inF('bandHighF') ?? 0,
    enduranceLowF: inF('enduranceLowF') ?? 0,
    enduranceHighF: inF('enduranceHighF') ?? 0,
    outdoorLowF: inF('outdoorLowF'),
    outdoorHighF: inF('outdoorHighF'),
  };
}
