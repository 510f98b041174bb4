import { defaultPolicy } from './policy';
import { policyChange } from './policy-change';
import { policyGroups, policyNotes } from './policy-notes';
import { changedPaths, policyValues, readPolicy } from './policy-paths';

describe('what the program says about its settings', () => {
  it('has a note for every value of the policy and for none besides', () => {
    expect(Object.keys(policyNotes).sort()).toEqual([...policyValues(defaultPolicy).keys()].sort());
  });

  it('puts every value into exactly one group', () => {
    const members = policyGroups.flatMap((group) => group.members);
    expect([...members].sort()).toEqual(Object.keys(defaultPolicy).sort());
  });

  it('gives a range to every number, with the default inside it', () => {
    for (const [path, value] of policyValues(defaultPolicy)) {
      if (typeof value !== 'number') continue;
      const { min, max } = policyNotes[path] ?? {};
      expect([path, value >= (min ?? NaN), value <= (max ?? NaN)]).toEqual([path, true, true]);
    }
  });

  // references.md of the project, 4 and 5 and 10: what was read in a public text; everything else is an assumption.
  it('calls sourced only what was read somewhere', () => {
    const sourced = Object.entries(policyNotes).flatMap(([path, { source }]) => (source ? [path] : []));
    expect(sourced.sort()).toEqual([
      'boxModel.boardWPerMK',
      'boxModel.filmM2KPerW',
      'boxModel.foamWPerMK',
      'pooling.aloneCentsPerMile',
      'sigmaF.1',
    ]);
    expect(defaultPolicy.sigmaF[1]).toBe(3.8); // NOAA/NSSL: RMSE 3.80 °F
  });
});

describe('a policy', () => {
  it('accepts its own defaults as a change', () => {
    expect(policyChange.parse(defaultPolicy)).toEqual(defaultPolicy);
  });

  it('takes the default of what an old version lacks, and keeps a whole list as it was', () => {
    const read = readPolicy({ shutAlerts: [], guardRails: { door: { lowF: 45 } } });
    expect(read.shutAlerts).toEqual([]);
    expect(read.guardRails.door).toEqual({ lowF: 45, highF: 85 });
    expect(changedPaths(defaultPolicy, read)).toEqual(['guardRails.door.lowF', 'shutAlerts']);
  });
});
