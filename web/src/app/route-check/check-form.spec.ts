import type { RouteAnswers } from '../core/route-answers';
import { answersOf, checkForm, questionOf } from './check-form';

const blank: RouteAnswers = {
  service: 'hold',
  counterId: null,
  postalCode: null,
  contents: [],
  boxId: null,
  dropOffCounterId: null,
  date: null,
};
const contents = [{ speciesId: 1, quantity: 1, massG: 160 }];

describe('a route check', () => {
  it('asks nothing until place, contents and box are known', () => {
    expect(questionOf(checkForm(blank))).toBeNull();
    expect(questionOf(checkForm({ ...blank, contents, boxId: 1 }))).toBeNull();
    expect(questionOf(checkForm({ ...blank, counterId: 22, boxId: 1 }))).toBeNull();
    expect(questionOf(checkForm({ ...blank, counterId: 22, contents }))).toBeNull();
  });

  it('asks for the hold counter, and for nothing that was not answered', () => {
    expect(questionOf(checkForm({ ...blank, counterId: 22, contents, boxId: 1 }))).toEqual({
      destination: { counterId: 22 },
      service: 'hold',
      contents,
      boxId: 1,
    });
  });

  it('asks for the ZIP code of a door, whatever counter was chosen before', () => {
    const form = checkForm({
      ...blank,
      service: 'door',
      counterId: 22,
      postalCode: '86001',
      contents,
      boxId: 1,
      dropOffCounterId: 2,
    });
    expect(questionOf(form)).toEqual({
      destination: { postalCode: '86001' },
      service: 'door',
      contents,
      boxId: 1,
      dropOffCounterId: 2,
    });
    form.controls.postalCode.setValue('8600');
    expect(questionOf(form)).toBeNull();
  });

  it('carries its answers over with the day looked at', () => {
    const form = checkForm({ ...blank, counterId: 22, postalCode: '86001', contents, boxId: 1 });
    expect(answersOf(form, '2026-12-08')).toEqual({
      ...blank,
      counterId: 22,
      contents,
      boxId: 1,
      date: '2026-12-08',
    });
  });
});
