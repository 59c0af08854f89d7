import type { RequestHandler } from 'express';
import { Gauge, Histogram, Registry, collectDefaultMetrics } from 'prom-client';
import type { Platform } from '../../platform/platform';
import { countJobs, countWaiting } from './health-query';

export interface Metrics {
  /** Times every answered call by route and status. */
  readonly observe: RequestHandler;
  render(): Promise<string>;
}

export function createMetrics(platform: Platform): Metrics {
  const registry = new Registry();
  collectDefaultMetrics({ register: registry });
  const seconds = new Histogram({
    name: 'midfoot_http_request_seconds',
    help: 'Time to answer a call, by route and status',
    labelNames: ['method', 'route', 'status'],
    buckets: [0.005, 0.02, 0.1, 0.5, 2, 10, 60],
    registers: [registry],
  });
  const jobs = new Gauge({
    name: 'midfoot_jobs',
    help: 'Jobs by state',
    labelNames: ['state'],
    registers: [registry],
  });
  const waiting = new Gauge({
    name: 'midfoot_takes_waiting',
    help: 'Takes that wait for an answer',
    registers: [registry],
  });
  return {
    observe: (req, res, next) => {
      const stop = seconds.startTimer();
      res.on('finish', () => {
        const route: unknown = req.route;
        const path =
          typeof route === 'object' && route !== null && 'path' in route ? String(route.path) : 'none';
        stop({ method: req.method, route: path, status: String(res.statusCode) });
      });
      next();
    },
    async render() {
      jobs.reset();
      for (const [state, n] of await countJobs(platform.database)) jobs.set({ state }, n);
      waiting.set(await countWaiting(platform.database));
      return registry.metrics();
    },
  };
}
