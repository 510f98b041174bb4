import type { Blackout } from '@shared/contract';
import { blackoutNew } from '@shared/contract';
import { blackoutAnswers, bodyOf, fillAnswers } from './blackout-answers';

const thanksgiving: Blackout = {
  id: 9,
  title: 'Thanksgiving Day',
  kind: 'yearly',
  startDate: null,
  endDate: null,
  rules: 'FREQ=YEARLY;BYMONTH=11;BYDAY=4TH',
  liftedDates: ['2027-11-25'],
  scope: 'everywhere',
  carrierId: null,
  state: null,
  counterId: null,
  note: 'Federal holiday',
  source: 'federal-holiday',
  createdAt: '2026-01-01T00:00:00.000Z',
  version: 4,
};
const filled = (over: Partial<Blackout> = {}) => {
  const form = blackoutAnswers();
  fillAnswers(form, { ...thanksgiving, ...over });
  return form;
};

describe('the form of a blackout', () => {
  it('gives back what was stored when nothing is changed', () => {
    const body = bodyOf(filled(), thanksgiving);
    expect(body).toEqual({
      title: 'Thanksgiving Day',
      kind: 'yearly',
      startDate: null,
      endDate: null,
      rules: 'FREQ=YEARLY;BYMONTH=11;BYDAY=4TH',
      liftedDates: ['2027-11-25'],
      scope: 'everywhere',
      carrierId: null,
      state: null,
      counterId: null,
      note: 'Federal holiday',
    });
  });

  it('keeps the first and last year of a yearly rule that has them', () => {
    const bounded = { ...thanksgiving, startDate: '2026-01-01', endDate: '2030-12-31' };
    expect(bodyOf(filled(bounded), bounded)).toMatchObject({
      startDate: '2026-01-01',
      endDate: '2030-12-31',
    });
  });

  it('keeps a rule that the plain choices do not know word for word', () => {
    const rules = 'FREQ=YEARLY;BYYEARDAY=100';
    const form = filled({ rules });
    expect(form.controls.yearlyBy.value).toBe('written');
    expect(bodyOf(form, thanksgiving).rules).toBe(rules);
  });

  it('forgets the members of the kind and the scope that were left', () => {
    const form = filled({ kind: 'range', startDate: '2026-12-24', endDate: '2026-12-27', rules: null });
    form.patchValue({ kind: 'date', scope: 'state', state: 'AZ', counterId: 5, carrierId: 2 });
    const body = bodyOf(form, thanksgiving);
    expect(body).toMatchObject({ startDate: '2026-12-24', endDate: null, liftedDates: [], state: 'AZ' });
    expect([body.counterId, body.carrierId]).toEqual([null, null]);
    expect(blackoutNew.safeParse(body).success).toBe(true);
  });

  it('writes the observed weekday only where one can be written', () => {
    const form = filled();
    form.patchValue({ yearlyBy: 'fixed', month: 12, day: 25, isObserved: true });
    expect(bodyOf(form, null).rules?.split('\n')).toHaveLength(3);
    form.patchValue({ month: 2, day: 28 });
    expect(bodyOf(form, null).rules).toBe('FREQ=YEARLY;BYMONTH=2;BYMONTHDAY=28');
  });
});
