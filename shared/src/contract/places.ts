import * as z from 'zod';
import {
  id,
  latitude,
  line,
  longitude,
  minuteOfDay,
  prose,
  stateCode,
  version,
  weekday,
  zipCode,
  zone,
} from './common';

export const carrier = z.object({ id, name: z.string(), hubId: id });
export type Carrier = z.infer<typeof carrier>;

export const hub = z.object({
  id,
  name: z.string(),
  city: z.string(),
  state: z.string(),
  lat: latitude,
  lon: longitude,
  zone: z.string(),
});
export type Hub = z.infer<typeof hub>;

/** Minutes by ISO weekday ("1".."7"); a weekday that is missing has none (no drop-off, or closed). */
export const minuteByWeekday = z.partialRecord(z.enum(['1', '2', '3', '4', '5', '6', '7']), minuteOfDay);
export const hoursByWeekday = z.partialRecord(
  z.enum(['1', '2', '3', '4', '5', '6', '7']),
  z
    .object({ openMinute: minuteOfDay, closeMinute: minuteOfDay })
    .refine((hours) => hours.openMinute < hours.closeMinute, {
      path: ['closeMinute'],
      message: 'It closes before it opens.',
    }),
);

const counterShape = {
  carrierId: id,
  name: line(120, 'The name'),
  street: line(160, 'The street'),
  city: line(80, 'The city'),
  state: stateCode,
  postalCode: zipCode,
  lat: latitude,
  lon: longitude,
  zone,
  canDropOff: z.boolean(),
  canHold: z.boolean(),
  /** Days on which the counter works for us (drop-off accepted, held parcels handed out). */
  workingDays: z.array(weekday).max(7),
  /** Latest hand-over by weekday, minutes after local midnight; empty for a counter that only holds. */
  cutOffMinutes: minuteByWeekday,
  openingHours: hoursByWeekday,
  /** When an overnight parcel is ready to be collected, minutes after local midnight. */
  commitMinute: minuteOfDay,
  active: z.boolean(),
};
export const counter = z.object({ id, ...counterShape, version });
export type Counter = z.infer<typeof counter>;
export const counterNew = z.object(counterShape);
export type CounterNew = z.infer<typeof counterNew>;
export const counterPatch = counterNew.partial();
export type CounterPatch = z.infer<typeof counterPatch>;

const tempF = z.number().min(-40).max(140);
const speciesShape = {
  commonName: line(80, 'The common name'),
  scientificName: line(120, 'The scientific name'),
  bandLowF: tempF,
  bandHighF: tempF,
  enduranceLowF: tempF,
  enduranceHighF: tempF,
  /** The species' own outdoor limits; they only tighten the circle's guard rails. Null: the circle's alone hold. */
  outdoorLowF: tempF.nullable(),
  outdoorHighF: tempF.nullable(),
  typicalMassG: z.number().positive().max(50000),
  venomous: z.boolean(),
  note: prose(500),
  active: z.boolean(),
};
const inOrder = (s: { bandLowF: number; bandHighF: number; enduranceLowF: number; enduranceHighF: number }) =>
  s.enduranceLowF <= s.bandLowF && s.bandLowF < s.bandHighF && s.bandHighF <= s.enduranceHighF;
export const species = z.object({ id, ...speciesShape, version });
export type Species = z.infer<typeof species>;
export const speciesNew = z.object(speciesShape).refine(inOrder, {
  path: ['bandLowF'],
  message: 'Keep the order: endurance low, band low, band high, endurance high.',
});
export type SpeciesNew = z.infer<typeof speciesNew>;
/** A whole record: a patch of one limit could break the order without the others in view. */
export const speciesPatch = z.object(speciesShape).partial();
export type SpeciesPatch = z.infer<typeof speciesPatch>;

const boxShape = {
  name: line(80, 'The name'),
  lengthIn: z.number().positive().max(60),
  widthIn: z.number().positive().max(60),
  heightIn: z.number().positive().max(60),
  foamIn: z.number().positive().max(6),
  active: z.boolean(),
};
/** Outer sizes in inches; `volumeL` is what the box takes up in a vehicle, in litres. */
export const box = z.object({ id, ...boxShape, volumeL: z.number(), version });
export type Box = z.infer<typeof box>;
export const boxNew = z
  .object(boxShape)
  .refine((size) => 2 * size.foamIn < Math.min(size.lengthIn, size.widthIn, size.heightIn), {
    path: ['foamIn'],
    message: 'Foam this thick leaves no room inside.',
  });
export type BoxNew = z.infer<typeof boxNew>;
export const boxPatch = z.object(boxShape).partial();
export type BoxPatch = z.infer<typeof boxPatch>;

/** `GET /api/postal-codes/:postalCode`: where a ZIP is, and the nearest hold counters by distance. */
export const postalCodeInfo = z.object({
  postalCode: z.string(),
  city: z.string(),
  state: z.string(),
  lat: latitude,
  lon: longitude,
  zone: z.string(),
  nearest: z.array(
    z.object({ counterId: id, name: z.string(), city: z.string(), state: z.string(), miles: z.number() }),
  ),
});
export type PostalCodeInfo = z.infer<typeof postalCodeInfo>;
