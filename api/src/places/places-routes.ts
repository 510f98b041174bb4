import * as z from 'zod';
import {
  box,
  boxNew,
  boxPatch,
  carrier,
  counter,
  counterNew,
  counterPatch,
  hub,
  idParams,
  postalCodeInfo,
  species,
  speciesNew,
  speciesPatch,
  zipCode,
} from '@shared/contract';
import { notFound } from '@shared/errors';
import type { Deps } from '../deps';
import { route, type AnyRoute } from '../http/route';

/** Counters, species, boxes (all may read, admins edit), carriers, hubs and ZIP codes. */
export function placesRoutes(deps: Deps): AnyRoute[] {
  return [...listRoutes(deps), ...counterRoutes(deps), ...speciesRoutes(deps), ...boxRoutes(deps)];
}

function listRoutes({ services: { places } }: Deps): AnyRoute[] {
  const list = <S extends z.ZodType>(
    path: string,
    summary: string,
    schema: S,
    read: () => Promise<z.input<S>[]>,
  ) =>
    route({
      method: 'get',
      path,
      summary,
      allow: 'signed-in',
      response: z.array(schema),
      // The array of what `read` answers is what the schema's array takes in; TypeScript cannot see through the generic.
      handler: () => read() as never,
    });
  return [
    list('/counters', 'All counters', counter, () => places.counters()),
    list('/species', 'All species with their bands', species, () => places.species()),
    list('/boxes', 'All box sizes', box, () => places.boxes()),
    list('/carriers', 'All carriers', carrier, () => places.carriers()),
    list('/hubs', 'All sort hubs', hub, () => places.hubs()),
    route({
      method: 'get',
      path: '/postal-codes/:postalCode',
      summary: 'Where a ZIP code is, with the nearest hold counters',
      allow: 'signed-in',
      params: z.object({ postalCode: zipCode }),
      response: postalCodeInfo,
      handler: async ({ params }) => {
        const found = await places.postalCode(params.postalCode);
        if (!found) throw notFound('That ZIP code');
        return found;
      },
    }),
  ];
}

function counterRoutes({ services }: Deps): AnyRoute[] {
  const { counters } = services.places.catalogs;
  return [
    route({
      method: 'get',
      path: '/counters/:id',
      summary: 'One counter',
      allow: 'signed-in',
      params: idParams,
      response: counter,
      handler: ({ params }) => counters.get(params.id),
    }),
    route({
      method: 'post',
      path: '/counters',
      summary: 'Add a counter',
      allow: ['admin'],
      body: counterNew,
      response: counter,
      status: 201,
      handler: ({ actor, body }) => counters.add(actor, body),
    }),
    route({
      method: 'patch',
      path: '/counters/:id',
      summary: 'Change a counter',
      allow: ['admin'],
      params: idParams,
      body: counterPatch,
      response: counter,
      handler: ({ actor, params, body, ifMatch }) => counters.change(actor, params.id, ifMatch, body),
    }),
  ];
}

function speciesRoutes({ services }: Deps): AnyRoute[] {
  const { species: catalog } = services.places.catalogs;
  return [
    route({
      method: 'get',
      path: '/species/:id',
      summary: 'One species',
      allow: 'signed-in',
      params: idParams,
      response: species,
      handler: ({ params }) => catalog.get(params.id),
    }),
    route({
      method: 'post',
      path: '/species',
      summary: 'Add a species',
      allow: ['admin'],
      body: speciesNew,
      response: species,
      status: 201,
      handler: ({ actor, body }) => catalog.add(actor, body),
    }),
    route({
      method: 'patch',
      path: '/species/:id',
      summary: 'Change a species',
      allow: ['admin'],
      params: idParams,
      body: speciesPatch,
      response: species,
      handler: ({ actor, params, body, ifMatch }) => catalog.change(actor, params.id, ifMatch, body),
    }),
  ];
}

function boxRoutes({ services }: Deps): AnyRoute[] {
  const { boxes } = services.places.catalogs;
  return [
    route({
      method: 'get',
      path: '/boxes/:id',
      summary: 'One box size',
      allow: 'signed-in',
      params: idParams,
      response: box,
      handler: ({ params }) => boxes.get(params.id),
    }),
    route({
      method: 'post',
      path: '/boxes',
      summary: 'Add a box size',
      allow: ['admin'],
      body: boxNew,
      response: box,
      status: 201,
      handler: ({ actor, body }) => boxes.add(actor, body),
    }),
    route({
      method: 'patch',
      path: '/boxes/:id',
      summary: 'Change a box size',
      allow: ['admin'],
      params: idParams,
      body: boxPatch,
      response: box,
      handler: ({ actor, params, body, ifMatch }) => boxes.change(actor, params.id, ifMatch, body),
    }),
  ];
}
