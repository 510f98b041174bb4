import { defaultPolicy } from '@shared/policy/policy';
import { howNumbers, legWords } from './how-numbers';

describe('the numbers on "How this is worked out"', () => {
  // Design 5.3: a 12 × 9 × 6 in box with ¾ in foam has UA = 0.363 W/K; 500 + 3400 · 0.2 kg = 1180 J/K; 1180 / 0.363 s = 0.9 h.
  it('show the sample box with the present values', () => {
    expect(howNumbers(defaultPolicy, 'F')).toMatchObject({
      sampleUa: '0.363',
      sampleHeat: '1180',
      sampleHours: '0.9',
      coldKJ: '75', // 0.225 kg · 334 kJ/kg = 75.15 kJ
      open: '95 %',
      holdRail: '38 to 90 °F',
    });
  });

  it('follow the policy and the person’s unit', () => {
    const policy = { ...defaultPolicy, minSlackDays: 1, hubRail: { lowF: 14, highF: 95 } };
    const numbers = howNumbers(policy, 'C');
    expect(numbers.slack).toBe('fewer than 1 shut the day');
    expect(numbers.hubRail).toBe('-10 to 35 °C');
    expect(numbers.sigmas[5]).toEqual({ day: 5, text: '3.3 °C' }); // 6 °F · 5/9
  });

  it('name each leg with its share of the outdoor air', () => {
    const legs = legWords(defaultPolicy, 'F');
    expect(legs).toHaveLength(11);
    expect(legs.find(({ name }) => name === 'Sort hub')).toMatchObject({
      outdoors: '50 %',
      indoors: '65 °F',
    });
    expect(legs.find(({ name }) => name.startsWith('To the door'))).toMatchObject({
      outdoors: '100 %',
      indoors: '–',
    });
  });
});
