import * as z from 'zod';
import {
  availability,
  breederSummary,
  coordinatorSummary,
  idParams,
  mePatch,
  person,
  personNew,
  personPatch,
} from '@shared/contract';
import type { Deps } from '../deps';
import { route, type AnyRoute } from '../http/route';

/** The admin's list of people, and what everybody may read and change of themselves. */
export function peopleRoutes(deps: Deps): AnyRoute[] {
  return [...adminRoutes(deps), ...ownRoutes(deps)];
}

function adminRoutes({ services: { people } }: Deps): AnyRoute[] {
  return [
    route({
      method: 'get',
      path: '/people',
      summary: 'Everybody in the circle',
      allow: ['admin'],
      response: z.array(person),
      handler: () => people.list(),
    }),
    route({
      method: 'post',
      path: '/people',
      summary: 'Add a person and send the invitation',
      allow: ['admin'],
      body: personNew,
      response: person,
      status: 201,
      handler: ({ actor, body }) => people.add(actor, body),
    }),
    route({
      method: 'get',
      path: '/people/:id',
      summary: 'One person',
      allow: ['admin'],
      params: idParams,
      response: person,
      handler: ({ params }) => people.get(params.id),
    }),
    route({
      method: 'patch',
      path: '/people/:id',
      summary: 'Change a person',
      allow: ['admin'],
      params: idParams,
      body: personPatch,
      response: person,
      handler: ({ actor, params, body, ifMatch }) => people.change(actor, params.id, ifMatch, body),
    }),
    route({
      method: 'post',
      path: '/people/:id/invitation',
      summary: 'Send a fresh invitation link',
      allow: ['admin'],
      params: idParams,
      response: null,
      handler: ({ actor, params }) => people.invite(actor, params.id),
    }),
    route({
      method: 'get',
      path: '/coordinators',
      summary: 'Who drives, with what and when',
      allow: ['coordinator', 'admin'],
      response: z.array(coordinatorSummary),
      handler: () => people.coordinators(),
    }),
    route({
      method: 'get',
      path: '/breeders',
      summary: 'For whom a parcel can be entered',
      allow: ['coordinator', 'admin'],
      response: z.array(breederSummary),
      handler: () => people.breeders(),
    }),
  ];
}

function ownRoutes({ services: { people } }: Deps): AnyRoute[] {
  return [
    route({
      method: 'get',
      path: '/me',
      summary: 'My own record',
      allow: 'signed-in',
      response: person,
      handler: ({ actor }) => people.get(actor.id),
    }),
    route({
      method: 'patch',
      path: '/me',
      summary: 'Change my own record',
      allow: 'signed-in',
      body: mePatch,
      response: person,
      handler: ({ actor, body, ifMatch }) => people.changeMe(actor, ifMatch, body),
    }),
    route({
      method: 'get',
      path: '/me/availability',
      summary: 'My days away and driving days',
      allow: 'signed-in',
      response: availability,
      handler: ({ actor }) => people.availability(actor.id),
    }),
    route({
      method: 'put',
      path: '/me/availability',
      summary: 'Replace my days away and driving days',
      allow: 'signed-in',
      body: availability,
      response: availability,
      handler: ({ actor, body }) => people.setAvailability(actor, body),
    }),
  ];
}
