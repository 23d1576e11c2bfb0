import type { EntityManager } from '@mikro-orm/postgresql';
import type { Static, TObject, TSchema } from '@sinclair/typebox';

import type { Permission, Role } from '#shared/contracts/roles.ts';

import type { Dependencies } from '../dependencies.ts';

/** Who may call a route. The kernel enforces it before the handler runs; tests walk every route with it. */
export type Access = { kind: 'public' } | { kind: 'signed in' } | { kind: 'team'; permission: Permission };

export interface SignedInPerson {
  id: string;
  email: string;
  name: string;
}

/** What a handler knows about its request besides the validated input. */
export interface RequestContext extends Dependencies {
  /** This request's own entity manager. */
  em: EntityManager;
  requestId: string;
  ip: string;
  sessionId: string | null;
}

export interface SignedInContext extends RequestContext {
  person: SignedInPerson;
}

export interface TeamContext extends SignedInContext {
  teamId: string;
  roles: readonly Role[];
}

/** What a use case needs to know: who acts, in which team, with which roles, and when. */
export type ActingContext = Pick<TeamContext, 'em' | 'teamId' | 'person' | 'roles' | 'now'>;

export type ContextFor<A extends Access> = A extends { kind: 'team' }
  ? TeamContext
  : A extends { kind: 'signed in' }
    ? SignedInContext
    : RequestContext;

/** So many calls in so long a time, counted for each address the calls come from. */
export interface RouteLimit<Body> {
  /** Keeps the counts of different limits apart. */
  name: string;
  hits: number;
  windowSeconds: number;
  /** What else tells callers apart, from the body; such a limit counts after validation. */
  also?: (body: Body) => string;
}

type StaticOrNothing<S> = S extends TSchema ? Static<S> : undefined;

export interface RouteInput<Params, Query, Body> {
  params: StaticOrNothing<Params>;
  query: StaticOrNothing<Query>;
  body: StaticOrNothing<Body>;
  /** Revision from If-Match; only of a route with `ifMatch`, where the kernel requires it. */
  ifMatch: number;
}

export interface RouteResult {
  status?: number;
  body?: unknown;
  /** Sent as ETag. */
  revision?: number;
  headers?: Record<string, string>;
}

/** One route: all that Express, the OpenAPI document and the tests need to know about it. */
export interface RouteDefinition<
  A extends Access = Access,
  Params extends TObject | undefined = TObject | undefined,
  Query extends TObject | undefined = TObject | undefined,
  Body extends TSchema | undefined = TSchema | undefined,
> {
  operationId: string;
  method: 'get' | 'post' | 'put' | 'delete';
  /** Under /api, with `:name` parameters. */
  path: string;
  summary: string;
  tag: string;
  access: A;
  params?: Params;
  query?: Query;
  body?: Body;
  /** Limits on how often it may be called. */
  limits?: RouteLimit<StaticOrNothing<Body>>[];
  /** The request must name the revision it is based on. */
  ifMatch?: boolean;
  /** Largest body; 256 kB unless said otherwise. */
  bodyLimit?: string;
  /** Schema of the answer; null for an answer without a body. */
  response: { status: number; schema: TSchema | null; contentType?: string };
  handler: (context: ContextFor<A>, input: RouteInput<Params, Query, Body>) => Promise<RouteResult>;
}

/** A route whose types are forgotten, as lists of routes hold it. */
export type AnyRoute = Omit<RouteDefinition, 'handler' | 'limits'> & {
  limits?: RouteLimit<never>[];
  handler: (context: never, input: never) => Promise<RouteResult>;
};

/** Declares a route; a function only so that the handler's input is inferred from the schemas. */
export function route<
  const A extends Access,
  Params extends TObject | undefined = undefined,
  Query extends TObject | undefined = undefined,
  Body extends TSchema | undefined = undefined,
>(definition: RouteDefinition<A, Params, Query, Body>): AnyRoute {
  return definition;
}

export const PUBLIC = { kind: 'public' } as const;
export const SIGNED_IN = { kind: 'signed in' } as const;

export function inTeam<const P extends Permission>(permission: P): { kind: 'team'; permission: P } {
  return { kind: 'team', permission };
}
