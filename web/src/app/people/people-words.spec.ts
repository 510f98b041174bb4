import type { Person } from '@shared/contract';
import { foundPeople, personState } from './people-words';

const person = (over: Partial<Person>): Person => ({
  id: 1,
  email: 'ann@example.org',
  roles: ['breeder'],
  name: 'Ann Field',
  businessName: null,
  phone: null,
  street: null,
  city: 'Boerne',
  state: 'TX',
  postalCode: '78006',
  lat: null,
  lon: null,
  zone: 'America/Chicago',
  temperatureUnit: 'F',
  active: true,
  hasPassword: true,
  breeder: null,
  coordinator: null,
  version: 1,
  ...over,
});

describe('whether a person can come in', () => {
  it.each<[Partial<Person>, string]>([
    [{}, 'active'],
    [{ hasPassword: false }, 'invited'],
    [{ hasPassword: false, roles: ['buyer'] }, 'by-link'],
    [{ hasPassword: false, roles: ['buyer', 'breeder'] }, 'invited'],
    [{ active: false }, 'off'],
  ])('%j is %s', (over, state) => expect(personState(person(over))).toBe(state));
});

describe('looking for a person', () => {
  const all = [
    person({ id: 1 }),
    person({
      id: 2,
      name: 'Bo Lane',
      email: 'bo@example.org',
      roles: ['buyer'],
      city: null,
      hasPassword: false,
    }),
    person({ id: 3, name: 'Cy Moss', businessName: 'Moss Geckos', active: false }),
  ];
  const ids = (search: Partial<Parameters<typeof foundPeople>[1]>) =>
    foundPeople(all, { text: '', role: '', state: '', ...search }).map(({ id }) => id);

  it('finds by words, role and state', () => {
    expect(ids({})).toEqual([1, 2, 3]);
    expect(ids({ text: 'geckos' })).toEqual([3]);
    expect(ids({ text: 'BOERNE' })).toEqual([1, 3]);
    expect(ids({ role: 'buyer' })).toEqual([2]);
    expect(ids({ state: 'off' })).toEqual([3]);
  });
  it('does not find people by a word that stands for nothing', () =>
    expect(ids({ text: 'null' })).toEqual([]));
});
