import { idParams, policyAnswer, policyChange, policyVersion } from '@shared/contract';
import type { Deps } from '../deps';
import { route, type AnyRoute } from '../http/route';

/** The circle's settings behind every verdict: all who are signed in read them, an admin changes them. */
export function policyRoutes({ services: { policy } }: Deps): AnyRoute[] {
  return [
    route({
      method: 'get',
      path: '/policy',
      summary: 'The policy in force, its defaults and its versions',
      allow: 'signed-in',
      response: policyAnswer,
      handler: () => policy.read(),
    }),
    route({
      method: 'put',
      path: '/policy',
      summary: 'Put a whole policy in force as a new version; the defaults restore them',
      allow: ['admin'],
      body: policyChange,
      response: policyAnswer,
      handler: ({ actor, ifMatch, body }) => policy.replace(actor, ifMatch, body),
    }),
    route({
      method: 'get',
      path: '/policy/versions/:id',
      summary: 'One version of the policy',
      allow: 'signed-in',
      params: idParams,
      response: policyVersion,
      handler: ({ params }) => policy.version(params.id),
    }),
  ];
}
