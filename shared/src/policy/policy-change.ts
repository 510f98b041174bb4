import * as z from 'zod';
import { line, zone } from '../contract/common';
import { policySchema, type Policy } from './policy';
import { policyNotes } from './policy-notes';

/** Texts are checked as elsewhere; everything else by the schema it has and the range of its note. */
const ownRules: Readonly<Record<string, z.ZodType>> = {
  circleName: line(80, 'The name'),
  circleZone: zone,
  sigmaF: z.array(ranged(z.number(), 'sigmaF.0')).length(8, 'Give eight values, for 0 to 7 days ahead.'),
  shutAlerts: z.array(line(80, 'The alert')).max(60, 'At most 60 alerts.'),
};

/**
 * A whole policy as an admin sends it: every member and no other, each value within the range its note gives, and the
 * values in order among each other. Made from the policy's own schema, so a new value is checked as soon as it exists.
 */
export const policyChange: z.ZodType<Policy, Policy> = (
  strict(policySchema, '') as z.ZodType<Policy, Policy>
).superRefine((policy, context) => {
  for (const { path, message } of disorder(policy))
    context.addIssue({ code: 'custom', path: path.split('.'), message });
});

function strict(schema: z.ZodType, path: string): z.ZodType {
  if (schema instanceof z.ZodObject) {
    const shape: Readonly<Record<string, z.ZodType>> = schema.shape;
    return z.strictObject(
      Object.fromEntries(
        Object.entries(shape).map(([key, member]) => [
          key,
          strict(member, path === '' ? key : `${path}.${key}`),
        ]),
      ),
    );
  }
  return ownRules[path] ?? (schema instanceof z.ZodNumber ? ranged(schema, path) : schema);
}

/** A number within the range of its note, which lies inside the schema's own; whole where the schema's is. */
function ranged(schema: z.ZodNumber, path: string): z.ZodNumber {
  const { min, max } = policyNotes[path] ?? {};
  if (min === undefined || max === undefined) return schema;
  const message = `Use a number from ${min} to ${max}.`;
  const number = z.number({ error: message }).min(min, message).max(max, message);
  return schema.isInt ? number.int('Use a whole number.') : number;
}

/** What is out of order: each complaint stands at the value that comes later. */
function disorder(policy: Policy): { path: string; message: string }[] {
  const { guardRails, hubRail, chance, journey, sigmaF } = policy;
  const rules: [boolean, string, string][] = [
    ...(['hold', 'door'] as const).map((service): [boolean, string, string] => [
      guardRails[service].lowF < guardRails[service].highF,
      `guardRails.${service}.highF`,
      'The highest has to be above the lowest.',
    ]),
    [hubRail.lowF < hubRail.highF, 'hubRail.highF', 'The highest has to be above the lowest.'],
    [chance.tight < chance.open, 'chance.open', 'Open has to need more than tight.'],
    [chance.lateTight < chance.lateOpen, 'chance.lateOpen', 'Open has to need more than tight.'],
    [
      journey.hubUntilMinute < journey.linehaulInUntilMinute,
      'journey.linehaulInUntilMinute',
      'This has to come after the time at the sort hub.',
    ],
    [
      journey.linehaulInUntilMinute < journey.truckUntilMinute,
      'journey.truckUntilMinute',
      'This has to come after the arrival at the station.',
    ],
    ...sigmaF.map((sigma, day): [boolean, string, string] => [
      day === 0 || sigma >= (sigmaF[day - 1] ?? 0),
      `sigmaF.${day}`,
      'A later day cannot be surer than the day before it.',
    ]),
  ];
  return rules.filter(([isFine]) => !isFine).map(([, path, message]) => ({ path, message }));
}
