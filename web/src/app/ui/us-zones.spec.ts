import { zoneChoices, zoneName } from './us-zones';

describe('a zone in words', () => {
  // Names by the Unicode Common Locale Data Repository.
  it.each([
    ['America/Chicago', 'Central Time'],
    ['America/Boise', 'Mountain Time'],
  ])('%s is %s', (zone, name) => expect(zoneName(zone)).toBe(name));
});

describe('the choices of a zone', () => {
  it('keep a stored zone that is not among them', () => {
    expect(zoneChoices('America/Detroit').at(-1)).toEqual(['America/Detroit', 'America/Detroit']);
    expect(zoneChoices('America/Chicago').filter(([zone]) => zone === 'America/Chicago')).toHaveLength(1);
  });
});
