/** Exact by definition of the Fahrenheit scale. */
export const toC = (tempF: number): number => (tempF - 32) / 1.8;
export const toF = (tempC: number): number => tempC * 1.8 + 32;
/** Exact since 1959. */
export const inchM = 0.0254;
