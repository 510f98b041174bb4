import * as z from 'zod';
import {
  booking,
  historyEntry,
  idParams,
  parcel,
  parcelList,
  parcelListQuery,
  parcelNew,
  parcelPatch,
} from '@shared/contract';
import type { Deps } from '../deps';
import { route, type AnyRoute } from '../http/route';

const workers = ['breeder', 'coordinator', 'admin'] as const;
const bookers = ['breeder', 'coordinator'] as const;

/** Entering, changing and booking parcels. */
export function parcelsRoutes({ services }: Deps): AnyRoute[] {
  return [
    route({
      method: 'get',
      path: '/parcels',
      summary: "A breeder's own parcels, or all of them",
      allow: workers,
      query: parcelListQuery,
      response: parcelList,
      handler: ({ actor, query }) => services.parcels.list(actor, query),
    }),
    route({
      method: 'post',
      path: '/parcels',
      summary: 'Enter a parcel',
      allow: workers,
      body: parcelNew,
      response: parcel,
      status: 201,
      handler: ({ actor, body }) => services.parcels.create(actor, body),
    }),
    route({
      method: 'get',
      path: '/parcels/:id',
      summary: 'One parcel',
      allow: workers,
      params: idParams,
      response: parcel,
      handler: ({ actor, params }) => services.parcels.forActor(actor, params.id),
    }),
    route({
      method: 'patch',
      path: '/parcels/:id',
      summary: 'Change a parcel, pack, unpack, cancel or close it',
      allow: workers,
      params: idParams,
      body: parcelPatch,
      response: parcel,
      handler: ({ actor, params, body, ifMatch }) => services.parcels.edit(actor, params.id, body, ifMatch),
    }),
    route({
      method: 'get',
      path: '/parcels/:id/history',
      summary: 'What happened to a parcel, newest first',
      allow: workers,
      params: idParams,
      response: z.array(historyEntry),
      handler: ({ actor, params }) => services.parcels.history(actor, params.id),
    }),
    route({
      method: 'put',
      path: '/parcels/:id/booking',
      summary: 'Book a day, or leave a span open',
      allow: bookers,
      params: idParams,
      body: booking,
      response: parcel,
      handler: ({ actor, params, body, ifMatch }) => services.parcels.book(actor, params.id, body, ifMatch),
    }),
    route({
      method: 'delete',
      path: '/parcels/:id/booking',
      summary: 'Take a parcel off its day and out of its run',
      allow: bookers,
      params: idParams,
      response: parcel,
      handler: ({ actor, params, ifMatch }) => services.parcels.unbook(actor, params.id, ifMatch),
    }),
  ];
}
