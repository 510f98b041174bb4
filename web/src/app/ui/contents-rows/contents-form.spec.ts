import type { Species } from '@shared/contract';
import {
  contentLineForm,
  contentLines,
  contentsForm,
  loadText,
  massText,
  prefillMass,
} from './contents-form';

const species = (id: number, typicalMassG: number): Species => ({
  id,
  commonName: 'corn snake',
  scientificName: 'Pantherophis guttatus',
  bandLowF: 60,
  bandHighF: 86,
  enduranceLowF: 48,
  enduranceHighF: 92,
  outdoorLowF: null,
  outdoorHighF: null,
  typicalMassG,
  venomous: false,
  note: '',
  active: true,
  version: 1,
});
const list = [species(1, 160), species(2, 35)];

describe('the contents of a box', () => {
  it('start with one row for one animal', () => {
    expect(contentsForm().getRawValue()).toEqual([{ speciesId: null, quantity: 1, massG: null }]);
  });

  it('are not known until every row is filled in', () => {
    const form = contentsForm([{ speciesId: 1, quantity: 2, massG: 160 }]);
    expect(contentLines(form)).toEqual([{ speciesId: 1, quantity: 2, massG: 160 }]);
    form.push(contentLineForm());
    expect(contentLines(form)).toBeNull();
  });

  it.each([
    ['no animal', { quantity: 0 }],
    ['half an animal', { quantity: 1.5 }],
    ['more than fit into a box', { quantity: 51 }],
    ['nothing weighed', { massG: 0 }],
    ['more than 50 kg', { massG: 50001 }],
  ])('are not known with %s', (_case, change) => {
    expect(contentLines(contentsForm([{ speciesId: 1, quantity: 1, massG: 160, ...change }]))).toBeNull();
  });

  it('can be asked again after the server complained of a row', () => {
    const form = contentsForm([{ speciesId: 1, quantity: 1, massG: 160 }]);
    form.at(0).controls.speciesId.setErrors({ server: 'The circle does not ship it any more.' });
    expect(contentLines(form)).not.toBeNull();
  });
});

describe('the mass of one animal', () => {
  it('is the typical one of its species', () => {
    const row = contentLineForm();
    row.controls.speciesId.setValue(1);
    prefillMass(row, list);
    expect(row.controls.massG.value).toBe(160);
  });

  it('follows a change of species', () => {
    const row = contentLineForm();
    row.controls.speciesId.setValue(1);
    prefillMass(row, list);
    row.controls.speciesId.setValue(2);
    prefillMass(row, list);
    expect(row.controls.massG.value).toBe(35);
  });

  it('stays as it was weighed', () => {
    const row = contentLineForm();
    row.controls.massG.setValue(142);
    row.controls.massG.markAsDirty();
    row.controls.speciesId.setValue(1);
    prefillMass(row, list);
    expect(row.controls.massG.value).toBe(142);
  });
});

describe('the load in words', () => {
  it('counts animals and adds masses', () => {
    const lines = [
      { speciesId: 1, quantity: 1, massG: 160 },
      { speciesId: 2, quantity: 2, massG: 35 },
    ];
    expect(loadText(lines)).toBe('3 animals, 230 g');
    expect(loadText([{ speciesId: 1, quantity: 1, massG: 900 }])).toBe('1 animal, 900 g');
    expect(loadText(null)).toBe('');
  });

  it.each([
    [35.5, '35.5 g'],
    [999, '999 g'],
    [1350, '1.35 kg'],
    [12000, '12 kg'],
  ])('writes %d g as %s', (massG, text) => {
    expect(massText(massG)).toBe(text);
  });
});
