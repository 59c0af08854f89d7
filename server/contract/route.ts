import type * as z from 'zod';
import type { Role } from './common';

export type Method = 'get' | 'post' | 'put' | 'patch' | 'delete';

/** Who may call a route: anyone, or the named roles of the caller's own gym. */
export type Access = 'anyone' | readonly Role[];

/** What the body of an answer is when it is not JSON. */
export type Produces = 'json' | 'empty' | 'bytes' | 'csv' | 'vtt' | 'zip' | 'event-stream' | 'text';

export interface RouteDescriptor<
  Params extends z.ZodType = z.ZodType,
  Query extends z.ZodType = z.ZodType,
  Body extends z.ZodType = z.ZodType,
  Answer extends z.ZodType = z.ZodType,
> {
  readonly id: string;
  readonly method: Method;
  /** Express path, for instance `/api/takes/:id`. */
  readonly path: string;
  readonly access: Access;
  readonly summary: string;
  readonly params?: Params;
  readonly query?: Query;
  readonly body?: Body;
  /** Multipart with one part named `file`, instead of a JSON body. */
  readonly upload?: boolean;
  /** Status of success. */
  readonly status: number;
  readonly answer?: Answer;
  readonly produces: Produces;
  /** Creates something: an `Idempotency-Key` header is honoured. */
  readonly creates: boolean;
}

export const MEMBER = ['member'] as const;
export const STAFF = ['coach', 'owner'] as const;
export const OWNER = ['owner'] as const;
export const SIGNED_IN = ['member', 'coach', 'owner'] as const;

type Optional = 'status' | 'produces' | 'creates';

/**
 * Describes one HTTP route. The server registers its handler against it, the OpenAPI document and the
 * access matrix of the tests are made from it, and the client takes its types from it.
 */
export function route<
  P extends z.ZodType = z.ZodUndefined,
  Q extends z.ZodType = z.ZodUndefined,
  B extends z.ZodType = z.ZodUndefined,
  A extends z.ZodType = z.ZodUndefined,
>(
  spec: Omit<RouteDescriptor<P, Q, B, A>, Optional> & Partial<Pick<RouteDescriptor, Optional>>,
): RouteDescriptor<P, Q, B, A> {
  const status = spec.status ?? (spec.answer ? 200 : 204);
  return {
    ...spec,
    status,
    produces: spec.produces ?? (spec.answer ? 'json' : 'empty'),
    creates: spec.creates ?? false,
  };
}

export type ParamsOf<R> =
  R extends RouteDescriptor<infer P, infer _Q, infer _B, infer _A> ? z.output<P> : never;
export type QueryOf<R> =
  R extends RouteDescriptor<infer _P, infer Q, infer _B, infer _A> ? z.output<Q> : never;
/** The body as a caller sends it. */
export type BodyOf<R> = R extends RouteDescriptor<infer _P, infer _Q, infer B, infer _A> ? z.input<B> : never;
/** The body as a handler receives it, parsed. */
export type ParsedBodyOf<R> =
  R extends RouteDescriptor<infer _P, infer _Q, infer B, infer _A> ? z.output<B> : never;
export type AnswerOf<R> =
  R extends RouteDescriptor<infer _P, infer _Q, infer _B, infer A> ? z.output<A> : never;
