/** What the tests use of `jstat`. */
export const jStat: { normal: { cdf(x: number, mean: number, deviation: number): number } };
