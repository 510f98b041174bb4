import {
  callOffBody,
  departureBody,
  handOverBody,
  idParams,
  proposal,
  proposalRequest,
  run,
  runList,
  runListQuery,
  runNew,
  runPatch,
  runPreview,
} from '@shared/contract';
import type { Deps } from '../deps';
import { route, type AnyRoute } from '../http/route';

/** Runs: breeders see their own part of confirmed ones, coordinators and admins all of them. */
export function runRoutes({ services }: Deps): AnyRoute[] {
  const drivers = ['coordinator', 'admin'] as const;
  const one = { params: idParams, response: run, allow: drivers } as const;
  return [
    route({
      method: 'get',
      path: '/runs',
      summary: 'Runs in a window of days',
      allow: ['breeder', 'coordinator', 'admin'],
      query: runListQuery,
      response: runList,
      handler: ({ actor, query }) => services.runs.list(actor, query),
    }),
    route({
      method: 'post',
      path: '/runs',
      summary: 'Enter a run by hand',
      allow: drivers,
      body: runNew,
      response: run,
      status: 201,
      handler: ({ actor, body }) => services.runs.create(actor, body),
    }),
    route({
      method: 'post',
      path: '/runs/proposals',
      summary: 'Pool all parcels without a run',
      allow: drivers,
      body: proposalRequest,
      response: proposal,
      handler: ({ actor, body }) => services.runs.propose(actor, body),
    }),
    route({
      method: 'get',
      path: '/runs/proposals/latest',
      summary: 'The last proposal',
      allow: drivers,
      response: proposal,
      handler: () => services.runs.latestProposal(),
    }),
    route({
      method: 'get',
      path: '/runs/:id',
      summary: 'One run',
      allow: ['breeder', 'coordinator', 'admin'],
      params: idParams,
      response: run,
      handler: ({ actor, params }) => services.runs.forActor(actor, params.id),
    }),
    route({
      ...one,
      method: 'patch',
      path: '/runs/:id',
      summary: 'Put parcels in or out, pin, note',
      body: runPatch,
      handler: ({ actor, params, body, ifMatch }) => services.runs.change(actor, params.id, body, ifMatch),
    }),
    route({
      ...one,
      method: 'post',
      path: '/runs/:id/preview',
      summary: 'What a change would cost and break',
      body: runPatch,
      response: runPreview,
      handler: ({ actor, params, body }) => services.runs.preview(actor, params.id, body),
    }),
    route({
      ...one,
      method: 'post',
      path: '/runs/:id/confirmation',
      summary: 'Confirm a run and invite everybody',
      handler: ({ actor, params, ifMatch }) => services.runs.confirm(actor, params.id, ifMatch),
    }),
    route({
      ...one,
      method: 'post',
      path: '/runs/:id/departure',
      summary: 'The driver leaves',
      body: departureBody,
      handler: ({ actor, params, body, ifMatch }) =>
        services.runs.depart(actor, params.id, ifMatch, body.aboardParcelIds),
    }),
    route({
      ...one,
      method: 'post',
      path: '/runs/:id/hand-over',
      summary: 'Handed over at the counter',
      body: handOverBody,
      handler: ({ actor, params, body, ifMatch }) =>
        services.runs.handOver(actor, params.id, ifMatch, body.tracking),
    }),
    route({
      ...one,
      method: 'post',
      path: '/runs/:id/call-off',
      summary: 'The run does not go',
      body: callOffBody,
      handler: ({ actor, params, body, ifMatch }) =>
        services.runs.callOff(actor, params.id, ifMatch, body.reason),
    }),
  ];
}
