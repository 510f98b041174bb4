import { parcelStates } from '../contract/parcels';
import { runStates } from '../contract/runs';
import { canMoveParcel, parcelMoves } from './parcel-moves';
import { canMoveRun, runMoves } from './run-moves';

describe('the moves of a run', () => {
  it('lead from proposal to hand-over and no step is left out', () => {
    const way = ['proposed', 'confirmed', 'underway', 'handed-over', 'closed'] as const;
    for (const [index, from] of way.entries())
      for (const to of way) expect(canMoveRun(from, to)).toBe(to === way[index + 1]);
  });

  it('let a run be called off until it was handed over', () => {
    const mayBeCalledOff = runStates.filter((state) => canMoveRun(state, 'called-off'));
    expect(mayBeCalledOff).toEqual(['proposed', 'confirmed', 'underway']);
  });

  it('lead nowhere from the end', () => {
    expect(runStates.filter((state) => runMoves[state].length === 0)).toEqual(['closed', 'called-off']);
  });
});

describe('the moves of a parcel', () => {
  it('lead from a draft to closed', () => {
    const way = [
      'draft',
      'seeking',
      'booked',
      'packed',
      'aboard',
      'handed-over',
      'arrived',
      'closed',
    ] as const;
    way.slice(1).forEach((to, index) => expect(canMoveParcel(way[index] ?? 'closed', to)).toBe(true));
  });

  it('never lead back once the carrier has it', () => {
    const before = ['draft', 'seeking', 'booked', 'packed', 'aboard', 'on-hold', 'cancelled'] as const;
    for (const from of ['handed-over', 'arrived', 'closed'] as const)
      for (const to of before) expect(canMoveParcel(from, to)).toBe(false);
  });

  it('let a recheck take a parcel off its day from booking until it is aboard', () => {
    expect(parcelStates.filter((state) => canMoveParcel(state, 'on-hold'))).toEqual([
      'seeking',
      'booked',
      'packed',
      'aboard',
    ]);
  });

  it('never cancel what is aboard or gone, and lead nowhere from cancelled or closed', () => {
    for (const state of ['aboard', 'handed-over', 'arrived', 'closed'] as const)
      expect(canMoveParcel(state, 'cancelled')).toBe(false);
    expect(parcelStates.filter((state) => parcelMoves[state].length === 0)).toEqual(['closed', 'cancelled']);
  });

  it('staying put is not a move', () => {
    for (const state of parcelStates) expect(canMoveParcel(state, state)).toBe(false);
  });
});
