import type { Request, Response } from 'express';
import type * as z from 'zod';
import type { Role } from '@shared/contract';
import type { Actor } from './actor';

/** Who may call a route: anybody, anybody signed in, or holders of one of the roles. */
export type Allow = 'anyone' | 'signed-in' | readonly [Role, ...Role[]];

type Out<S> = S extends z.ZodType ? z.output<S> : undefined;
/** A route that lets anybody in has perhaps no actor; every other one has. */
type ActorFor<A extends Allow> = A extends 'anyone' ? Actor | null : Actor;

export interface Call<A extends Allow, P, Q, B> {
  readonly actor: ActorFor<A>;
  readonly params: Out<P>;
  readonly query: Out<Q>;
  readonly body: Out<B>;
  /** The version in If-Match, or null when the caller sent none. */
  readonly ifMatch: number | null;
  readonly req: Request;
  readonly res: Response;
}

/**
 * A declared route. `response` is the schema of the JSON answer, null for 204; an answer with a `version` also gets an
 * ETag. A route without `allow` does not compile. `raw: true` leaves writing the answer to the handler; `textType` names
 * the media type of an answer that is text, which the handler then returns (with `response: null`).
 */
export interface RouteSpec<A extends Allow, P, Q, B, R> {
  readonly method: 'get' | 'post' | 'put' | 'patch' | 'delete';
  /** Express path, under /api, e.g. `/parcels/:id`. */
  readonly path: string;
  readonly summary: string;
  readonly allow: A;
  readonly params?: P;
  readonly query?: Q;
  readonly body?: B;
  readonly response: R;
  readonly status?: number;
  readonly raw?: boolean;
  readonly textType?: `text/${string}`;
  readonly handler: (
    call: Call<A, P, Q, B>,
  ) => Promise<R extends z.ZodType ? z.input<R> : unknown> | (R extends z.ZodType ? z.input<R> : unknown);
}

/** A route with its schema types erased, as the router and the OpenAPI document take it. */
export interface AnyRoute extends Omit<RouteSpec<Allow, unknown, unknown, unknown, unknown>, 'handler'> {
  readonly params?: z.ZodType;
  readonly query?: z.ZodType;
  readonly body?: z.ZodType;
  readonly response: z.ZodType | null;
  readonly handler: (call: Call<'anyone', never, never, never>) => unknown;
}

/** Declares a route; the types of params, query and body come from their schemas. */
export function route<
  const A extends Allow,
  P extends z.ZodType | undefined = undefined,
  Q extends z.ZodType | undefined = undefined,
  B extends z.ZodType | undefined = undefined,
  R extends z.ZodType | null = null,
>(spec: RouteSpec<A, P, Q, B, R>): AnyRoute {
  return spec as unknown as AnyRoute;
}
