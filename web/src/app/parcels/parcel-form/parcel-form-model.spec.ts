import type { RouteAnswers } from '../../core/route-answers';
import { sampleParcel } from '../parcel-samples';
import {
  fillFrom,
  fillNew,
  followService,
  isNoteOnly,
  newBody,
  parcelForm,
  patchBody,
} from './parcel-form-model';

const answers: RouteAnswers = {
  service: 'hold',
  counterId: 28,
  postalCode: null,
  contents: [{ speciesId: 1, quantity: 1, massG: 160 }],
  boxId: 1,
  dropOffCounterId: 2,
  date: null,
};
const buyer = { name: 'Kenji Morrow', email: 'kenji@example.org', phone: '' };

describe('a new parcel', () => {
  it('takes over what the route check had answered', () => {
    const form = parcelForm();
    fillNew(form, answers, '2026-12-01');
    form.patchValue({ buyer });
    expect(form.valid).toBe(true);
    expect(newBody(form)).toEqual({
      buyer: { name: 'Kenji Morrow', email: 'kenji@example.org', phone: null },
      contents: [{ speciesId: 1, quantity: 1, massG: 160 }],
      boxId: 1,
      service: 'hold',
      holdCounterId: 28,
      door: null,
      dropOffCounterId: 2,
      readyFrom: '2026-12-01',
      latestDate: '2026-12-14',
      lastMealDate: null,
      note: '',
    });
  });

  it('leaves a fortnight from the day that was looked at', () => {
    const form = parcelForm();
    fillNew(form, { ...answers, date: '2026-12-09' }, '2026-12-01');
    expect(form.controls.latestDate.value).toBe('2026-12-22');
  });

  it('asks for the address of a door, and for a counter only when it is held', () => {
    const form = parcelForm();
    fillNew(form, { ...answers, service: 'door', counterId: null, postalCode: '86001' }, '2026-12-01');
    form.patchValue({ buyer });
    expect(form.valid).toBe(false);
    form.controls.door.patchValue({ street: '4 Cinder Lane', city: 'Flagstaff', state: 'AZ' });
    expect(form.valid).toBe(true);
    expect(newBody(form)).toMatchObject({
      holdCounterId: null,
      door: { street: '4 Cinder Lane', city: 'Flagstaff', state: 'AZ', postalCode: '86001' },
    });
    form.controls.service.setValue('hold');
    followService(form);
    expect(form.valid).toBe(false);
    expect(form.controls.holdCounterId.hasError('required')).toBe(true);
  });

  it('has its latest day after its first', () => {
    const form = parcelForm();
    fillNew(form, answers, '2026-12-01');
    form.patchValue({ buyer, readyFrom: '2026-12-10', latestDate: '2026-12-09' });
    expect(form.controls.latestDate.errors).toEqual({ order: 'The latest day is before the first.' });
    form.controls.latestDate.setValue('2026-12-10');
    expect(form.valid).toBe(true);
  });

  it('names the breeder only when it is entered for somebody', () => {
    const form = parcelForm();
    fillNew(form, answers, '2026-12-01');
    expect(newBody(form)).not.toHaveProperty('breederId');
    form.controls.breederId.setValue(5);
    expect(newBody(form).breederId).toBe(5);
  });
});

describe('a stored parcel', () => {
  it('sends back what it came with when nothing was changed', () => {
    const form = parcelForm();
    fillFrom(form, sampleParcel({ lastMealDate: '2026-11-27', note: 'Shy.' }));
    expect(patchBody(form, false)).toEqual({
      buyer: { name: 'Kenji Morrow', email: 'kenji@example.org', phone: '555-0123' },
      contents: [{ speciesId: 1, quantity: 1, massG: 160 }],
      boxId: 1,
      service: 'hold',
      holdCounterId: 28,
      door: null,
      dropOffCounterId: 1,
      readyFrom: '2026-12-02',
      latestDate: '2026-12-19',
      lastMealDate: '2026-11-27',
      note: 'Shy.',
    });
  });

  it.each([
    ['draft', false],
    ['seeking', false],
    ['booked', false],
    ['on-hold', false],
    ['packed', true],
    ['aboard', true],
    ['handed-over', true],
    ['closed', true],
  ] as const)('in state %s keeps all but its note: %s', (state, expected) => {
    expect(isNoteOnly(sampleParcel({ state }))).toBe(expected);
  });

  it('sends only its note once it is packed', () => {
    const form = parcelForm();
    fillFrom(form, sampleParcel({ state: 'packed' }));
    form.controls.note.setValue('Gate code 12.');
    expect(patchBody(form, true)).toEqual({ note: 'Gate code 12.' });
  });
});
