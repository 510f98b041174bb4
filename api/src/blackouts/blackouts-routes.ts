import {
  blackout,
  blackoutList,
  blackoutNew,
  blackoutPatch,
  blackoutPreview,
  blackoutQuery,
  idParams,
  previewRequest,
} from '@shared/contract';
import type { Deps } from '../deps';
import { route, type AnyRoute } from '../http/route';

/** Blackouts: everybody who is signed in reads them, an admin keeps them. */
export function blackoutsRoutes({ services: { blackouts } }: Deps): AnyRoute[] {
  return [
    route({
      method: 'get',
      path: '/blackouts',
      summary: 'The blackouts, and each day they cover in a window',
      allow: 'signed-in',
      query: blackoutQuery,
      response: blackoutList,
      handler: ({ query: { from, to } }) => blackouts.list(from, to),
    }),
    route({
      method: 'post',
      path: '/blackouts',
      summary: 'Enter a blackout; parcels on its days go on hold',
      allow: ['admin'],
      body: blackoutNew,
      response: blackout,
      status: 201,
      handler: ({ actor, body }) => blackouts.create(actor, body),
    }),
    route({
      method: 'post',
      path: '/blackouts/preview',
      summary: 'What saving it would move; nothing is saved',
      allow: ['admin'],
      body: previewRequest,
      response: blackoutPreview,
      handler: ({ body }) => blackouts.preview(body),
    }),
    route({
      method: 'patch',
      path: '/blackouts/:id',
      summary: 'Change a blackout, or lift single days of it',
      allow: ['admin'],
      params: idParams,
      body: blackoutPatch,
      response: blackout,
      handler: ({ actor, params, body, ifMatch }) => blackouts.edit(actor, params.id, body, ifMatch),
    }),
    route({
      method: 'delete',
      path: '/blackouts/:id',
      summary: 'Remove a blackout',
      allow: ['admin'],
      params: idParams,
      response: null,
      handler: ({ actor, params, ifMatch }) => blackouts.remove(actor, params.id, ifMatch),
    }),
  ];
}
