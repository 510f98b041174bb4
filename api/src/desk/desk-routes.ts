import { desk, health, idParams } from '@shared/contract';
import type { Deps } from '../deps';
import { route, type AnyRoute } from '../http/route';

/** The site's health for anybody, and what needs an admin's attention. */
export function deskRoutes({ services }: Deps): AnyRoute[] {
  return [
    route({
      method: 'get',
      path: '/health',
      summary: 'Database, mail queue and age of the forecasts',
      allow: 'anyone',
      response: health,
      handler: () => services.desk.health(),
    }),
    route({
      method: 'get',
      path: '/desk',
      summary: 'What needs attention',
      allow: ['admin'],
      response: desk,
      handler: ({ actor }) => services.desk.desk(actor),
    }),
    route({
      method: 'post',
      path: '/desk/mail/:id/resend',
      summary: 'Put a failed mail back into the queue',
      allow: ['admin'],
      params: idParams,
      response: null,
      handler: ({ params }) => services.notices.resend(params.id),
    }),
  ];
}
