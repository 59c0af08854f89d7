import type { Request } from 'express';
import { readFile } from 'node:fs/promises';
import { join } from 'node:path';
import { timingSafeEqual } from 'node:crypto';
import { DemoDto, MailboxDto, liveRoutes } from '../../contract';
import { notFound } from '../../platform/errors';
import type { Routes } from '../../platform/http/routes';
import type { Mailer } from '../../platform/mail';
import type { Platform } from '../../platform/platform';
import { checkHealth } from './health';
import type { Metrics } from './metrics';
import { describeApi } from './openapi';

const LOOPBACK = new Set(['127.0.0.1', '::1', '::ffff:127.0.0.1']);
const isLoopback = (req: Request) =>
  LOOPBACK.has(req.socket.remoteAddress ?? '') && req.get('x-forwarded-for') === undefined;

function hasToken(req: Request, token: string | null): boolean {
  const given = req.get('authorization')?.replace(/^Bearer /, '');
  if (!token || !given) return false;
  return given.length === token.length && timingSafeEqual(Buffer.from(given), Buffer.from(token));
}

export function registerOperationsRoutes(
  routes: Routes,
  platform: Platform,
  parts: { mailer: Mailer; metrics: Metrics; version: string },
): void {
  routes.openStream(liveRoutes.getHealth, async ({ res }) => {
    const health = await checkHealth(platform, parts.mailer, parts.version);
    res
      .status(health.status === 'ok' ? 200 : 503)
      .set('Cache-Control', 'no-store')
      .json(health);
  });

  routes.openStream(liveRoutes.getMetrics, async ({ req, res }) => {
    if (!isLoopback(req) && !hasToken(req, platform.config.metricsToken)) throw notFound();
    res.type('text/plain; version=0.0.4').send(await parts.metrics.render());
  });

  routes.open(liveRoutes.getOpenApi, () => Promise.resolve(describeApi(routes.registered, parts.version)));

  routes.open(liveRoutes.getMailbox, async ({ req }) => {
    const { mailboxUrl } = platform.config;
    if (!mailboxUrl || !isLoopback(req)) throw notFound('The mailbox');
    const answer = await fetch(mailboxUrl, { signal: AbortSignal.timeout(5000) });
    return MailboxDto.parse(await answer.json());
  });

  routes.open(liveRoutes.getDemo, async () => {
    if (!platform.config.demo) throw notFound('The demo');
    const file = join(platform.config.storageDir, 'demo-accounts.json');
    const text = await readFile(file, 'utf8').catch((error: unknown) => {
      if (error instanceof Error && 'code' in error && error.code === 'ENOENT') throw notFound('The demo');
      throw error;
    });
    return DemoDto.parse({ accounts: JSON.parse(text) });
  });
}
