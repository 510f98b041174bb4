import type { Species } from '@shared/contract';
import { fillSpecies, speciesAnswers, speciesBody } from './species-answers';

const corn: Species = {
  id: 1,
  commonName: 'corn snake',
  scientificName: 'Pantherophis guttatus',
  bandLowF: 60,
  bandHighF: 86,
  enduranceLowF: 48,
  enduranceHighF: 92,
  outdoorLowF: null,
  outdoorHighF: 84,
  typicalMassG: 160,
  venomous: false,
  note: '',
  active: true,
  version: 2,
};
const shapeOf = ({ id: _id, version: _version, ...shape }: Species) => shape;

describe.each(['F', 'C'] as const)('the form of a species in °%s', (unit) => {
  it('gives back what was stored, without rounding it', () => {
    const form = speciesAnswers();
    fillSpecies(form, corn, unit);
    expect(speciesBody(form, unit, corn)).toEqual(shapeOf(corn));
  });
});

describe('limits typed in °C', () => {
  // 30 °C is 86 °F and 60 °F is 15.6 °C by the definition of the scales.
  it('are shown and stored by the scales', () => {
    const form = speciesAnswers();
    fillSpecies(form, corn, 'C');
    expect([form.value.bandHighF, form.value.bandLowF]).toEqual([30, 15.6]);
    form.controls.bandLowF.setValue(20);
    expect(speciesBody(form, 'C', corn).bandLowF).toBe(68);
  });
  it('may be left out where the circle’s own hold', () => {
    const form = speciesAnswers();
    fillSpecies(form, corn, 'C');
    form.controls.outdoorHighF.setValue(null);
    expect(speciesBody(form, 'C', corn).outdoorHighF).toBeNull();
  });
});
