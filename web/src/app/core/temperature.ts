import { Pipe, type PipeTransform } from '@angular/core';
import type { TemperatureUnit } from '@shared/contract';

/** Whole degrees in the person's unit, from °F. */
export const degrees = (valueF: number, unit: TemperatureUnit): number =>
  Math.round(unit === 'C' ? ((valueF - 32) * 5) / 9 : valueF);

/** `72 °F`. */
export const temperatureText = (valueF: number, unit: TemperatureUnit): string =>
  `${degrees(valueF, unit)} °${unit}`;

/** `66 to 79 °F`. */
export const rangeText = (range: { lowF: number; highF: number }, unit: TemperatureUnit): string =>
  `${degrees(range.lowF, unit)} to ${temperatureText(range.highF, unit)}`;

/** A difference of temperatures in °C to the tenth, from °F: unlike a temperature it has no zero to shift. */
const differenceC = (differenceF: number): number => Math.round((differenceF * 50) / 9) / 10;

/** Reads a sentence with temperatures in °F (as the API writes them) in the person's unit. */
export function sentenceInUnit(text: string, unit: TemperatureUnit): string {
  if (unit === 'F') return text;
  const differences = text.replace(
    /(-?\d+(?:\.\d+)?) °F (inside|above|below|under|over|outside|off|warmer|colder)/g,
    (_all, value: string, word: string) => `${differenceC(Number(value))} °C ${word}`,
  );
  return differences
    .replace(
      /(-?\d+(?:\.\d+)?) (to|and) (-?\d+(?:\.\d+)?) °F/g,
      (_all, low: string, word: string, high: string) =>
        `${degrees(Number(low), unit)} ${word} ${temperatureText(Number(high), unit)}`,
    )
    .replace(/(-?\d+(?:\.\d+)?) °F/g, (_all, value: string) => temperatureText(Number(value), unit));
}

/** `{{ 72 | temperature: unit() }}`. */
@Pipe({ name: 'temperature' })
export class TemperaturePipe implements PipeTransform {
  transform(valueF: number | null | undefined, unit: TemperatureUnit): string {
    return valueF == null ? '' : temperatureText(valueF, unit);
  }
}
