import compression from 'compression';
import cookieParser from 'cookie-parser';
import express, { type Express } from 'express';
import helmet from 'helmet';
import { pinoHttp } from 'pino-http';
import { answersOf, createAnswers, registerAnswersRoutes } from './modules/answers';
import { createAssignments, registerAssignmentsRoutes } from './modules/assignments';
import { createAuth, registerAuthRoutes } from './modules/auth';
import { createClips, registerClipsRoutes } from './modules/clips';
import { createGyms, registerGymsRoutes } from './modules/gyms';
import { createLifts, registerLiftsRoutes } from './modules/lifts';
import { createNotices, registerNoticesRoutes } from './modules/notices';
import { createMetrics, registerEventStreamRoutes, registerOperationsRoutes } from './modules/operations';
import { createInvitations, createPeople, registerPeopleRoutes } from './modules/people';
import { createPrivacy, registerPrivacyRoutes } from './modules/privacy';
import { createQueue, registerQueueRoutes, releaseAll } from './modules/queue';
import { createAuthenticate, createSessions } from './modules/sessions';
import { createTakes, registerTakesRoutes } from './modules/takes';
import { createTurnaround, registerTurnaroundRoutes } from './modules/turnaround';
import { serveClient } from './platform/http/client-files';
import { cookieNames } from './platform/http/cookies';
import { crossSiteProtection } from './platform/http/csrf';
import { problemHandler, unknownRoute } from './platform/http/problems';
import { createRoutes, type Routes } from './platform/http/routes';
import type { Mailer } from './platform/mail';
import type { Platform } from './platform/platform';

export const VERSION = '0.1.0';

export interface App {
  readonly app: Express;
  readonly routes: Routes;
}

/** The Express application from its parts; opens nothing and listens nowhere. */
export function buildApp(platform: Platform, mailer: Mailer): App {
  const { config, logger } = platform;
  const cookies = cookieNames(config.secureCookies);
  const routes = createRoutes({
    database: platform.database,
    clock: platform.clock,
    cookies,
    authenticate: createAuthenticate(platform),
  });
  const metrics = createMetrics(platform);

  const takes = createTakes(platform, { answersOf });
  const sessions = createSessions(platform);
  registerAuthRoutes(routes, { auth: createAuth(platform, sessions), sessions }, cookies);
  registerGymsRoutes(routes, createGyms(platform));
  registerPeopleRoutes(
    routes,
    {
      people: createPeople(platform, { putBackAll: releaseAll }),
      invitations: createInvitations(platform, sessions),
    },
    cookies,
  );
  registerPrivacyRoutes(
    routes,
    createPrivacy(platform, { detailOf: takes.get, putBackAll: releaseAll }),
    cookies,
  );
  registerLiftsRoutes(routes, createLifts(platform));
  registerAssignmentsRoutes(routes, createAssignments(platform, { takesOf: takes.takesOf }));
  registerTakesRoutes(routes, takes);
  registerClipsRoutes(routes, createClips(platform));
  registerQueueRoutes(routes, createQueue(platform));
  registerAnswersRoutes(routes, createAnswers(platform, { detailOf: takes.get }));
  registerTurnaroundRoutes(routes, createTurnaround(platform));
  registerNoticesRoutes(routes, createNotices(platform));
  registerEventStreamRoutes(routes, platform);
  registerOperationsRoutes(routes, platform, { mailer, metrics, version: VERSION });

  const app = express();
  app.disable('x-powered-by');
  if (config.trustProxy) app.set('trust proxy', config.trustProxy);
  app.use(
    pinoHttp({
      logger,
      autoLogging: { ignore: (req) => req.url === '/api/health' },
      customLogLevel: (_req, res) => (res.statusCode >= 500 ? 'error' : 'info'),
      // An invitation's address is its secret, so it is not written down; nor is anything people sent.
      serializers: {
        req: (req: { id: unknown; method: string; url: string }) => ({
          id: req.id,
          method: req.method,
          url: req.url.replace(/^(\/api\/invitations\/)[^/?]{20,}/, '$1…'),
        }),
        res: (res: { statusCode: number }) => ({ status: res.statusCode }),
      },
    }),
  );
  app.use(
    helmet({
      contentSecurityPolicy: {
        directives: {
          defaultSrc: ["'self'"],
          scriptSrc: ["'self'"],
          // Angular writes component styles into style elements; script stays strict.
          styleSrc: ["'self'", "'unsafe-inline'"],
          imgSrc: ["'self'", 'data:', 'blob:'],
          mediaSrc: ["'self'", 'blob:'],
          connectSrc: ["'self'"],
          fontSrc: ["'self'"],
          objectSrc: ["'none'"],
          frameAncestors: ["'none'"],
          baseUri: ["'self'"],
          formAction: ["'self'"],
          upgradeInsecureRequests: config.secureCookies ? [] : null,
        },
      },
      strictTransportSecurity: config.secureCookies ? { maxAge: 31_536_000, includeSubDomains: true } : false,
      crossOriginEmbedderPolicy: false,
      referrerPolicy: { policy: 'same-origin' },
    }),
  );
  app.use(
    '/api',
    // An event stream must reach its reader line by line, and clips do not get smaller.
    compression({
      filter: (req, res) =>
        !/event-stream|video|image|zip/.test(String(res.getHeader('Content-Type'))) &&
        compression.filter(req, res),
    }),
    cookieParser(),
    crossSiteProtection(config.secureCookies),
    metrics.observe,
  );
  app.use(routes.router);
  app.use('/api', unknownRoute);
  app.use(serveClient(config.clientDir));
  app.use(unknownRoute);
  app.use(problemHandler(logger));
  return { app, routes };
}
