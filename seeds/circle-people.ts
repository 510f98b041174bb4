import type { Role } from '../shared/src/contract';

export interface PersonSeed {
  readonly email: string;
  readonly name: string;
  readonly roles: readonly Role[];
  readonly businessName?: string;
  readonly phone: string;
  readonly street: string;
  readonly city: string;
  readonly state: string;
  readonly postalCode: string;
  readonly lat: number;
  readonly lon: number;
  /** Collection window and the drop-off counter's city. */
  readonly breeder?: {
    readonly open: number;
    readonly close: number;
    readonly counterCity: 'San Antonio' | 'Austin';
  };
  readonly coordinator?: {
    readonly capacityL: number;
    readonly longestRunMinutes: number;
    readonly freeWeekdays: readonly number[];
  };
}

const texas = (
  city: string,
  postalCode: string,
  lat: number,
  lon: number,
  street: string,
  phone: string,
) => ({
  city,
  state: 'TX',
  postalCode,
  lat,
  lon,
  street,
  phone,
});

/** The Hill Country circle, invented. Town positions are real, nothing else is. */
export const people: readonly PersonSeed[] = [
  {
    email: 'admin@example.org',
    name: 'Ruth Calloway',
    roles: ['admin'],
    ...texas('San Antonio', '78209', 29.4889, -98.4571, '12 Heron Court', '210-555-0100'),
  },
  {
    email: 'coordinator@example.org',
    name: 'Delia Marsh',
    roles: ['coordinator'],
    ...texas('San Antonio', '78230', 29.5407, -98.5542, '301 Pecan Hollow', '210-555-0101'),
    coordinator: { capacityL: 160, longestRunMinutes: 330, freeWeekdays: [1, 2, 3, 4] },
  },
  {
    email: 'marco@example.org',
    name: 'Marco Alvarado',
    roles: ['coordinator', 'breeder'],
    businessName: 'Comal Bend Reptiles',
    ...texas('New Braunfels', '78130', 29.703, -98.1245, '9 Gruene Terrace', '830-555-0102'),
    breeder: { open: 480, close: 960, counterCity: 'San Antonio' },
    coordinator: { capacityL: 120, longestRunMinutes: 300, freeWeekdays: [2, 3, 4] },
  },
  {
    email: 'breeder@example.org',
    name: 'Hanna Weiss',
    roles: ['breeder'],
    businessName: 'Third Draw Serpents',
    ...texas('Boerne', '78006', 29.7947, -98.732, '44 Cibolo Ledge', '830-555-0103'),
    breeder: { open: 600, close: 930, counterCity: 'San Antonio' },
  },
  {
    email: 'tomas@example.org',
    name: 'Tomas Okafor',
    roles: ['breeder'],
    businessName: 'Walnut Branch Geckos',
    ...texas('Seguin', '78155', 29.5688, -97.9647, '7 Pecan Levee', '830-555-0104'),
    breeder: { open: 540, close: 960, counterCity: 'San Antonio' },
  },
  {
    email: 'june@example.org',
    name: 'June Abernathy',
    roles: ['breeder'],
    businessName: 'Spring Lake Scales',
    ...texas('San Marcos', '78666', 29.8833, -97.9414, '130 Cypress Rise', '512-555-0105'),
    breeder: { open: 540, close: 930, counterCity: 'San Antonio' },
  },
  {
    email: 'priya@example.org',
    name: 'Priya Nair',
    roles: ['breeder'],
    businessName: 'Limestone Dragons',
    ...texas('Helotes', '78023', 29.578, -98.6898, '21 Scenic Draw', '210-555-0106'),
    breeder: { open: 600, close: 990, counterCity: 'San Antonio' },
  },
  {
    email: 'walt@example.org',
    name: 'Walt Jernigan',
    roles: ['breeder'],
    businessName: 'Medina Valley Boas',
    ...texas('Castroville', '78009', 29.3558, -98.8786, '5 Millrace Lane', '830-555-0107'),
    breeder: { open: 540, close: 960, counterCity: 'San Antonio' },
  },
];

/** Buyers: name, e-mail and the hold counter's city. The first one can sign in. */
export const buyers = [
  ['Noor Haddad', 'buyer@example.org', 'Phoenix'],
  ['Ellis Grant', 'ellis@example.org', 'Miami'],
  ['Sofia Lindqvist', 'sofia@example.org', 'Los Angeles'],
  ['Kenji Morrow', 'kenji@example.org', 'Honolulu'],
  ['Abby Fontaine', 'abby@example.org', 'Kenner'],
  ['Luis Carmody', 'luis@example.org', 'Houston'],
  ['Mei Thornton', 'mei@example.org', 'San Diego'],
  ['Gus Petrakis', 'gus@example.org', 'Orlando'],
  ['Dana Whitlock', 'dana@example.org', 'Las Vegas'],
  ['Ivo Sandoval', 'ivo@example.org', 'Albuquerque'],
  ['Carmen Oyelaran', 'carmen@example.org', 'Atlanta'],
  ['Theo Blanchard', 'theo@example.org', 'Denver'],
  ['Rosa Whitfield', 'rosa@example.org', 'Newark'],
  ['Piet Aldersey', 'piet@example.org', 'Seattle'],
  ['Lena Kowalczyk', 'lena@example.org', 'Chicago'],
  ['Sam Tallchief', 'sam@example.org', 'Oklahoma City'],
  ['Bea Romano', 'bea@example.org', 'Tampa'],
  ['Oskar Dietrich', 'oskar@example.org', 'Duluth'],
  ['Fay Sorrell', 'fay@example.org', 'Sacramento'],
  ['Nils Beckett', 'nils@example.org', 'Flagstaff'],
  ['Tess Maddox', 'tess@example.org', 'Mobile'],
  ['Hugo Larkin', 'hugo@example.org', 'Boston'],
] as const;
