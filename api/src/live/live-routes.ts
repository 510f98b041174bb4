import type { Request, Response } from 'express';
import { tokenParams } from '@shared/contract';
import type { Deps } from '../deps';
import { route, type AnyRoute } from '../http/route';
import type { Listener } from './live-connections';
import { liveHub } from './live-hub';

/** Streams (server-sent events) that tell open pages what changed. */
export function liveRoutes(deps: Deps): AnyRoute[] {
  const open = (req: Request, res: Response, listener: Listener) =>
    liveHub(deps).open(res, listener, lastSeen(req));
  return [
    route({
      method: 'get',
      path: '/live',
      summary: 'A stream of hints at what changed, for the person who is signed in',
      allow: 'signed-in',
      response: null,
      raw: true,
      textType: 'text/event-stream',
      handler: ({ actor, req, res }) =>
        open(req, res, {
          kind: 'person',
          personId: actor.id,
          sessionEpoch: req.user?.sessionEpoch ?? 0,
          sessionId: req.sessionID,
        }),
    }),
    route({
      method: 'get',
      path: '/arrivals/:token/live',
      summary: 'A stream of hints that one arrival changed',
      allow: 'anyone',
      params: tokenParams,
      response: null,
      raw: true,
      textType: 'text/event-stream',
      handler: async ({ params, req, res }) => {
        const parcelId = await deps.services.arrivals.parcelIdOf(params.token);
        await open(req, res, { kind: 'arrival', parcelId });
      },
    }),
  ];
}

/** What the browser says it heard last when it comes back. */
function lastSeen(req: Request): number | null {
  const text = req.get('last-event-id') ?? '';
  return /^\d{1,15}$/.test(text) ? Number(text) : null;
}
