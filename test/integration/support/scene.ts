import { createServer, type Server } from 'node:http';
import { type AddressInfo } from 'node:net';
import { Readable } from 'node:stream';
import { inject } from 'vitest';
import type { RouteDescriptor } from '../../../server/contract/route';
import { buildApp } from '../../../server/app';
import { publishClip, refuseClip, findClip } from '../../../server/modules/processing';
import { signAccessToken } from '../../../server/platform/access-token';
import { readConfig, type Config } from '../../../server/platform/config';
import type { Database } from '../../../server/platform/database';
import { newId } from '../../../server/platform/ids';
import { openMailer, type Mailer } from '../../../server/platform/mail';
import { openPlatform } from '../../../server/platform/open-platform';
import type { ObjectStore } from '../../../server/platform/object-store';
import type { Platform } from '../../../server/platform/platform';
import { createDatabase } from '../../support/database';
import { serviceEnvironment } from '../../support/environment';

export interface SceneGym {
  readonly id: string;
}
export interface ScenePerson {
  readonly id: string;
  readonly name: string;
  readonly gymId: string;
  readonly sessionId: string;
}
export interface SceneLift {
  readonly id: string;
  readonly faultIds: readonly string[];
  readonly scaleIds: readonly string[];
}

/** An answer of the api; `body` is parsed where it is JSON. */
export interface Answer<T = Record<string, unknown>> {
  readonly status: number;
  readonly headers: Headers;
  readonly text: string;
  readonly body: T;
}

/** Bytes that begin like an MP4 file (ISO/IEC 14496-12), of the given length. */
export function videoBytes(length: number, seed = 1): Buffer {
  const bytes = Buffer.alloc(length, seed);
  bytes.writeUInt32BE(Math.min(24, length), 0);
  bytes.write('ftypisom', 4, 'latin1');
  return bytes;
}

export interface Scene {
  readonly baseUrl: string;
  readonly database: Database;
  readonly store: ObjectStore;
  /** Every route that is registered. */
  readonly routes: readonly RouteDescriptor[];
  /** What a worker on this database needs; its clock is the scene's. */
  readonly platform: Platform;
  readonly mailer: Mailer;
  /** Sets the clock that the api lives by forward. */
  pass(ms: number): void;
  now(): Date;
  gym(settings?: Record<string, unknown>): Promise<SceneGym>;
  person(
    gym: SceneGym,
    role: 'member' | 'coach' | 'owner',
    more?: Record<string, unknown>,
  ): Promise<ScenePerson>;
  lift(gym: SceneGym, more?: { views?: string[]; name?: string }): Promise<SceneLift>;
  assignment(
    gym: SceneGym,
    lift: SceneLift,
    by: ScenePerson,
    more?: { members?: ScenePerson[]; reps?: number; rounds?: number; closed?: boolean },
  ): Promise<string>;
  call<T = Record<string, unknown>>(
    person: ScenePerson,
    method: string,
    path: string,
    body?: unknown,
    headers?: Record<string, string>,
  ): Promise<Answer<T>>;
  upload<T = Record<string, unknown>>(
    person: ScenePerson,
    takeId: string,
    view: string,
    bytes: Buffer,
    headers?: Record<string, string>,
  ): Promise<Answer<T>>;
  /** Headers of a signed-in call, for requests made by hand. */
  headers(person: ScenePerson): Record<string, string>;
  /** Does what the worker does when a clip has become playable; `proxy` are the bytes of the film. */
  makeReady(clipId: string, proxy?: Buffer): Promise<void>;
  makeUnplayable(clipId: string, reason: string): Promise<void>;
  /** A take of the member, handed in with playable clips. */
  waitingTake(member: ScenePerson, assignmentId: string, words?: Record<string, unknown>): Promise<string>;
  close(): Promise<void>;
}

const DAY = [{ from: '06:00', to: '20:00' }];
const WEEK = {
  mon: DAY,
  tue: DAY,
  wed: DAY,
  thu: DAY,
  fri: DAY,
  sat: [{ from: '08:00', to: '13:00' }],
  sun: [],
};

/** The api on a database of its own, with a clock that stands until it is set forward. */
export async function openScene(start: Date, settings: NodeJS.ProcessEnv = {}): Promise<Scene> {
  const services = inject('services');
  const testDatabase = await createDatabase(services);
  const config: Config = readConfig({ ...serviceEnvironment(services, testDatabase.url), ...settings });
  const opened = openPlatform(config, 'test');
  let now = start;
  const platform = { ...opened.platform, clock: { now: () => now } };
  const { database, store } = platform;
  const mailer = openMailer(config.smtpUrl, config.mailFrom);
  const { app, routes } = buildApp(platform, mailer);
  const server = createServer({ requestTimeout: 0 }, app);
  await listen(server);
  const baseUrl = `http://127.0.0.1:${(server.address() as AddressInfo).port}`;

  const headers = (person: ScenePerson) => {
    const token = signAccessToken(
      config.sessionSecret,
      { userId: person.id, gymId: person.gymId, sessionId: person.sessionId },
      now,
    );
    return { cookie: `mf_access=${token}; XSRF-TOKEN=token`, 'x-xsrf-token': 'token' };
  };

  const send = async <T>(path: string, init: RequestInit): Promise<Answer<T>> => {
    const response = await fetch(`${baseUrl}${path}`, { redirect: 'manual', ...init });
    const text = await response.text();
    const isJson = /json/.test(response.headers.get('content-type') ?? '');
    return {
      status: response.status,
      headers: response.headers,
      text,
      body: (isJson ? JSON.parse(text) : {}) as T,
    };
  };

  const scene: Scene = {
    baseUrl,
    routes: routes.registered,
    database,
    store,
    platform,
    mailer,
    headers,
    pass(ms) {
      now = new Date(now.getTime() + ms);
    },
    now: () => now,

    async gym(more = {}) {
      const id = newId();
      await database('gyms').insert({
        id,
        name: 'Ironbirch Barbell',
        time_zone: 'Europe/Stockholm',
        promise_hours: 8,
        coaching_hours: JSON.stringify(WEEK),
        retention_days: 365,
        created_at: now,
        ...more,
      });
      return { id };
    },

    async person(gym, role, more = {}) {
      const id = newId();
      const sessionId = newId();
      const name = `${role} ${id.slice(-4)}`;
      await database('users').insert({
        id,
        gym_id: gym.id,
        name,
        email: `${id}@ironbirch.example`,
        role,
        password_hash: 'none',
        created_at: now,
        ...more,
      });
      await database('sessions').insert({
        id: sessionId,
        gym_id: gym.id,
        user_id: id,
        device: 'test',
        created_at: now,
        last_used_at: now,
        expires_at: new Date(now.getTime() + 365 * 86_400_000),
      });
      return { id, name, gymId: gym.id, sessionId };
    },

    async lift(gym, { views = ['front', 'side'], name = 'Goblet squat' } = {}) {
      const id = newId();
      const brief = {
        views,
        repsMin: 2,
        repsMax: 3,
        cameraHeightCm: 90,
        cameraDistanceCm: 250,
        inFrame: 'Head to feet.',
        note: '',
      };
      await database('lifts').insert({
        id,
        gym_id: gym.id,
        name,
        pattern: 'squat',
        brief: JSON.stringify(brief),
        created_at: now,
      });
      const faultIds = [newId(), newId()];
      await database('lift_faults').insert(
        faultIds.map((faultId, position) => ({
          id: faultId,
          gym_id: gym.id,
          lift_id: id,
          position,
          name: `Fault ${position}`,
          phase: 'bottom',
          view: 'side',
          cue: 'Sit between your heels',
        })),
      );
      const scaleIds = [newId()];
      await database('lift_scales').insert({
        id: scaleIds[0],
        gym_id: gym.id,
        lift_id: id,
        position: 0,
        name: 'Box squat',
        level: 'easier',
        note: 'To a chair.',
      });
      return { id, faultIds, scaleIds };
    },

    async assignment(gym, lift, by, more = {}) {
      const id = newId();
      await database('assignments').insert({
        id,
        gym_id: gym.id,
        lift_id: lift.id,
        title: 'Film your squat',
        reps: more.reps ?? null,
        rounds: more.rounds ?? null,
        for_all: more.members === undefined,
        created_by: by.id,
        created_at: now,
        closed_at: more.closed ? now : null,
      });
      for (const member of more.members ?? []) {
        await database('assignment_members').insert({
          assignment_id: id,
          gym_id: gym.id,
          member_id: member.id,
        });
      }
      return id;
    },

    call: (person, method, path, body, extra = {}) =>
      send(path, {
        method,
        headers: {
          ...headers(person),
          ...(body === undefined ? {} : { 'content-type': 'application/json' }),
          ...extra,
        },
        body: body === undefined ? undefined : JSON.stringify(body),
      }),

    upload: (person, takeId, view, bytes, extra = {}) => {
      const form = new FormData();
      form.append('file', new Blob([new Uint8Array(bytes)], { type: 'video/mp4' }), 'clip.mp4');
      return send(`/api/takes/${takeId}/clips/${view}`, {
        method: 'POST',
        headers: { ...headers(person), ...extra },
        body: form,
      });
    },

    async makeReady(clipId, proxy = videoBytes(4096)) {
      const row: { gym_id: string; original_key: string } = await database('clips')
        .where({ id: clipId })
        .first();
      const prefix = `${row.original_key.replace(/\/original$/, '')}/r1-${newId()}`;
      await store.putStream(`${prefix}/proxy.mp4`, bytesStream(proxy), 'video/mp4');
      await store.putStream(`${prefix}/poster.jpg`, bytesStream(Buffer.from('poster')), 'image/jpeg');
      await store.putStream(`${prefix}/thumb-03.jpg`, bytesStream(Buffer.from('third')), 'image/jpeg');
      await database.transaction(async (trx) => {
        const clip = await findClip(trx, row.gym_id, clipId, true);
        if (!clip) throw new Error('no such clip');
        await publishClip(
          trx,
          clip,
          {
            outputPrefix: prefix,
            durationMs: 6000,
            width: 720,
            height: 1280,
            fps: { num: 30, den: 1 },
            frames: 180,
            sourceFacts: { durationMs: 6000 },
          },
          now,
        );
      });
    },

    async makeUnplayable(clipId, reason) {
      const row: { gym_id: string } = await database('clips').where({ id: clipId }).first();
      await database.transaction(async (trx) => {
        const clip = await findClip(trx, row.gym_id, clipId, true);
        if (!clip) throw new Error('no such clip');
        await refuseClip(trx, clip, reason, config.publicUrl, now);
      });
    },

    async waitingTake(member, assignmentId, words = {}) {
      const take = await scene.call<{ id: string; views: string[] }>(
        member,
        'POST',
        `/api/assignments/${assignmentId}/takes`,
        words,
      );
      for (const view of take.body.views) {
        const clip = await scene.upload<{ id: string }>(member, take.body.id, view, videoBytes(5000));
        await scene.makeReady(clip.body.id);
      }
      const submitted = await scene.call(member, 'POST', `/api/takes/${take.body.id}/submit`);
      if (submitted.body['state'] !== 'waiting') throw new Error(`not waiting: ${submitted.text}`);
      return take.body.id;
    },

    async close() {
      server.closeAllConnections();
      await new Promise((resolve) => server.close(resolve));
      mailer.close();
      await opened.close();
      await testDatabase.drop();
    },
  };
  return scene;
}

function listen(server: Server): Promise<void> {
  return new Promise((resolve) => server.listen(0, '127.0.0.1', resolve));
}

const bytesStream = (bytes: Buffer) => Readable.from([bytes]);
