import type { Parcel, Proposal, Run, RunParcel, RunStop } from '@shared/contract';

/** Invented runs and parcels for the specs of this folder. */
export function sampleStop(over: Partial<RunStop> = {}): RunStop {
  return {
    seq: 1,
    breederId: 11,
    breederName: 'Third Draw',
    businessName: 'Third Draw Serpents',
    street: '12 Cypress Rd',
    city: 'Boerne',
    phone: '210-555-0144',
    lat: 29.79,
    lon: -98.73,
    arriveAt: '2026-12-08T19:10:00.000Z',
    leaveAt: '2026-12-08T19:20:00.000Z',
    waitMinutes: 0,
    driveMinutes: 35,
    miles: 24,
    aloneCents: 3200,
    parcelIds: [101, 102],
    ...over,
  };
}

export function sampleRunParcel(over: Partial<RunParcel> = {}): RunParcel {
  return {
    id: 101,
    code: 'HC-0101',
    state: 'booked',
    breederId: 11,
    breederName: 'Third Draw',
    what: '1 corn snake',
    destination: 'Flagstaff, AZ',
    volumeL: 10.6,
    verdict: 'open',
    pinned: false,
    shareCents: 810,
    ...over,
  };
}

export function sampleRun(over: Partial<Run> = {}): Run {
  return {
    id: 1,
    state: 'proposed',
    date: '2026-12-08',
    zone: 'America/Chicago',
    coordinator: { id: 21, name: 'Delia Marsh', capacityL: 120, lat: 29.42, lon: -98.49 },
    counter: { id: 31, name: 'Airport counter', city: 'San Antonio', state: 'TX', lat: 29.53, lon: -98.47 },
    departAt: '2026-12-08T18:35:00.000Z',
    arriveAt: '2026-12-08T21:05:00.000Z',
    cutOffAt: '2026-12-08T22:00:00.000Z',
    slackMinutes: 55,
    driveMinutes: 97,
    miles: 68,
    lastLegMinutes: 38,
    loadL: 61,
    fixedCents: 1200,
    drivingCents: 1230,
    costCents: 2430,
    aloneCents: 3200,
    stops: [sampleStop()],
    parcels: [sampleRunParcel(), sampleRunParcel({ id: 102, code: 'HC-0102', verdict: 'tight' })],
    problems: [],
    note: '',
    version: 3,
    ...over,
  };
}

export function sampleProposal(over: Partial<Proposal> = {}): Proposal {
  return {
    at: '2026-12-01T12:00:00.000Z',
    runs: [sampleRun()],
    unplaced: [],
    costCents: 12100,
    objectiveCents: 12500,
    boundCents: 12300,
    gap: 0.014,
    boundKind: 'proven',
    aloneCents: 19500,
    aloneMinutes: 700,
    driveMinutes: 400,
    seconds: 1.2,
    ...over,
  };
}

export function sampleParcel(over: Partial<Parcel> = {}): Parcel {
  return {
    id: 201,
    code: 'HC-0201',
    state: 'seeking',
    breeder: { id: 11, name: 'Third Draw', businessName: null },
    buyer: { id: 41, name: 'Ines Calder', email: 'buyer@example.org', phone: null },
    contents: [
      {
        speciesId: 1,
        quantity: 1,
        massG: 160,
        commonName: 'corn snake',
        scientificName: 'Pantherophis guttatus',
      },
    ],
    totalMassG: 160,
    box: { id: 1, name: 'Small', volumeL: 10.6 },
    service: 'hold',
    dropOff: {
      counterId: 31,
      name: 'Airport counter',
      city: 'San Antonio',
      state: 'TX',
      zone: 'America/Chicago',
    },
    destination: {
      counterId: 32,
      name: 'Flagstaff counter',
      street: '210 Juniper Spur',
      city: 'Flagstaff',
      state: 'AZ',
      postalCode: '86001',
      zone: 'America/Phoenix',
    },
    readyFrom: '2026-12-07',
    latestDate: '2026-12-18',
    lastMealDate: null,
    shipDate: null,
    arrivalDate: null,
    flexible: { from: '2026-12-07', to: '2026-12-10' },
    acceptedTight: null,
    holdReason: null,
    run: null,
    shareCents: null,
    trackingNumber: null,
    arrivalUrl: 'https://dayberth.example.org/arrival/x',
    mornings: [],
    note: '',
    report: null,
    bookedVerdict: null,
    createdAt: '2026-12-01T12:00:00.000Z',
    updatedAt: '2026-12-01T12:00:00.000Z',
    version: 1,
    ...over,
  };
}
