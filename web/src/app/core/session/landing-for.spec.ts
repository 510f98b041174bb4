import type { Role } from '@shared/contract';
import { gateFor, landingFor, safeReturn } from './landing-for';

describe('landingFor', () => {
  // The first screens are the design's table of who comes to do what.
  it.each<[Role[], string]>([
    [['breeder'], '/parcels'],
    [['coordinator'], '/runs'],
    [['buyer'], '/my-arrivals'],
    [['admin'], '/desk'],
    [['breeder', 'coordinator'], '/runs'],
    [['buyer', 'breeder'], '/parcels'],
    [['buyer', 'admin', 'breeder'], '/desk'],
    [[], '/sign-in'],
  ])('takes %j to %s', (roles, url) => {
    expect(landingFor(roles)).toBe(url);
  });
});

describe('gateFor', () => {
  it('asks who is not signed in to sign in, and remembers the page', () => {
    expect(gateFor(null, [], '/parcels/7?x=1')).toBe('/sign-in?from=%2Fparcels%2F7%3Fx%3D1');
  });
  it('lets a role in that is allowed', () => {
    expect(gateFor(['breeder'], ['breeder', 'admin'], '/parcels')).toBe(true);
  });
  it('lets everyone signed in onto a page without a role of its own', () => {
    expect(gateFor(['buyer'], [], '/account')).toBe(true);
  });
  it('sends another role to its own first page', () => {
    expect(gateFor(['buyer'], ['admin'], '/desk')).toBe('/my-arrivals');
  });
});

describe('safeReturn', () => {
  it.each([
    ['/parcels/3', '/parcels/3'],
    ['//evil.example.org', null],
    ['/\\evil.example.org', null],
    ['https://evil.example.org', null],
    ['/sign-in?from=%2F', null],
    [null, null],
  ])('%s gives %s', (from, expected) => {
    expect(safeReturn(from)).toBe(expected);
  });
});
