import { defaultPolicy, policySchema } from '@shared/policy/policy';
import { policyValues } from '@shared/policy/policy-paths';
import { policySections, rangeWords, readValue, withUnit, withValues, type PolicyRow } from './policy-values';

const rows = (unit: 'F' | 'C') =>
  new Map(
    policySections(defaultPolicy, defaultPolicy, unit).flatMap(({ rows: of }) =>
      of.map((row) => [row.path, row]),
    ),
  );
const row = (path: string, unit: 'F' | 'C' = 'F'): PolicyRow => rows(unit).get(path) as PolicyRow;
const shown = (path: string, unit: 'F' | 'C' = 'F') =>
  withUnit(row(path, unit).text, row(path, unit).unitWord);

describe('the policy on a page', () => {
  it('shows every value once', () => {
    expect([...rows('F').keys()].sort()).toEqual([...policyValues(defaultPolicy).keys()].sort());
  });

  it('writes each value with its unit', () => {
    expect(shown('guardRails.hold.lowF')).toBe('38 °F');
    expect(shown('chance.open')).toBe('95 %');
    expect(shown('journey.dropOffUntilMinute')).toBe('20:00');
    expect(shown('pooling.aloneCentsPerMile')).toBe('72.5 ¢ a mile');
  });

  it('shifts a temperature to °C, and only scales a difference of two', () => {
    expect(shown('journey.packed.indoorF', 'C')).toBe('22.2 °C'); // 72 °F
    expect(shown('sigmaF.1', 'C')).toBe('2.11 °C'); // 3.8 °F · 5/9
    expect(shown('journey.truck.cabinF', 'C')).toBe('5.56 °C'); // 10 °F · 5/9
  });

  it('names the range in the person’s unit', () => {
    expect(rangeWords(row('boxModel.startF', 'C'), 'C')).toBe('Use a number from 4.4 to 43.3 °C.');
    expect(rangeWords(row('chance.open'), 'F')).toBe('Use a number from 0 to 100 %.');
  });
});

describe('what is typed', () => {
  it('is read in the unit it is shown in', () => {
    expect(readValue('20', row('guardRails.hold.lowF', 'C'), 'C')).toBe(68);
    expect(readValue('5', row('journey.truck.cabinF', 'C'), 'C')).toBe(9);
    expect(readValue('97', row('chance.open'), 'F')).toBe(0.97);
    expect(readValue('19:30', row('journey.dropOffUntilMinute'), 'F')).toBe(1170);
    expect(readValue(' Flood Warning \n\n', row('shutAlerts'), 'F')).toEqual(['Flood Warning']);
  });

  it('is no number when nothing or a word stands there', () => {
    for (const text of ['', 'warm']) expect(readValue(text, row('fastDays'), 'F')).toBeNaN();
  });

  it('keeps the exact value where nothing was changed, though °C rounds it', () => {
    const cold = row('guardRails.hold.lowF', 'C');
    expect(cold.text).toBe('3.3');
    expect(readValue('3.3', cold, 'C')).toBe(38);
  });

  it('goes into a whole policy at its path and leaves the one before as it was', () => {
    const next = policySchema.parse(
      withValues(
        defaultPolicy,
        new Map([
          ['sigmaF.7', 9],
          ['journey.late.hub.exposure', 0.7],
        ]),
      ),
    );
    expect(next.sigmaF).toEqual([3, 3.8, 4.2, 4.7, 5.3, 6, 6.8, 9]);
    expect(next.journey.late.hub.exposure).toBe(0.7);
    expect(defaultPolicy.sigmaF[7]).toBe(7.6);
  });
});
