import { Router, json, type NextFunction, type Request, type RequestHandler, type Response } from 'express';
import type * as z from 'zod';
import type { AnswerOf, ParamsOf, ParsedBodyOf, QueryOf, RouteDescriptor } from '../../contract/route';
import type { Clock } from '../clock';
import type { Database } from '../database';
import { forbidden, malformed, notFound, notSignedIn, type InputError } from '../errors';
import type { Actor, Authenticate } from './actor';
import { readCookie, type CookieNames } from './cookies';
import { once } from './idempotency';

export interface OpenCall<R> {
  readonly params: ParamsOf<R>;
  readonly query: QueryOf<R>;
  readonly body: ParsedBodyOf<R>;
  readonly req: Request;
  readonly res: Response;
}
export interface GuardedCall<R> extends OpenCall<R> {
  readonly actor: Actor;
}

/** The Express handler-side of the contract: one entry for each descriptor. */
export interface Routes {
  /** A route that anyone may call. */
  open<R extends RouteDescriptor>(descriptor: R, handler: (call: OpenCall<R>) => Promise<AnswerOf<R>>): void;
  /** A route for the roles its descriptor names. */
  guarded<R extends RouteDescriptor>(
    descriptor: R,
    handler: (call: GuardedCall<R>) => Promise<AnswerOf<R>>,
  ): void;
  /** As `guarded`, for answers that are not JSON: the handler writes the response itself. */
  stream<R extends RouteDescriptor>(descriptor: R, handler: (call: GuardedCall<R>) => Promise<void>): void;
  /** As `open`, for answers that are not JSON. */
  openStream<R extends RouteDescriptor>(descriptor: R, handler: (call: OpenCall<R>) => Promise<void>): void;
  readonly router: Router;
  readonly registered: readonly RouteDescriptor[];
}

export interface RoutesDeps {
  readonly database: Database;
  readonly clock: Clock;
  readonly cookies: CookieNames;
  readonly authenticate: Authenticate;
}

function inputErrors(error: z.ZodError): InputError[] {
  return error.issues.map((issue) => ({
    path: issue.path.map(String).join('.'),
    message: issue.code === 'unrecognized_keys' ? `Not known here: ${issue.keys.join(', ')}.` : issue.message,
  }));
}

function parsed(schema: z.ZodType | undefined, value: unknown): unknown {
  if (!schema) return undefined;
  const result = schema.safeParse(value);
  if (!result.success) throw malformed(inputErrors(result.error));
  return result.data;
}

export function createRoutes(deps: RoutesDeps): Routes {
  const router = Router();
  const registered: RouteDescriptor[] = [];
  const parseJson = json({ limit: '256kb' });

  const actorFor = async (descriptor: RouteDescriptor, req: Request): Promise<Actor | null> => {
    if (descriptor.access === 'anyone') return null;
    const token = readCookie(req, deps.cookies.access);
    const actor = token ? await deps.authenticate(token) : null;
    if (!actor) throw notSignedIn();
    if (!descriptor.access.includes(actor.role)) throw forbidden();
    return actor;
  };

  const add = (
    descriptor: RouteDescriptor,
    handler: (call: OpenCall<RouteDescriptor>, actor: Actor | null) => Promise<unknown>,
    writesItself: boolean,
  ) => {
    registered.push(descriptor);
    const respond = async (req: Request, res: Response) => {
      const actor = await actorFor(descriptor, req);
      const params = descriptor.params ? descriptor.params.safeParse(req.params) : null;
      if (params && !params.success) throw notFound();
      const call: OpenCall<RouteDescriptor> = {
        params: params?.data,
        query: parsed(descriptor.query, req.query),
        body: descriptor.upload ? undefined : parsed(descriptor.body, req.body),
        req,
        res,
      };
      if (writesItself) {
        await handler(call, actor);
        return;
      }
      const run = async () => {
        const result = await handler(call, actor);
        return {
          status: descriptor.status,
          answer: descriptor.answer ? descriptor.answer.parse(result) : null,
        };
      };
      const key = req.get('idempotency-key');
      const outcome =
        descriptor.creates && actor && key
          ? await once(
              deps.database,
              {
                userId: actor.userId,
                key,
                route: `${descriptor.method} ${req.path}`,
                body: descriptor.upload ? null : req.body,
                now: deps.clock.now(),
              },
              run,
            )
          : await run();
      res.setHeader('Cache-Control', 'no-store');
      if (descriptor.answer) res.status(outcome.status).json(outcome.answer);
      else res.status(outcome.status).end();
    };
    const body: RequestHandler =
      descriptor.upload || descriptor.method === 'get'
        ? (_req, _res, next) => {
            next();
          }
        : parseJson;
    router[descriptor.method](descriptor.path, body, (req: Request, res: Response, _next: NextFunction) =>
      respond(req, res),
    );
  };

  const guard =
    <R extends RouteDescriptor, T>(handler: (call: GuardedCall<R>) => Promise<T>) =>
    (call: OpenCall<RouteDescriptor>, actor: Actor | null): Promise<T> => {
      if (!actor) throw notSignedIn();
      return handler({ ...(call as OpenCall<R>), actor });
    };

  const mustBe = (descriptor: RouteDescriptor, open: boolean) => {
    if ((descriptor.access === 'anyone') !== open) {
      throw new Error(
        `${descriptor.id} is ${open ? 'not open to anyone' : 'open to anyone'}, and is registered otherwise`,
      );
    }
  };

  return {
    router,
    registered,
    open(descriptor, handler) {
      mustBe(descriptor, true);
      add(descriptor, (call) => handler(call as OpenCall<typeof descriptor>), false);
    },
    openStream(descriptor, handler) {
      mustBe(descriptor, true);
      add(descriptor, (call) => handler(call as OpenCall<typeof descriptor>), true);
    },
    guarded(descriptor, handler) {
      mustBe(descriptor, false);
      add(descriptor, guard(handler), false);
    },
    stream(descriptor, handler) {
      mustBe(descriptor, false);
      add(descriptor, guard(handler), true);
    },
  };
}
