import * as z from 'zod';
import { daysAnswer, idParams, plainDate, routeCheck } from '@shared/contract';
import type { Deps } from '../deps';
import { route, type AnyRoute } from '../http/route';

const daysQuery = z.object({
  from: plainDate.optional(),
  days: z.coerce.number().int().min(1).max(28).default(14),
  trace: z.enum(['0', '1']).default('0'),
});

/** Verdicts: of a stored parcel, or of a question before there is a sale. */
export function daysRoutes({ services }: Deps): AnyRoute[] {
  const allow = ['breeder', 'coordinator', 'admin'] as const;
  return [
    route({
      method: 'post',
      path: '/route-checks',
      summary: 'When could this be shipped? Nothing is saved',
      allow,
      body: routeCheck,
      response: daysAnswer,
      handler: ({ actor, body }) => services.days.routeCheck(actor, body),
    }),
    route({
      method: 'get',
      path: '/parcels/:id/days',
      summary: 'The days of a parcel',
      allow,
      params: idParams,
      query: daysQuery,
      response: daysAnswer,
      handler: async ({ actor, params, query }) => {
        await services.parcels.forActor(actor, params.id);
        return services.days.forParcel(params.id, {
          days: query.days,
          trace: query.trace === '1',
          ...(query.from ? { from: query.from } : {}),
        });
      },
    }),
  ];
}
