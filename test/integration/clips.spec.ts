import { createHash } from 'node:crypto';
import { request } from 'node:http';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import type { ClipDto, TakeDto } from '../../server/contract/takes';
import { openScene, videoBytes, type Scene, type SceneGym, type ScenePerson } from './support/scene';

const START = new Date('2026-12-01T10:00:00.000Z');
const MAX_BYTES = 12_000_000;

let scene: Scene;
let gym: SceneGym;
let member: ScenePerson;
let coach: ScenePerson;
let assignments: () => Promise<string>;

beforeAll(async () => {
  scene = await openScene(START, { UPLOAD_MAX_BYTES: String(MAX_BYTES) });
});
beforeAll(async () => {
  gym = await scene.gym();
  member = await scene.person(gym, 'member');
  coach = await scene.person(gym, 'coach');
  const lift = await scene.lift(gym);
  assignments = () => scene.assignment(gym, lift, coach);
});
afterAll(() => scene.close());

async function draft(who = member): Promise<TakeDto> {
  const path = `/api/assignments/${await assignments()}/takes`;
  return (await scene.call<TakeDto>(who, 'POST', path, {})).body;
}
const clipsOf = (takeId: string) => scene.database('clips').where({ take_id: takeId });
async function objectsUnder(takeId: string): Promise<string[]> {
  const keys: string[] = [];
  for await (const key of scene.store.list(`gyms/${gym.id}/takes/${takeId}/`)) keys.push(key);
  return keys;
}
async function nothingOf(takeId: string) {
  expect(await clipsOf(takeId)).toHaveLength(0);
  expect(await objectsUnder(takeId)).toEqual([]);
}

describe('sending a clip', () => {
  it('stores the very bytes, hashed and counted, and has them processed', async () => {
    const take = await draft();
    const bytes = videoBytes(11_000_000);
    const answer = await scene.upload<ClipDto>(member, take.id, 'front', bytes);
    expect(answer.status).toBe(201);
    expect(answer.body).toMatchObject({
      takeId: take.id,
      view: 'front',
      state: 'uploaded',
      sizeBytes: bytes.length,
      sha256: createHash('sha256').update(bytes).digest('hex'),
      media: null,
    });
    const original = await scene.call(member, 'GET', `/api/clips/${answer.body.id}/original`);
    expect(original.status).toBe(200);
    expect(original.headers.get('content-length')).toBe(String(bytes.length));
    const [key] = await objectsUnder(take.id);
    const stored = await scene.store.get(key ?? '');
    const hash = createHash('sha256');
    for await (const chunk of stored ?? []) hash.update(chunk as Buffer);
    expect(hash.digest('hex')).toBe(answer.body.sha256);
    const jobs = await scene.database('jobs').where({ dedupe_key: `clip.process:${answer.body.id}` });
    expect(jobs).toMatchObject([{ type: 'clip.process', state: 'queued' }]);
    expect(await scene.database('events').where({ clip_id: answer.body.id })).toMatchObject([
      { type: 'clip.uploaded', to_staff: 0, to_user_id: member.id },
    ]);
  });

  it('takes two views and no third, and only views that were asked for', async () => {
    const take = await draft();
    expect((await scene.upload(member, take.id, 'front', videoBytes(2000))).status).toBe(201);
    expect((await scene.upload(member, take.id, 'side', videoBytes(2000))).status).toBe(201);
    expect((await scene.upload(member, take.id, 'back', videoBytes(2000))).status).toBe(404);
    const sideOnly = await scene.lift(gym, { views: ['side'], name: 'Swing' });
    const assignment = await scene.assignment(gym, sideOnly, coach);
    const other = await scene.call<TakeDto>(member, 'POST', `/api/assignments/${assignment}/takes`, {});
    const refused = await scene.upload(member, other.body.id, 'front', videoBytes(2000));
    expect(refused.status).toBe(422);
    expect(refused.body['detail']).toContain('the side view');
  });

  it('replaces the clip of a view, and has the old bytes deleted', async () => {
    const take = await draft();
    const first = await scene.upload<ClipDto>(member, take.id, 'front', videoBytes(2000));
    const second = await scene.upload<ClipDto>(member, take.id, 'front', videoBytes(3000));
    expect(await clipsOf(take.id)).toMatchObject([{ id: second.body.id, size_bytes: 3000 }]);
    const jobs = await scene
      .database('jobs')
      .where({ type: 'objects.delete' })
      .andWhere('payload', 'like', `%${first.body.id}%`);
    expect(jobs).toHaveLength(1);
  });

  it.each([
    ['text', Buffer.from('Three reps, filmed from the side.\n'.repeat(400)), 415],
    ['a picture', Buffer.concat([Buffer.from('\xff\xd8\xff\xe0', 'latin1'), Buffer.alloc(9000)]), 415],
    ['a short file of no kind', Buffer.from([1, 2, 3]), 415],
    ['nothing', Buffer.alloc(0), 422],
    ['too much', videoBytes(MAX_BYTES + 1), 413],
    ['far too much', videoBytes(MAX_BYTES + 1_000_000), 413],
  ])('refuses %s and keeps nothing', async (_what, bytes, status) => {
    const take = await draft();
    const answer = await scene.upload(member, take.id, 'front', bytes);
    expect(answer.status).toBe(status);
    expect(answer.headers.get('content-type')).toContain('application/problem+json');
    if (status === 413) expect(answer.body['detail']).toContain('12 MB');
    await nothingOf(take.id);
  });

  it('takes a file of exactly the limit', async () => {
    const take = await draft();
    expect((await scene.upload(member, take.id, 'front', videoBytes(MAX_BYTES))).status).toBe(201);
  });

  it('refuses a form without a file, and a body that is no form', async () => {
    const take = await draft();
    const path = `/api/takes/${take.id}/clips/front`;
    const form = new FormData();
    form.append('note', 'no file here');
    const headers = scene.headers(member);
    expect((await fetch(`${scene.baseUrl}${path}`, { method: 'POST', headers, body: form })).status).toBe(
      400,
    );
    expect((await scene.call(member, 'POST', path, { file: 'none' })).status).toBe(400);
    const wrongName = new FormData();
    wrongName.append('clip', new Blob([new Uint8Array(videoBytes(2000))]), 'clip.mp4');
    expect(
      (await fetch(`${scene.baseUrl}${path}`, { method: 'POST', headers, body: wrongName })).status,
    ).toBe(400);
    await nothingOf(take.id);
  });

  it('leaves nothing when the sender disconnects in the middle', async () => {
    const take = await draft();
    const boundary = 'border';
    const outgoing = request(`${scene.baseUrl}/api/takes/${take.id}/clips/front`, {
      method: 'POST',
      headers: {
        ...scene.headers(member),
        'idempotency-key': 'broken-off',
        'content-type': `multipart/form-data; boundary=${boundary}`,
        'content-length': 11_000_000,
      },
    });
    const broken = new Promise((resolve) => outgoing.once('close', resolve));
    outgoing.on('error', () => undefined);
    outgoing.write(
      `--${boundary}\r\ncontent-disposition: form-data; name="file"; filename="clip.mp4"\r\n\r\n`,
    );
    outgoing.write(videoBytes(7_000_000));
    // The key is kept while the call runs and dropped when it has failed.
    const calls = () => scene.database('idempotency_keys').where({ idempotency_key: 'broken-off' });
    await expect.poll(calls).toHaveLength(1);
    outgoing.destroy();
    await broken;
    await expect.poll(calls).toHaveLength(0);
    await nothingOf(take.id);
  });

  it('is refused once the take was sent, and to anyone but its member', async () => {
    const sent = await scene.waitingTake(member, await assignments());
    expect((await scene.upload(member, sent, 'front', videoBytes(2000))).status).toBe(409);
    const take = await draft();
    const other = await scene.person(gym, 'member');
    const stranger = await scene.person(await scene.gym(), 'member');
    expect((await scene.upload(other, take.id, 'front', videoBytes(2000))).status).toBe(404);
    expect((await scene.upload(stranger, take.id, 'front', videoBytes(2000))).status).toBe(404);
    expect((await scene.upload(coach, take.id, 'front', videoBytes(2000))).status).toBe(403);
    await nothingOf(take.id);
  });

  it('gives the first answer again for the same Idempotency-Key', async () => {
    const take = await draft();
    const key = { 'idempotency-key': 'clip-1' };
    const one = await scene.upload<ClipDto>(member, take.id, 'front', videoBytes(2000), key);
    const two = await scene.upload<ClipDto>(member, take.id, 'front', videoBytes(2000), key);
    expect(two.body.id).toBe(one.body.id);
  });

  it('is limited to sixty a day for each member', async () => {
    const eager = await scene.person(gym, 'member');
    const take = await draft(eager);
    const statuses = new Set<number>();
    for (let i = 0; i < 60; i += 1)
      statuses.add((await scene.upload(eager, take.id, 'front', videoBytes(50))).status);
    expect([...statuses]).toEqual([201]);
    const refused = await scene.upload(eager, take.id, 'front', videoBytes(50));
    expect(refused.status).toBe(429);
    expect(Number(refused.headers.get('retry-after'))).toBeGreaterThan(0);
  });
});

describe('changing a clip before the take is sent', () => {
  it('trims it within its length and has it processed again', async () => {
    const take = await draft();
    const clip = (await scene.upload<ClipDto>(member, take.id, 'front', videoBytes(2000))).body;
    await scene.makeReady(clip.id);
    const trim = (startMs: number, endMs: number) =>
      scene.call<ClipDto>(member, 'PATCH', `/api/clips/${clip.id}`, { trim: { startMs, endMs } });
    expect((await trim(1000, 1200)).status).toBe(422);
    expect((await trim(3000, 1000)).status).toBe(422);
    expect((await trim(0, 6001)).status).toBe(422);
    const trimmed = await trim(1000, 4000);
    expect(trimmed.body).toMatchObject({ trim: { startMs: 1000, endMs: 4000 }, state: 'uploaded' });
    const jobs = await scene
      .database('jobs')
      .where({ type: 'clip.process' })
      .andWhere('dedupe_key', 'like', `clip.process:${clip.id}%`);
    expect(jobs).toHaveLength(2);
  });

  it('removes it', async () => {
    const take = await draft();
    const clip = (await scene.upload<ClipDto>(member, take.id, 'front', videoBytes(2000))).body;
    const other = await scene.person(gym, 'member');
    expect((await scene.call(other, 'DELETE', `/api/clips/${clip.id}`)).status).toBe(404);
    expect((await scene.call(member, 'DELETE', `/api/clips/${clip.id}`)).status).toBe(204);
    expect(await clipsOf(take.id)).toHaveLength(0);
    expect((await scene.call(member, 'DELETE', `/api/clips/${clip.id}`)).status).toBe(404);
  });
});

describe('watching a clip', () => {
  const film = Buffer.from(Array.from({ length: 1234 }, (_, i) => i % 251));
  let clip: ClipDto;
  let proxy: string;

  beforeAll(async () => {
    const take = await draft();
    for (const view of ['front', 'side']) {
      const uploaded = (await scene.upload<ClipDto>(member, take.id, view, videoBytes(2000))).body;
      await scene.makeReady(uploaded.id, film);
    }
    const submitted = await scene.call<TakeDto>(member, 'POST', `/api/takes/${take.id}/submit`);
    const [front] = submitted.body.clips;
    if (!front?.media) throw new Error('not ready');
    clip = front;
    proxy = front.media.proxy;
  });

  const ranged = (range: string, headers: Record<string, string> = {}, method = 'GET') =>
    fetch(`${scene.baseUrl}${proxy}`, { method, headers: { ...scene.headers(coach), range, ...headers } });

  it('gives the whole with what a cache and a player need to know', async () => {
    const answer = await fetch(`${scene.baseUrl}${proxy}`, { headers: scene.headers(coach) });
    expect(answer.status).toBe(200);
    expect(Buffer.from(await answer.arrayBuffer()).equals(film)).toBe(true);
    for (const [name, value] of [
      ['content-type', 'video/mp4'],
      ['content-length', '1234'],
      ['accept-ranges', 'bytes'],
      ['cache-control', 'private, max-age=3600'],
      ['content-disposition', 'inline'],
      ['x-content-type-options', 'nosniff'],
    ] as const) {
      expect(answer.headers.get(name)).toBe(value);
    }
    expect(answer.headers.get('etag')).toMatch(/^"[\w-]+"$/);
  });

  // RFC 9110 §14.1.2 and §14.4, on 1234 bytes.
  it.each([
    ['bytes=0-499', 0, 499],
    ['bytes=500-', 500, 1233],
    ['bytes=-500', 734, 1233],
    ['bytes=-99999', 0, 1233],
    ['bytes=0-99999', 0, 1233],
    ['bytes=1233-1233', 1233, 1233],
  ])('gives %s as bytes %i to %i', async (range, start, end) => {
    const answer = await ranged(range);
    expect(answer.status).toBe(206);
    expect(answer.headers.get('content-range')).toBe(`bytes ${start}-${end}/1234`);
    expect(answer.headers.get('content-length')).toBe(String(end - start + 1));
    expect(Buffer.from(await answer.arrayBuffer()).equals(film.subarray(start, end + 1))).toBe(true);
  });

  it('refuses a range beyond the end, and answers others that it does not know with the whole', async () => {
    for (const range of ['bytes=1234-', 'bytes=-0']) {
      const answer = await ranged(range);
      expect(answer.status).toBe(416);
      expect(answer.headers.get('content-range')).toBe('bytes */1234');
    }
    for (const range of ['items=0-5', 'bytes=500-400', 'bytes=0-0,-1']) {
      const answer = await ranged(range);
      expect(answer.status).toBe(200);
      expect((await answer.arrayBuffer()).byteLength).toBe(1234);
    }
  });

  it('honours If-None-Match, If-Range and HEAD', async () => {
    const etag = (await ranged('bytes=0-0')).headers.get('etag') ?? '';
    const fresh = await ranged('bytes=0-9', { 'if-none-match': etag });
    expect(fresh.status).toBe(304);
    expect((await ranged('bytes=0-9', { 'if-range': etag })).status).toBe(206);
    expect((await ranged('bytes=0-9', { 'if-range': '"other"' })).status).toBe(200);
    const head = await ranged('bytes=0-9', {}, 'HEAD');
    expect(head.status).toBe(200);
    expect(head.headers.get('content-length')).toBe('1234');
  });

  it('goes on for others when a player leaves in the middle', async () => {
    const big = await draft();
    const uploaded = (await scene.upload<ClipDto>(member, big.id, 'front', videoBytes(2000))).body;
    await scene.makeReady(uploaded.id, Buffer.alloc(9_000_000, 3));
    const leaving = new AbortController();
    const path = `${scene.baseUrl}/api/clips/${uploaded.id}/proxy`;
    const answer = await fetch(path, { headers: scene.headers(member), signal: leaving.signal });
    const reader = answer.body?.getReader();
    expect((await reader?.read())?.done).toBe(false);
    leaving.abort();
    await expect(reader?.read()).rejects.toThrow('abort');
    const again = await fetch(path, { headers: scene.headers(member) });
    expect((await again.arrayBuffer()).byteLength).toBe(9_000_000);
  });

  it('gives stills, and nothing where there is none', async () => {
    const poster = await scene.call(coach, 'GET', clip.media?.poster ?? '');
    expect(poster).toMatchObject({ status: 200, text: 'poster' });
    expect(poster.headers.get('content-type')).toBe('image/jpeg');
    expect((await scene.call(coach, 'GET', `/api/clips/${clip.id}/thumbnail/3`)).text).toBe('third');
    expect((await scene.call(coach, 'GET', `/api/clips/${clip.id}/thumbnail/12`)).status).toBe(404);
    const missing = await scene.call(coach, 'GET', clip.media?.filmstrip ?? '');
    expect(missing.status).toBe(404);
    expect(missing.headers.get('content-type')).toContain('application/problem+json');
  });

  it('is for the member and the gym’s coaches alone', async () => {
    const other = await scene.person(gym, 'member');
    const stranger = await scene.person(await scene.gym(), 'owner');
    for (const path of [proxy, `/api/clips/${clip.id}/original`, `/api/clips/${clip.id}/thumbnail/3`]) {
      expect((await scene.call(member, 'GET', path)).status).toBe(200);
      expect((await scene.call(other, 'GET', path)).status).toBe(404);
      expect((await scene.call(stranger, 'GET', path)).status).toBe(404);
      expect((await fetch(`${scene.baseUrl}${path}`)).status).toBe(401);
    }
  });

  it('keeps originals to the member unless the gym says otherwise', async () => {
    const path = `/api/clips/${clip.id}/original`;
    expect((await scene.call(coach, 'GET', path)).status).toBe(403);
    await scene.database('gyms').where({ id: gym.id }).update({ coaches_see_originals: true });
    expect((await scene.call(coach, 'GET', path)).status).toBe(200);
    await scene.database('gyms').where({ id: gym.id }).update({ coaches_see_originals: false });
  });

  it('is noted once an hour for each who watches', async () => {
    const watcher = await scene.person(gym, 'coach');
    const notes = () => scene.database('audit').where({ actor_id: watcher.id, action: 'clip.viewed' });
    for (let i = 0; i < 3; i += 1) await scene.call(watcher, 'GET', proxy);
    expect(await notes()).toMatchObject([{ subject_id: clip.id, gym_id: gym.id }]);
    scene.pass(3_600_000);
    await scene.call(watcher, 'GET', proxy);
    expect(await notes()).toHaveLength(2);
  });

  it('waits for the guardian’s consent where the member is a minor', async () => {
    await scene.database('users').where({ id: member.id }).update({ born_on: '2012-06-01' });
    const answer = await scene.call(coach, 'GET', proxy);
    expect(answer.status).toBe(403);
    expect(answer.body['detail']).toContain('guardian');
    expect((await scene.call(member, 'GET', proxy)).status).toBe(200);
    await scene.database('users').where({ id: member.id }).update({ born_on: null });
  });
});
