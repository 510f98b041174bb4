export type ThermalErrorCode =
  'empty-band' | 'bad-mass' | 'bad-box' | 'no-forecast' | 'bad-forecast' | 'bad-leg';

/** Something the box model cannot work with; the code says what, the message says it to a person. */
export class ThermalError extends Error {
  constructor(
    readonly code: ThermalErrorCode,
    message: string,
  ) {
    super(message);
    this.name = 'ThermalError';
  }
}
