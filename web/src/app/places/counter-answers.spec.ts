import { counterNew, type Counter } from '@shared/contract';
import { copyFirstDay, counterAnswers, counterBody, fillCounter } from './counter-answers';

const counter: Counter = {
  id: 7,
  carrierId: 2,
  name: 'Airport counter',
  street: '1 Mesa Road',
  city: 'Boise',
  state: 'ID',
  postalCode: '83705',
  lat: 43.5661,
  lon: -116.2228,
  zone: 'America/Boise',
  canDropOff: true,
  canHold: true,
  workingDays: [1, 2, 6],
  cutOffMinutes: { '1': 990, '6': 1440 },
  openingHours: { '1': { openMinute: 0, closeMinute: 1440 }, '7': { openMinute: 600, closeMinute: 720 } },
  commitMinute: 540,
  active: false,
  version: 3,
};

const shapeOf = ({ id: _id, version: _version, ...shape }: Counter) => shape;

describe('the form of a counter', () => {
  it('gives back what was stored, midnight and days off included', () => {
    const form = counterAnswers();
    fillCounter(form, counter);
    const body = counterBody(form);
    expect(body).toEqual(shapeOf(counter));
    expect(counterNew.safeParse(body).success).toBe(true);
  });

  it('has no cut-off once it takes nothing in', () => {
    const form = counterAnswers();
    fillCounter(form, counter);
    form.controls.canDropOff.setValue(false);
    expect(counterBody(form).cutOffMinutes).toEqual({});
  });

  it('gives the other working days the times of the first, and days off none', () => {
    const form = counterAnswers();
    form.controls.days.at(0).patchValue({ opens: '08:00', closes: '18:00' });
    copyFirstDay(form);
    const { openingHours } = counterBody(form);
    expect(Object.keys(openingHours)).toEqual(['1', '2', '3', '4', '5']);
    expect(openingHours['5']).toEqual({ openMinute: 480, closeMinute: 1080 });
    expect(form.dirty).toBe(true);
  });

  it('asks for what a counter cannot do without', () => {
    expect(counterAnswers().valid).toBe(false);
  });
});
