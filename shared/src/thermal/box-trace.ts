import type { TraceRow } from '../contract/days';
import type { BoxJudgement } from './judge-box';
import type { PlaceRole } from './journey';

/** The rows of the box trace: the air in the box at each point, the ribbon of one forecast error, the leg; then the late case. */
export function boxTrace(
  { nominal, late }: Pick<BoxJudgement, 'nominal' | 'late'>,
  sigmaF: number,
  placeOf: (role: PlaceRole) => { readonly name: string; readonly zone: string },
): TraceRow[] {
  const lateAt = new Map<number, number>();
  late?.run.atMs.forEach((atMs, point) => lateAt.set(atMs, late.run.tempF[point] ?? NaN));
  const planned = Array.from(nominal.atMs, (atMs, point): TraceRow => {
    const tempF = nominal.tempF[point] ?? NaN;
    const offF = (nominal.response[point] ?? 0) * sigmaF;
    const leg = nominal.legs[Math.max(0, point - 1)];
    return {
      at: new Date(atMs).toISOString(),
      tempF: tenth(tempF),
      lowF: tenth(tempF - offF),
      highF: tenth(tempF + offF),
      lateF: lateAt.has(atMs) ? tenth(lateAt.get(atMs) ?? NaN) : null,
      leg: leg?.kind ?? 'packed',
      ...where(leg?.role ?? 'origin'),
    };
  });
  const endMs = nominal.atMs.at(-1) ?? 0;
  const rest = late
    ? Array.from(late.run.atMs).flatMap((atMs, point): TraceRow[] => {
        if (atMs <= endMs) return [];
        const leg = late.run.legs[Math.max(0, point - 1)];
        const lateF = tenth(late.run.tempF[point] ?? NaN);
        return [
          {
            at: new Date(atMs).toISOString(),
            tempF: null,
            lowF: null,
            highF: null,
            lateF,
            leg: leg?.kind ?? 'late',
            ...where(leg?.role ?? 'hub'),
          },
        ];
      })
    : [];
  return [...planned, ...rest];

  function where(role: PlaceRole): { place: string; zone: string } {
    const { name, zone } = placeOf(role);
    return { place: name, zone };
  }
}

const tenth = (tempF: number): number => Math.round(tempF * 10) / 10;
