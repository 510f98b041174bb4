import { changesText, makerText } from './version-words';

const version = {
  version: 2,
  since: '2026-12-01T12:00:00.000Z',
  by: 'Ada',
  changed: ['chance.open', 'fastDays'],
};

describe('a version of the policy in words', () => {
  it('names who made it', () => {
    expect(makerText(version)).toBe('Ada');
    expect(makerText({ ...version, by: null })).toBe('the system');
    expect(makerText({ version: 0, since: null, by: null, changed: [] })).toBe('came with the program');
  });

  it('names what it changed by the labels of the fields', () => {
    expect(changesText(version)).toBe('Open from; Not fed before travelling.');
    expect(changesText({ version: 0, since: null, by: null, changed: [] })).toBe('All defaults.');
  });
});
