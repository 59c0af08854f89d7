import { createServer } from 'node:http';
import type { AddressInfo } from 'node:net';
import { openAsBlob } from 'node:fs';
import { buildApp } from '../../server/app';
import { XSRF_COOKIE, XSRF_HEADER, cookieNames } from '../../server/platform/http/cookies';
import { signAccessToken } from '../../server/platform/access-token';
import type { Mailer } from '../../server/platform/mail';
import type { Platform } from '../../server/platform/platform';
import { startWorker, type Worker } from '../../server/worker/worker';

export interface DeskPerson {
  readonly gymId: string;
  readonly userId: string;
  readonly sessionId: string;
}

/** The product with a clock that can be set: history is made by doing it, at the time it is meant to have happened. */
export interface Desk {
  /** Sets the clock; forward only, and not while clips are being made ready. */
  setClock(at: Date): void;
  call<T>(person: DeskPerson, method: string, path: string, body?: unknown): Promise<T>;
  upload(person: DeskPerson, takeId: string, view: string, file: string): Promise<void>;
  /** Has the worker running, or not. */
  work(running: boolean): Promise<void>;
  close(): Promise<void>;
}

export async function openDesk(opened: Platform, mailer: Mailer, start: Date): Promise<Desk> {
  let now = start;
  const platform: Platform = { ...opened, clock: { now: () => now } };
  const { config } = platform;
  const server = createServer({ requestTimeout: 0 }, buildApp(platform, mailer).app);
  await new Promise<void>((resolve, reject) => {
    server.once('error', reject);
    server.listen(0, '127.0.0.1', resolve);
  });
  const base = `http://127.0.0.1:${String((server.address() as AddressInfo).port)}`;
  const cookies = cookieNames(config.secureCookies);
  let worker: Worker | null = null;

  const send = async <T>(person: DeskPerson, method: string, path: string, init: RequestInit): Promise<T> => {
    const token = signAccessToken(config.sessionSecret, person, now);
    const headers = new Headers(init.headers);
    headers.set('cookie', `${cookies.access}=${token}; ${XSRF_COOKIE}=demo`);
    headers.set(XSRF_HEADER, 'demo');
    const response = await fetch(base + path, { ...init, method, headers });
    const text = await response.text();
    if (!response.ok) throw new Error(`${method} ${path} was answered ${String(response.status)}: ${text}`);
    return (text === '' ? undefined : JSON.parse(text)) as T;
  };

  return {
    setClock(at) {
      if (at < now)
        throw new Error(`the demo’s clock was set back, from ${now.toISOString()} to ${at.toISOString()}`);
      now = at;
    },
    call: (person, method, path, body) =>
      send(person, method, path, {
        headers: body === undefined ? {} : { 'content-type': 'application/json' },
        ...(body === undefined ? {} : { body: JSON.stringify(body) }),
      }),
    async upload(person, takeId, view, file) {
      const form = new FormData();
      form.append('file', await openAsBlob(file), 'clip.mp4');
      await send(person, 'POST', `/api/takes/${takeId}/clips/${view}`, { body: form });
    },
    async work(running) {
      if (running && !worker) worker = await startWorker(platform, mailer);
      if (!running && worker) {
        await worker.stop();
        worker = null;
      }
    },
    async close() {
      await worker?.stop();
      server.closeAllConnections();
      await new Promise((resolve) => server.close(resolve));
    },
  };
}
