import { readFile } from 'node:fs/promises';
import { Readable } from 'node:stream';
import { afterAll, beforeAll, beforeEach, describe, expect, it } from 'vitest';
import type { TakeDetailDto } from '../../server/contract/answers';
import type { ClipDto, TakeDto } from '../../server/contract/takes';
import type { Conclusion } from '../../server/worker/handler';
import { JOB_KINDS } from '../../server/worker/job-kinds';
import { processClip } from '../../server/worker/process-clip';
import { phoneClip } from '../e2e/support/phone-clips';
import { openScene, videoBytes, type Scene, type SceneGym, type ScenePerson } from './support/scene';

const START = new Date('2026-12-01T10:00:00.000Z');

let scene: Scene;
let gym: SceneGym;
let member: ScenePerson;
let coach: ScenePerson;
let film: Buffer;
let assignments: () => Promise<string>;

beforeAll(async () => {
  scene = await openScene(START);
  gym = await scene.gym();
  member = await scene.person(gym, 'member');
  coach = await scene.person(gym, 'coach');
  const lift = await scene.lift(gym);
  assignments = () => scene.assignment(gym, lift, coach);
  film = await readFile(await phoneClip('plain-front.mp4'));
});
beforeEach(() => scene.database('jobs').delete());
afterAll(() => scene.close());

async function draft(): Promise<TakeDto> {
  return (await scene.call<TakeDto>(member, 'POST', `/api/assignments/${await assignments()}/takes`, {}))
    .body;
}
async function uploaded(bytes = film): Promise<ClipDto> {
  const take = await draft();
  return (await scene.upload<ClipDto>(member, take.id, 'front', bytes)).body;
}
/** A take that was handed in while its clips are still to be made playable. */
async function submitted(): Promise<{ take: TakeDto; clips: ClipDto[] }> {
  const { id } = await draft();
  const clips = [];
  for (const view of ['front', 'side'])
    clips.push((await scene.upload<ClipDto>(member, id, view, videoBytes(4000))).body);
  return { take: (await scene.call<TakeDto>(member, 'POST', `/api/takes/${id}/submit`)).body, clips };
}
const jobsOf = (type: string) => scene.database('jobs').where({ type });
const stateOf = async (clip: ClipDto) =>
  (await scene.database('clips').where({ id: clip.id }).first('state', 'output_prefix')) as {
    state: string;
    output_prefix: string | null;
  };
const homeOf = (clip: ClipDto) => `gyms/${gym.id}/takes/${clip.takeId}/clips/${clip.id}`;
const put = (key: string) => scene.store.putStream(key, Readable.from([Buffer.from('x')]), 'video/mp4');
async function keysUnder(prefix: string): Promise<string[]> {
  const keys: string[] = [];
  for await (const key of scene.store.list(prefix)) keys.push(key);
  return keys;
}
const trim = (clip: ClipDto) =>
  scene.call(member, 'PATCH', `/api/clips/${clip.id}`, { trim: { startMs: 0, endMs: 900 } });

const jobOf = async (clip: ClipDto) =>
  (await scene
    .database('jobs')
    .where({ dedupe_key: `clip.process:${clip.id}` })
    .first('id')) as { id: number };
/** The work of the job that the upload queued, up to what it would write. */
async function worked(clip: ClipDto, attempt = 1): Promise<Conclusion> {
  return processClip(
    { gymId: gym.id, clipId: clip.id },
    {
      platform: scene.platform,
      mailer: scene.mailer,
      attempt,
      jobId: (await jobOf(clip)).id,
      signal: new AbortController().signal,
    },
  );
}
async function conclude(conclusion: Conclusion): Promise<void> {
  if (!conclusion) throw new Error('nothing to write');
  await scene.database.transaction(conclusion);
}

describe('a clip that changes while it is made playable', () => {
  it('is not published as it was before it was trimmed', async () => {
    const clip = await uploaded();
    const conclusion = await worked(clip);
    expect((await trim(clip)).status).toBe(200);
    await conclude(conclusion);
    expect(await stateOf(clip)).toEqual({ state: 'uploaded', output_prefix: null });
    const { id } = await jobOf(clip);
    expect(await jobsOf('objects.delete')).toMatchObject([
      { payload: { prefixes: [`${homeOf(clip)}/r1-${id}-1`] } },
    ]);
  });

  it('is not called unplayable for what it was before it was trimmed', async () => {
    const clip = await uploaded(videoBytes(4000));
    const conclusion = await worked(clip);
    await trim(clip);
    await conclude(conclusion);
    expect((await stateOf(clip)).state).toBe('uploaded');
  });

  it('is not given up by a job that a newer one has followed', async () => {
    const clip = await uploaded();
    const { id } = await jobOf(clip);
    await trim(clip);
    await scene.database.transaction(async (trx) =>
      JOB_KINDS['clip.process'].onDead?.(
        { gymId: gym.id, clipId: clip.id },
        { trx, platform: scene.platform, now: scene.now(), jobId: id, attempt: 5 },
      ),
    );
    expect((await stateOf(clip)).state).toBe('uploaded');
  });

  it('leaves the store alone while its transaction is open, when it was taken back', async () => {
    const clip = await uploaded();
    const conclusion = await worked(clip);
    await scene.call(member, 'DELETE', `/api/clips/${clip.id}`);
    await scene.database('jobs').delete();
    const before = await keysUnder(`${homeOf(clip)}/r`);
    expect(before).toHaveLength(15);
    await conclude(conclusion);
    expect(await keysUnder(`${homeOf(clip)}/r`)).toEqual(before);
    expect(await jobsOf('objects.delete')).toHaveLength(1);
  });

  it('loses what its own earlier attempts left, and nothing of another job', async () => {
    const clip = await uploaded();
    const { id } = await jobOf(clip);
    const others = `${homeOf(clip)}/r1-${id}9-1/proxy.mp4`;
    const own = `${homeOf(clip)}/r1-${id}-1/proxy.mp4`;
    await Promise.all([put(others), put(own)]);
    await conclude(await worked(clip, 2));
    const left = await keysUnder(`${homeOf(clip)}/r`);
    expect(left).toContain(others);
    expect(left).not.toContain(own);
    expect((await stateOf(clip)).output_prefix).toBe(`${homeOf(clip)}/r1-${id}-2`);
  });
});

describe('a take that cannot be played', () => {
  it('is told to its member by mail, with the reason, the remedy and where to send it again', async () => {
    const { take, clips } = await submitted();
    await scene.makeUnplayable(clips[0]?.id ?? '', 'too-short');
    const [mail] = (await jobsOf('mail.send')) as {
      payload: { to: string; subject: string; text: string };
    }[];
    expect(await jobsOf('mail.send')).toHaveLength(1);
    expect(mail?.payload.to).toBe(`${member.id}@ironbirch.example`);
    expect(mail?.payload.subject).toContain('goblet squat');
    expect(mail?.payload.text).toContain('The clip is too short to see a rep.');
    expect(mail?.payload.text).toContain('Film the whole lift');
    expect(mail?.payload.text).toContain(`${scene.platform.config.publicUrl}/filming/${take.assignmentId}`);
  });

  it('is tried again without being sent again', async () => {
    const { take, clips } = await submitted();
    await scene.makeUnplayable(clips[0]?.id ?? '', 'gave-up');
    await scene.call(member, 'POST', `/api/takes/${take.id}/retry`);
    const detail = (await scene.call<TakeDetailDto>(member, 'GET', `/api/takes/${take.id}`)).body;
    expect(detail.history.map(({ type }) => type)).toEqual([
      'take.created',
      'take.submitted',
      'take.unplayable',
      'take.retried',
    ]);
  });
});
