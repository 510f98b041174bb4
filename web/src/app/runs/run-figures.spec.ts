import {
  aboveBest,
  againstAlone,
  boundText,
  costChange,
  dollars,
  duration,
  load,
  proposalFigures,
  roadAgainstAlone,
  sharePerParcel,
  slackText,
  stopText,
} from './run-figures';
import { sampleProposal, sampleRun, sampleRunParcel, sampleStop } from './run-samples';

describe('the figures of a proposal', () => {
  it('tells cost, saving, distance from the best and what is left over', () => {
    expect(proposalFigures(sampleProposal()).map((figure) => `${figure.value} ${figure.label}`)).toEqual([
      '$121 for one run',
      '$74.00 less than driving alone',
      '5 h 00 min less on the road',
      '1.4 % at most above the best possible',
      '0 parcels not placed',
    ]);
  });

  it('says so when pooling costs more than driving alone', () => {
    expect(againstAlone(2000, 1500)).toEqual({ value: '$5.00 more', label: 'than driving alone' });
    expect(againstAlone(1500, 1500).value).toBe('The same');
  });

  it('says so when pooling keeps people on the road for longer', () => {
    expect(roadAgainstAlone(100, 80)).toEqual({ value: '20 min more', label: 'on the road' });
  });

  it('calls a bound a limit only when it is proven', () => {
    expect(boundText(sampleProposal())).toContain('No plan can count less than $123.');
    const estimate = boundText(sampleProposal({ boundKind: 'estimate' }));
    expect(estimate).toContain('estimated at $123');
    expect(estimate).not.toContain('No plan can');
  });

  it('promises nothing on a bound that is not proven', () => {
    expect(aboveBest(0.0312, 'estimate')).toEqual({
      value: 'About 3.1 %',
      label: 'above the best possible, an estimate',
    });
  });
});

describe('the figures of a run', () => {
  it('shares the cost by parcel on average', () => {
    expect(sharePerParcel(sampleRun())).toBe('about $12.15 a parcel');
    expect(sharePerParcel(sampleRun({ parcels: [] }))).toBeNull();
  });

  it('fills the load bar to the full at most, and tells an overload', () => {
    expect(load(sampleRun())).toEqual({ text: '61 of 120 L', percent: 51, isOver: false });
    expect(load(sampleRun({ loadL: 140 }))).toEqual({ text: '140 of 120 L', percent: 100, isOver: true });
  });

  it('tells waiting and tight parcels at a stop', () => {
    expect(stopText(sampleStop({ waitMinutes: 9.6 }), sampleRun())).toBe('2 parcels, waits 10 min, 1 tight');
    const tight = sampleRun({
      parcels: [sampleRunParcel({ verdict: 'tight' }), sampleRunParcel({ id: 102, verdict: 'tight' })],
    });
    expect(stopText(sampleStop(), tight)).toBe('2 parcels, all tight');
    expect(stopText(sampleStop({ parcelIds: [101] }), sampleRun())).toBe('1 parcel');
  });

  it('says room before the cut-off, and lateness as lateness', () => {
    expect(slackText(55.2)).toBe('55 min before cut-off');
    expect(slackText(-12)).toBe('12 min after cut-off');
  });

  it('writes money, durations and changes of cost plainly', () => {
    expect(dollars(940)).toBe('$9.40');
    expect(duration(125)).toBe('2 h 05 min');
    expect(duration(40)).toBe('40 min');
    expect(costChange(-120)).toBe('The run costs $1.20 less.');
    expect(costChange(0)).toBe('The run costs the same.');
  });
});
