import { personNew, personPatch, type Person } from '@shared/contract';
import { fillPerson, followRoles, personAnswers, personNewBody, personPatchBody } from './person-answers';

const driver: Person = {
  id: 2,
  email: 'dee@example.org',
  roles: ['breeder', 'coordinator'],
  name: 'Dee Marsh',
  businessName: null,
  phone: '210-555-0101',
  street: '301 Pecan Hollow',
  city: 'San Antonio',
  state: 'TX',
  postalCode: '78230',
  lat: 29.5407,
  lon: -98.5542,
  zone: 'America/Chicago',
  temperatureUnit: 'F',
  active: true,
  hasPassword: true,
  breeder: { windowOpenMinute: 540, windowCloseMinute: 780, serviceMinutes: 8, dropOffCounterId: 1 },
  coordinator: { capacityL: 160, longestRunMinutes: 330, centsPerMile: 73, freeWeekdays: [1, 2, 3] },
  version: 5,
};

describe('the form of a person', () => {
  it('gives back what was stored; the position is left to the server', () => {
    const form = personAnswers();
    fillPerson(form, driver);
    const body = personPatchBody(form);
    expect(body).toEqual({
      name: 'Dee Marsh',
      businessName: null,
      phone: '210-555-0101',
      street: '301 Pecan Hollow',
      city: 'San Antonio',
      state: 'TX',
      postalCode: '78230',
      zone: 'America/Chicago',
      roles: ['breeder', 'coordinator'],
      breeder: driver.breeder,
      coordinator: driver.coordinator,
    });
    expect(personPatch.safeParse(body).success).toBe(true);
  });

  it('asks for a profile only with its role', () => {
    const form = personAnswers();
    form.patchValue({ email: 'bo@example.org', name: 'Bo', roles: { buyer: true } });
    followRoles(form);
    expect(form.valid).toBe(true);
    const body = personNewBody(form);
    expect(body).toMatchObject({ roles: ['buyer'], email: 'bo@example.org' });
    expect(body).not.toHaveProperty('breeder');
    expect(personNew.safeParse(body).success).toBe(true);

    form.controls.roles.controls.breeder.setValue(true);
    followRoles(form);
    expect(form.get('breeder.dropOffCounterId')?.errors).toEqual({ required: true });
  });

  it('keeps money in whole cents', () => {
    const form = personAnswers();
    fillPerson(form, driver);
    // 0.29 · 100 is 28.999999999999996 in floating point.
    form.controls.coordinator.controls.dollarsPerMile.setValue(0.29);
    expect(personPatchBody(form).coordinator?.centsPerMile).toBe(29);
  });
});
