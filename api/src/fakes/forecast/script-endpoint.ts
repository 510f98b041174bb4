import type { IncomingMessage, ServerResponse } from 'node:http';
import { json } from 'node:stream/consumers';
import * as z from 'zod';
import { scriptChange, type ScriptChange } from './forecast-script';
import type { LoggedRequest } from './forecast-fake';

interface Controls {
  readonly change: (change: ScriptChange) => void;
  readonly log: readonly LoggedRequest[];
  readonly mostAtOnce: () => number;
}

/** GET /__script tells what was asked so far; POST changes the script: 204, or 400 with what is wrong. */
export async function answerScript(
  req: IncomingMessage,
  res: ServerResponse,
  controls: Controls,
): Promise<void> {
  const say = (status: number, body: object) =>
    void res.writeHead(status, { 'Content-Type': 'application/json' }).end(JSON.stringify(body));
  if (req.method !== 'POST') return say(200, { mostAtOnce: controls.mostAtOnce(), log: controls.log });
  const result = scriptChange.safeParse(await json(req).catch(() => null));
  if (!result.success) return say(400, { errors: z.flattenError(result.error) });
  controls.change(result.data);
  res.writeHead(204).end();
}
