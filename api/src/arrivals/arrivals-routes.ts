import { arrival, arrivalList, morningsBody, reportBody, tokenParams } from '@shared/contract';
import type { Deps } from '../deps';
import { route, type AnyRoute } from '../http/route';

/** The buyer's pages: by the secret link, signed in or not. */
export function arrivalsRoutes({ services }: Deps): AnyRoute[] {
  return [
    route({
      method: 'get',
      path: '/arrivals',
      summary: "A signed-in buyer's arrivals",
      allow: ['buyer'],
      response: arrivalList,
      handler: ({ actor }) => services.arrivals.ofBuyer(actor.id),
    }),
    route({
      method: 'get',
      path: '/arrivals/:token',
      summary: 'One arrival, by the link the buyer was sent',
      allow: 'anyone',
      params: tokenParams,
      response: arrival,
      handler: ({ params }) => services.arrivals.byToken(params.token),
    }),
    route({
      method: 'put',
      path: '/arrivals/:token/mornings',
      summary: 'Say which mornings suit; those left out stay as they were',
      allow: 'anyone',
      params: tokenParams,
      body: morningsBody,
      response: arrival,
      handler: ({ params, body }) => services.arrivals.sayMornings(params.token, body),
    }),
    route({
      method: 'post',
      path: '/arrivals/:token/report',
      summary: 'Report how it arrived',
      allow: 'anyone',
      params: tokenParams,
      body: reportBody,
      response: arrival,
      handler: ({ params, body }) => services.arrivals.report(params.token, body),
    }),
  ];
}
