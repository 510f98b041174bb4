import type { Highs, Model } from 'highs';
import type { MilpAnswer, SolveMilp } from '@shared/pooling/milp';

/** HiGHS' codes for how a solve ended; any other is a failure. */
const statuses: Readonly<Record<number, MilpAnswer['status']>> = {
  7: 'optimal',
  8: 'infeasible',
  13: 'time-limit',
};

/**
 * HiGHS behind the plan's `SolveMilp`. It blocks its thread for up to the limit and a second. What it has at the time
 * limit is passed on too, with the bound it proved by then: the plan prices and checks whatever it gets.
 */
export function highsSolver(highs: Highs): SolveMilp {
  const once: SolveMilp = (lpText, limitSeconds, start) =>
    highs.withModel({ format: 'lp', data: lpText }, (model) => {
      model.options.set({ time_limit: limitSeconds, mip_rel_gap: 0, output_flag: false });
      if (start) beginWith(model, start);
      model.run();
      return answerOf(model);
    });
  return (lpText, limitSeconds, start) => {
    try {
      return once(lpText, limitSeconds, start);
    } catch {
      // The package rarely says that the model was not solved; a second try on a fresh instance does it.
      return once(lpText, limitSeconds);
    }
  };
}

function beginWith(model: Model, start: Readonly<Record<string, number>>): void {
  const columns = Object.entries(start).map(([name, value]) => ({ index: model.getColByName(name), value }));
  columns.sort((a, b) => a.index - b.index);
  model.setSolution({
    indices: columns.map(({ index }) => index),
    values: columns.map(({ value }) => value),
  });
}

function answerOf(model: Model): MilpAnswer {
  const status = statuses[model.getModelStatus()] ?? 'failed';
  const bound = Number(model.info.get('mip_dual_bound'));
  const isSolved = status === 'optimal' || status === 'time-limit';
  return {
    status,
    objective: status === 'optimal' ? model.getObjectiveValue() : null,
    bound: isSolved && Number.isFinite(bound) ? bound : null,
    values: isSolved ? valuesOf(model) : null,
  };
}

function valuesOf(model: Model): Record<string, number> {
  const { colValue } = model.getSolution();
  return Object.fromEntries(Array.from(colValue, (value, index) => [model.getColName(index), value]));
}
