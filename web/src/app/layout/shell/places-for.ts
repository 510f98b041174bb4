import type { Role } from '@shared/contract';

export interface NavPlace {
  readonly path: string;
  readonly label: string;
  readonly icon: string;
}

const places: readonly (NavPlace & { readonly roles: readonly Role[] })[] = [
  { path: '/desk', label: 'Desk', icon: 'desk', roles: ['admin'] },
  { path: '/parcels', label: 'Parcels', icon: 'parcel', roles: ['breeder', 'coordinator', 'admin'] },
  { path: '/route-check', label: 'Route check', icon: 'route', roles: ['breeder', 'coordinator', 'admin'] },
  { path: '/runs', label: 'Runs', icon: 'van', roles: ['breeder', 'coordinator', 'admin'] },
  { path: '/my-arrivals', label: 'My arrivals', icon: 'bell', roles: ['buyer'] },
  { path: '/blackouts', label: 'Calendar', icon: 'calendar', roles: ['breeder', 'coordinator', 'admin'] },
  { path: '/counters', label: 'Counters', icon: 'counter', roles: ['coordinator', 'admin'] },
  { path: '/species', label: 'Species', icon: 'species', roles: ['coordinator', 'admin'] },
  { path: '/boxes', label: 'Boxes', icon: 'box', roles: ['coordinator', 'admin'] },
  { path: '/policy', label: 'Policy', icon: 'thermometer', roles: ['coordinator', 'admin'] },
  { path: '/people', label: 'People', icon: 'people', roles: ['admin'] },
];

/** What the navigation offers to somebody with these roles, the way the day goes for them. */
export function placesFor(roles: readonly Role[]): readonly NavPlace[] {
  const own = places.filter((place) => place.roles.some((role) => roles.includes(role)));
  if (!roles.includes('coordinator') || roles.includes('admin')) return own;
  const runs = own.filter((place) => place.path === '/runs');
  return [...runs, ...own.filter((place) => place.path !== '/runs')];
}
