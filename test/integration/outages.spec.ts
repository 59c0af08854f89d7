import { mkdtemp, rm } from 'node:fs/promises';
import { request } from 'node:http';
import { join } from 'node:path';
import { afterAll, beforeAll, describe, expect, inject, it } from 'vitest';
import type { Problem } from '../../server/contract/common';
import type { ClipDto, TakeDto } from '../../server/contract/takes';
import { startObjectStore } from '../../server/start/fakes';
import type { RunningProcess } from '../../server/start/processes';
import { PATIENCE } from '../fixtures/gym';
import { freePort } from '../support/free-port';
import { openScene, videoBytes, type Scene, type SceneGym, type ScenePerson } from './support/scene';

const START = new Date('2026-12-01T10:00:00.000Z');

let folder: string;
let port: number;
let store: RunningProcess;
let scene: Scene;
let gym: SceneGym;
let member: ScenePerson;
let assignments: () => Promise<string>;

const openStore = () =>
  startObjectStore({ dir: join(folder, 'objects'), port, logFile: join(folder, 'store.log') });

beforeAll(async () => {
  folder = await mkdtemp(join(inject('services').dir, 'outages-'));
  port = await freePort();
  store = await openStore();
  scene = await openScene(START, {
    S3_ENDPOINT: `http://127.0.0.1:${String(port)}`,
    LOG_LEVEL: 'silent',
  });
  gym = await scene.gym();
  member = await scene.person(gym, 'member');
  const coach = await scene.person(gym, 'coach');
  const lift = await scene.lift(gym);
  assignments = () => scene.assignment(gym, lift, coach);
});
afterAll(async () => {
  await scene.close();
  await store.stop();
  await rm(folder, { recursive: true, force: true });
});

async function draft(): Promise<TakeDto> {
  return (await scene.call<TakeDto>(member, 'POST', `/api/assignments/${await assignments()}/takes`, {}))
    .body;
}
async function keysOf(takeId: string): Promise<string[]> {
  const keys: string[] = [];
  for await (const key of scene.store.list(`gyms/${gym.id}/takes/${takeId}/`)) keys.push(key);
  return keys;
}
const clipsOf = (takeId: string) => scene.database('clips').where({ take_id: takeId });

describe('while the store does not answer', () => {
  it('a clip is refused as not available just now, nothing of it is left, and it works afterwards', async () => {
    const take = await draft();
    await store.stop();
    const refused = await scene.upload<Problem>(member, take.id, 'front', videoBytes(6_000_000), {
      'idempotency-key': 'in-the-outage',
    });
    expect(refused.status).toBe(503);
    expect(refused.headers.get('retry-after')).toBe('5');
    expect(refused.body.detail).toContain('try again');
    expect(await clipsOf(take.id)).toEqual([]);
    expect(await scene.database('jobs').where({ type: 'clip.process' })).toEqual([]);

    store = await openStore();
    expect(await keysOf(take.id)).toEqual([]);
    const again = await scene.upload<ClipDto>(member, take.id, 'front', videoBytes(6_000_000), {
      'idempotency-key': 'in-the-outage',
    });
    expect(again.status).toBe(201);
    expect(await keysOf(take.id)).toHaveLength(1);
  });

  it('a clip on its way is refused when the store goes in the middle, and nothing of it is left', async () => {
    const take = await draft();
    const border = 'border';
    const half = videoBytes(7_000_000);
    const outgoing = request(`${scene.baseUrl}/api/takes/${take.id}/clips/front`, {
      method: 'POST',
      headers: { ...scene.headers(member), 'content-type': `multipart/form-data; boundary=${border}` },
    });
    const status = new Promise<number>((resolve, reject) => {
      outgoing.once('response', (answer) => {
        answer.resume();
        resolve(answer.statusCode ?? 0);
      });
      outgoing.once('error', reject);
    });
    outgoing.write(`--${border}\r\ncontent-disposition: form-data; name="file"; filename="clip.mp4"\r\n\r\n`);
    await new Promise((resolve) => outgoing.write(half, resolve));
    await store.stop();
    outgoing.write(Buffer.alloc(7_000_000, 2));
    outgoing.end(`\r\n--${border}--\r\n`);
    expect(await status).toBe(503);
    expect(await clipsOf(take.id)).toEqual([]);
    store = await openStore();
    expect(await keysOf(take.id)).toEqual([]);
    expect((await scene.upload(member, take.id, 'front', videoBytes(4000))).status).toBe(201);
  });
});

describe('when the database drops its connections', () => {
  const killAll = async () => {
    const [own] = (await scene.database.raw('SELECT CONNECTION_ID() AS id')) as [[{ id: number }]];
    const [others] = (await scene.database.raw(
      'SELECT id FROM information_schema.processlist WHERE db = DATABASE() AND id <> ?',
      [own[0].id],
    )) as [{ id: number }[]];
    for (const { id } of others) await scene.database.raw('KILL CONNECTION ?', [id]);
    await expect(scene.database.raw('KILL CONNECTION CONNECTION_ID()')).rejects.toThrow();
    return others.length + 1;
  };

  it('a call in that instant is told to try again, and the next ones are answered as ever', async () => {
    const take = await draft();
    const reads = () =>
      Promise.all(
        Array.from({ length: 8 }, () => scene.call<TakeDto>(member, 'GET', `/api/takes/${take.id}`)),
      );
    await reads();
    expect(await killAll()).toBeGreaterThan(1);
    for (const answer of await reads()) {
      if (answer.status === 503) expect(answer.headers.get('retry-after')).toBe('5');
      else expect(answer).toMatchObject({ status: 200, body: { id: take.id } });
    }
    await expect
      .poll(async () => (await reads()).map(({ status }) => status), PATIENCE)
      .toEqual(Array.from({ length: 8 }, () => 200));
    expect((await scene.upload(member, take.id, 'side', videoBytes(4000))).status).toBe(201);
  });

  it('a transaction that was cut off leaves nothing, and its call can be made again', async () => {
    const take = await draft();
    const killer = scene.database.transaction(async (trx) => {
      const [[{ id }]] = (await trx.raw('SELECT CONNECTION_ID() AS id')) as [[{ id: number }]];
      await trx('takes').where({ id: take.id }).update({ note: 'half written' });
      await scene.database.raw('KILL CONNECTION ?', [id]);
      await trx('takes').where({ id: take.id }).update({ load: '24 kg' });
    });
    await expect(killer).rejects.toThrow();
    const kept = await scene.call<TakeDto>(member, 'GET', `/api/takes/${take.id}`);
    expect(kept.body).toMatchObject({ note: null, load: null });
    const changed = await scene.call<TakeDto>(member, 'PATCH', `/api/takes/${take.id}`, { load: '24 kg' });
    expect(changed.body).toMatchObject({ note: null, load: '24 kg' });
  });
});
