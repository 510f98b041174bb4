/** One JSON line of `npm run bench`: `ratio` is value over the same work done by what `against` names, in the same run. */
export interface BenchLine {
  readonly bench: string;
  readonly size?: number;
  readonly metric: string;
  readonly value: number;
  readonly unit: string;
  readonly ratio?: number;
  readonly against?: string;
}
