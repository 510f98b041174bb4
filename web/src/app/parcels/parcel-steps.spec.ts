import { parcelStates, type ParcelState, type Role } from '@shared/contract';
import { sampleParcel } from './parcel-samples';
import { parcelSteps, type ParcelSteps } from './parcel-steps';

const owner = { id: 4, roles: ['breeder'] as Role[] };
const coordinator = { id: 9, roles: ['coordinator'] as Role[] };
const admin = { id: 1, roles: ['admin'] as Role[] };
const statesWith = (step: keyof ParcelSteps, viewer = owner): ParcelState[] =>
  parcelStates.filter((state) => parcelSteps(sampleParcel({ state }), viewer)[step]);

describe('what can be done with a parcel', () => {
  it.each([
    ['canChooseDay', ['draft', 'seeking', 'booked', 'on-hold']],
    ['canTakeOffDay', ['seeking', 'booked', 'on-hold']],
    ['canPack', ['booked']],
    ['canUnpack', ['packed']],
    ['canClose', ['handed-over', 'arrived']],
    ['canCancel', ['draft', 'seeking', 'booked', 'packed', 'on-hold']],
    ['canTrack', ['packed', 'aboard', 'handed-over', 'arrived']],
  ] as const)('%s: %j', (step, states) => {
    expect(statesWith(step)).toEqual(states);
  });

  it('is nothing more once it is closed or cancelled', () => {
    for (const state of ['closed', 'cancelled'] as const)
      expect(Object.values(parcelSteps(sampleParcel({ state }), owner))).not.toContain(true);
  });

  it('leaves the choice of the day to the breeder and the coordinators', () => {
    expect(statesWith('canChooseDay', coordinator)).toEqual(statesWith('canChooseDay', owner));
    expect(statesWith('canChooseDay', admin)).toEqual([]);
    expect(statesWith('canPack', admin)).toEqual(['booked']);
  });
});
