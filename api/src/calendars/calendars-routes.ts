import { calendarFeed, calendarParams, tokenParams } from '@shared/contract';
import type { Deps } from '../deps';
import { route, type AnyRoute } from '../http/route';

/** The address of the own feed for those signed in; the calendars themselves for whoever holds their link. */
export function calendarsRoutes({ services }: Deps): AnyRoute[] {
  return [
    route({
      method: 'get',
      path: '/me/calendar-feed',
      summary: 'The address of my calendar feed',
      allow: 'signed-in',
      response: calendarFeed,
      handler: ({ actor }) => services.calendars.feedOf(actor.id),
    }),
    route({
      method: 'post',
      path: '/me/calendar-feed',
      summary: 'A new address for my calendar feed; the old one ends',
      allow: 'signed-in',
      response: calendarFeed,
      handler: ({ actor }) => services.calendars.renewFeed(actor.id),
    }),
    route({
      method: 'get',
      path: '/calendars/:token.ics',
      summary: 'The runs and arrivals of the person whose link it is',
      allow: 'anyone',
      params: calendarParams,
      response: null,
      textType: 'text/calendar',
      handler: ({ params }) => services.calendars.feedText(params.token),
    }),
    route({
      method: 'get',
      path: '/arrivals/:token/calendar.ics',
      summary: 'The planned arrival, to put into a calendar',
      allow: 'anyone',
      params: tokenParams,
      response: null,
      textType: 'text/calendar',
      handler: ({ params, res }) => {
        res.set('Content-Disposition', 'inline; filename="arrival.ics"');
        return services.calendars.arrivalText(params.token);
      },
    }),
  ];
}
