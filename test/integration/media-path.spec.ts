import { mkdtemp, readFile, rm, writeFile } from 'node:fs/promises';
import { join } from 'node:path';
import { afterAll, beforeAll, describe, expect, inject, it, vi } from 'vitest';
import type { Problem } from '../../server/contract/common';
import type { ClipDto, TakeDetailDto, TakeDto } from '../../server/contract';
import { phoneClip } from '../e2e/support/phone-clips';
import { PATIENCE, keysOfTake, mailsTo, openGym, type StaffedGym } from '../fixtures/gym';
import { makeClip, runTool } from '../media/support/clip-maker';
import { inspect } from '../media/support/inspect';
import { startApp, type TestApp } from '../support/app';
import type { Answered } from '../support/caller';

const MAX_BYTES = 2_000_000;
const MAX_MS = 4_000;

let app: TestApp;
let gym: StaffedGym;
let folder: string;
/** As a phone writes it: 1080p60 HEVC lying down with a display matrix, with place, device and date. */
let phone: Buffer<ArrayBuffer>;
let plain: Buffer<ArrayBuffer>;

const bytesOf = async (path: string) => Buffer.from(await readFile(path));

beforeAll(async () => {
  folder = await mkdtemp(join(inject('services').dir, 'media-path-'));
  const dated = join(folder, 'dated.mov');
  await runTool('ffmpeg', [
    ...['-v', 'error', '-i', await phoneClip('phone-front.mov'), '-map', '0', '-c', 'copy'],
    ...['-metadata', 'creation_time=2026-11-30T18:04:05Z', '-movflags', 'use_metadata_tags', dated],
  ]);
  phone = await bytesOf(dated);
  plain = await bytesOf(await phoneClip('plain-side.mp4'));
  app = await startApp({ uploadMaxBytes: MAX_BYTES, clipMaxMs: MAX_MS });
  await app.work();
  gym = await openGym(app);
}, 240_000);
afterAll(async () => {
  await app.stop();
  await rm(folder, { recursive: true, force: true });
});

const send = (takeId: string, view: string, bytes: Buffer<ArrayBuffer>, name = 'clip.mp4') =>
  gym.member.upload(`/api/takes/${takeId}/clips/${view}`, bytes, name);
async function sent(takeId: string, view: string, bytes: Buffer<ArrayBuffer>): Promise<ClipDto> {
  const answer = await send(takeId, view, bytes);
  expect(answer.status).toBe(201);
  return answer.body as ClipDto;
}
const takeOf = (id: string) => gym.member.get<TakeDetailDto>(`/api/takes/${id}`);
const becomes = (id: string, state: TakeDto['state']) =>
  vi.waitFor(async () => {
    expect((await takeOf(id)).state).toBe(state);
  }, PATIENCE);
const clipOf = async (takeId: string, view: string): Promise<ClipDto> => {
  const clip = (await takeOf(takeId)).clips.find((one) => one.view === view);
  if (!clip) throw new Error(`the take has no ${view} clip`);
  return clip;
};

describe('a take from the phone to the board', () => {
  let take: TakeDto;
  let front: ClipDto;
  let file: string;

  beforeAll(async () => {
    take = await gym.draft();
    await sent(take.id, 'front', phone);
    await sent(take.id, 'side', plain);
    await Promise.all([1, 2].map(() => gym.member.ok('POST', `/api/takes/${take.id}/submit`)));
    await becomes(take.id, 'waiting');
    front = await clipOf(take.id, 'front');
    const film = await gym.coach.fetch(front.media?.proxy ?? '');
    file = join(folder, 'proxy.mp4');
    await writeFile(file, Buffer.from(await film.arrayBuffer()));
  });

  it('is handed in once, though it was sent twice at once, and waits once', async () => {
    const types = (await takeOf(take.id)).history.map(({ type }) => type);
    expect(types).toEqual(['take.created', 'take.submitted', 'take.waiting']);
  });

  it('arrives as an upright H.264 film at a constant rate that any browser plays', async () => {
    const proxy = await inspect(file);
    const pictures = proxy.streams.filter((stream) => stream.codec_type === 'video');
    expect(pictures).toMatchObject([
      { codec_name: 'h264', pix_fmt: 'yuv420p', width: 720, height: 1280, avg_frame_rate: '60/1' },
    ]);
    expect(pictures[0]?.r_frame_rate).toBe('60/1');
    expect(pictures[0]?.side_data_list ?? []).toEqual([]);
    proxy.timesS.forEach((at, n) => {
      expect(at).toBeCloseTo(n / 60, 4);
    });
    expect(front).toMatchObject({
      width: 720,
      height: 1280,
      fps: { num: 60, den: 1 },
      frames: proxy.timesS.length,
      state: 'ready',
    });
    expect(proxy.streams.some((stream) => stream.codec_name === 'aac')).toBe(true);
  });

  it('stands the way up that it was filmed', async () => {
    const seen = await greys(file);
    const drawn = await greys(await phoneClip('plain-front.mp4'));
    const apart = (one: Buffer, other: Buffer) =>
      one.reduce((sum, grey, n) => sum + Math.abs(grey - (other[n] ?? 0)), 0) / one.length;
    // The same lifter in the same room, drawn upright; on its head it would be as far off as any other picture.
    expect(apart(seen, drawn)).toBeLessThan(apart(Buffer.from(seen).reverse(), drawn) / 2);
  });

  it('says nothing of where, when and with what it was filmed', async () => {
    const original = await inspect(await written('original.mov', phone));
    expect(original.tags).toMatchObject({ make: 'Invented', model: 'Pocket 3' });
    expect(JSON.stringify(original.tags)).toContain('+57.7');
    expect(JSON.stringify(original.tags)).toContain('2026-11-30T18:04:05');
    const proxy = await inspect(file);
    const tags = JSON.stringify([proxy.tags, ...proxy.streams.map((stream) => stream.tags ?? {})]);
    expect(tags).not.toMatch(/locat|make|model|creation|date|Invented|Pocket|57\.7|2026/i);
    const bytes = (await readFile(file)).toString('latin1');
    for (const told of ['Invented', 'Pocket', '+57.7', 'ISO6709']) expect(bytes).not.toContain(told);
  });

  it('is served in ranges to the member and the coach, and to no other gym', async () => {
    const whole = await readFile(file);
    const address = front.media?.proxy ?? '';
    for (const who of [gym.member, gym.coach]) {
      const part = await who.fetch(address, { headers: { range: 'bytes=100-299' } });
      expect(part.status).toBe(206);
      expect(part.headers.get('content-range')).toBe(`bytes 100-299/${String(whole.length)}`);
      expect(Buffer.from(await part.arrayBuffer()).equals(whole.subarray(100, 300))).toBe(true);
    }
    const other = await openGym(app);
    expect((await other.coach.fetch(address)).status).toBe(404);
    expect((await app.caller().fetch(address)).status).toBe(401);
  });

  it('has a poster, a filmstrip and twelve thumbnails, all of them pictures', async () => {
    const { poster, filmstrip, thumbnails } = front.media ?? { poster: '', filmstrip: '', thumbnails: [] };
    expect(thumbnails).toHaveLength(12);
    for (const address of [poster, filmstrip, ...thumbnails]) {
      const still = await gym.coach.fetch(address);
      expect(still.headers.get('content-type')).toBe('image/jpeg');
      const bytes = Buffer.from(await still.arrayBuffer());
      const { streams } = await inspect(await written('still.jpg', bytes));
      expect(streams).toMatchObject([{ codec_name: 'mjpeg' }]);
    }
  });

  it('keeps the original to its member until the gym lets coaches see it', async () => {
    const address = `/api/clips/${front.id}/original`;
    const own = await gym.member.fetch(address);
    expect(Buffer.from(await own.arrayBuffer()).equals(phone)).toBe(true);
    expect((await gym.coach.fetch(address)).status).toBe(403);
    await gym.owner.ok('PATCH', '/api/gym', { coachesSeeOriginals: true });
    expect((await gym.coach.fetch(address)).status).toBe(200);
    await gym.owner.ok('PATCH', '/api/gym', { coachesSeeOriginals: false });
    expect((await gym.coach.fetch(address)).status).toBe(403);
  });
});

/** The first picture of a film, small and grey. */
const greys = (path: string) =>
  runTool('ffmpeg', [
    ...['-v', 'error', '-i', path, '-frames:v', '1', '-vf', 'scale=18:32'],
    ...['-f', 'rawvideo', '-pix_fmt', 'gray', 'pipe:1'],
  ]);

async function written(name: string, bytes: Buffer): Promise<string> {
  const path = join(folder, name);
  await writeFile(path, bytes);
  return path;
}

describe('a file that is no film', () => {
  const playlist = '#EXTM3U\n#EXT-X-TARGETDURATION:5\n#EXTINF:5,\nhttp://127.0.0.1:1/secret\n';
  const list = 'ffconcat version 1.0\nfile /etc/passwd\nduration 1\n';
  const drawing = '<svg xmlns="http://www.w3.org/2000/svg"><image href="file:///etc/passwd"/></svg>';

  const refused = (answer: Answered, statuses: readonly number[], words: RegExp) => {
    expect(statuses).toContain(answer.status);
    expect(answer.headers.get('content-type')).toContain('application/problem+json');
    expect((answer.body as Problem).detail).toMatch(words);
  };

  it.each([
    ['text that calls itself a film', 'three reps.mp4', 'Three reps from the side.\n'.repeat(300)],
    ['a playlist that names an address', 'clip.m3u8', playlist],
    ['a list that names a file', 'clip.mp4', list],
    ['a drawing that names a file', 'clip.svg', drawing],
  ])('is refused in words and leaves nothing: %s', async (_what, name, text) => {
    const take = await gym.draft();
    refused(await send(take.id, 'front', Buffer.from(text), name), [415, 422], /Choose a clip/);
    expect(await keysOfTake(app, gym.gymId, take.id)).toEqual([]);
    expect((await takeOf(take.id)).clips).toEqual([]);
  });

  it('is refused when it is empty', async () => {
    const take = await gym.draft();
    refused(await send(take.id, 'front', Buffer.alloc(0)), [422], /empty/);
    expect(await keysOfTake(app, gym.gymId, take.id)).toEqual([]);
  });

  it('is refused when it is too large, and nothing of it stays', async () => {
    const take = await gym.draft();
    const long = Buffer.concat([plain, Buffer.alloc(MAX_BYTES)]);
    refused(await send(take.id, 'front', long), [413], /at most 2 MB/);
    expect(await keysOfTake(app, gym.gymId, take.id)).toEqual([]);
  });
});

describe('a film that cannot be used', () => {
  async function handedIn(side: Buffer<ArrayBuffer>): Promise<TakeDto> {
    const take = await gym.draft();
    await sent(take.id, 'side', side);
    await sent(take.id, 'front', plain);
    return gym.member.ok<TakeDto>('POST', `/api/takes/${take.id}/submit`);
  }

  it('goes back with reason, remedy and a mail when it was cut off, and waits once another was sent', async () => {
    const before = (await mailsTo(gym.member, gym.memberEmail)).length;
    const take = await handedIn(plain.subarray(0, Math.floor(plain.length / 2)));
    await becomes(take.id, 'unplayable');
    const broken = await takeOf(take.id);
    expect(broken.problem?.reason).toBe('damaged');
    expect(broken.problem?.message).toContain('damaged');
    expect(broken.problem?.remedy).toContain('send it again');
    await expect.poll(() => mailsTo(gym.member, gym.memberEmail), PATIENCE).toHaveLength(before + 1);
    const [mail] = await mailsTo(gym.member, gym.memberEmail);
    expect(mail?.text).toContain(broken.problem?.remedy);
    expect(mail?.text).toContain(`/filming/${take.assignmentId}`);

    await sent(take.id, 'side', plain);
    await gym.member.ok('POST', `/api/takes/${take.id}/submit`);
    await becomes(take.id, 'waiting');
    expect((await takeOf(take.id)).problem).toBeNull();
    const left = await clipOf(take.id, 'side');
    await expect
      .poll(
        async () =>
          (await keysOfTake(app, gym.gymId, take.id)).filter((key) => key.endsWith('/original')).length,
        PATIENCE,
      )
      .toBe(2);
    expect(left.state).toBe('ready');
  });

  it('goes back when it is too long', async () => {
    const path = join(folder, 'long.mp4');
    await makeClip(path, { frames: 30 * 6 });
    const take = await handedIn(await bytesOf(path));
    await becomes(take.id, 'unplayable');
    expect((await takeOf(take.id)).problem).toMatchObject({ reason: 'too-long' });
  });
});
