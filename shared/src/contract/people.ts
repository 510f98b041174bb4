import * as z from 'zod';
import {
  email,
  id,
  latitude,
  line,
  longitude,
  minuteOfDay,
  plainDate,
  prose,
  role,
  stateCode,
  version,
  weekday,
  zipCode,
  zone,
} from './common';
import { temperatureUnit } from './session';

/** How a breeder's parcels are collected. Window ends count: a driver may come at `windowCloseMinute` exactly. */
export const breederProfile = z.object({
  windowOpenMinute: minuteOfDay,
  windowCloseMinute: minuteOfDay,
  serviceMinutes: z.number().int().min(0).max(120),
  dropOffCounterId: id,
});
export type BreederProfile = z.infer<typeof breederProfile>;

/** What a coordinator drives with, and when. */
export const coordinatorProfile = z.object({
  capacityL: z.number().positive().max(20000),
  longestRunMinutes: z.number().int().min(30).max(900),
  centsPerMile: z.number().int().min(0).max(1000),
  freeWeekdays: z.array(weekday).max(7),
});
export type CoordinatorProfile = z.infer<typeof coordinatorProfile>;

/** `GET /api/coordinators`: whom a run can be given to. */
export const coordinatorSummary = z.object({
  id,
  name: z.string(),
  capacityL: z.number(),
  freeWeekdays: z.array(weekday),
});
export type CoordinatorSummary = z.infer<typeof coordinatorSummary>;

/** `GET /api/breeders`: for whom a coordinator or admin can enter a parcel, and where theirs are dropped off. */
export const breederSummary = z.object({
  id,
  name: z.string(),
  businessName: z.string().nullable(),
  dropOffCounterId: id,
});
export type BreederSummary = z.infer<typeof breederSummary>;

export const daysAway = z
  .object({ from: plainDate, to: plainDate, note: prose(200).default('') })
  .refine((span) => span.from <= span.to, { path: ['to'], message: 'The last day is before the first.' });
export type DaysAway = z.infer<typeof daysAway>;

const shape = {
  name: line(120, 'The name'),
  businessName: line(120).nullable(),
  phone: line(30).nullable(),
  street: line(160).nullable(),
  city: line(80).nullable(),
  state: stateCode.nullable(),
  postalCode: zipCode.nullable(),
  lat: latitude.nullable(),
  lon: longitude.nullable(),
  zone,
};

export const person = z.object({
  id,
  email: z.string(),
  roles: z.array(role),
  ...shape,
  temperatureUnit,
  active: z.boolean(),
  hasPassword: z.boolean(),
  breeder: breederProfile.nullable(),
  coordinator: coordinatorProfile.nullable(),
  version,
});
export type Person = z.infer<typeof person>;

/** Admin's `POST /api/people`: creates and sends an invitation by e-mail. */
export const personNew = z.object({
  email,
  roles: z.array(role).min(1, 'Choose at least one role.'),
  name: shape.name,
  businessName: shape.businessName.default(null),
  phone: shape.phone.default(null),
  street: shape.street.default(null),
  city: shape.city.default(null),
  state: shape.state.default(null),
  postalCode: shape.postalCode.default(null),
  lat: shape.lat.default(null),
  lon: shape.lon.default(null),
  zone: shape.zone.optional(),
  breeder: breederProfile.nullable().default(null),
  coordinator: coordinatorProfile.nullable().default(null),
});
export type PersonNew = z.input<typeof personNew>;

export const personPatch = z
  .object({
    ...shape,
    roles: z.array(role).min(1),
    active: z.boolean(),
    breeder: breederProfile.nullable(),
    coordinator: coordinatorProfile.nullable(),
  })
  .partial();
export type PersonPatch = z.input<typeof personPatch>;

/** `PATCH /api/me`: what a person may change of themselves. */
export const mePatch = z
  .object({
    name: shape.name,
    phone: shape.phone,
    zone,
    temperatureUnit,
    breeder: breederProfile.omit({ dropOffCounterId: true }).partial(),
    coordinator: coordinatorProfile.partial(),
  })
  .partial();
export type MePatch = z.input<typeof mePatch>;

/** `GET/PUT /api/me/availability`: days away, and for coordinators single days that differ from the weekly pattern. */
export const availability = z.object({
  daysAway: z.array(daysAway).max(100),
  drivingDays: z.array(z.object({ date: plainDate, free: z.boolean() })).max(200),
});
export type Availability = z.infer<typeof availability>;
