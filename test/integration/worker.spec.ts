import { readFile } from 'node:fs/promises';
import { Readable } from 'node:stream';
import { afterAll, afterEach, beforeAll, beforeEach, describe, expect, it } from 'vitest';
import type { TakeDetailDto } from '../../server/contract/answers';
import type { ClipDto, TakeDto } from '../../server/contract/takes';
import { setAnswered } from '../../server/modules/takes';
import { newId } from '../../server/platform/ids';
import { LEASE_MS, claimJob, completeJob, enqueueJob, failJob, renewJob } from '../../server/platform/jobs';
import type { Conclusion, JobKinds } from '../../server/worker/handler';
import { JOB_KINDS } from '../../server/worker/job-kinds';
import { startJobLoop, type JobLoop } from '../../server/worker/job-loop';
import { processClip } from '../../server/worker/process-clip';
import { phoneClip } from '../e2e/support/phone-clips';
import { PATIENCE } from '../fixtures/gym';
import { openScene, videoBytes, type Scene, type SceneGym, type ScenePerson } from './support/scene';

const START = new Date('2026-12-01T10:00:00.000Z');

let scene: Scene;
let gym: SceneGym;
let member: ScenePerson;
let coach: ScenePerson;
let film: Buffer;
let assignments: () => Promise<string>;

beforeAll(async () => {
  scene = await openScene(START, { LOG_LEVEL: 'silent' });
  gym = await scene.gym();
  member = await scene.person(gym, 'member');
  coach = await scene.person(gym, 'coach');
  const lift = await scene.lift(gym);
  assignments = () => scene.assignment(gym, lift, coach);
  film = await readFile(await phoneClip('plain-front.mp4'));
});
beforeEach(() => scene.database('jobs').delete());
const loops: JobLoop[] = [];
afterEach(async () => {
  for (const loop of loops.splice(0)) await loop.stop();
});
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

/** A worker on the scene's database and by the scene's clock, ended with the test. */
function startLoop(kinds: Partial<JobKinds> = {}): JobLoop {
  const loop = startJobLoop(scene.platform, scene.mailer, { ...JOB_KINDS, ...kinds }, newId(), 1);
  loops.push(loop);
  return loop;
}
interface JobRow {
  id: number;
  state: string;
  attempts: number;
  run_at: Date;
  worker: string | null;
  last_error: string | null;
}
const jobs = (type: string): Promise<JobRow[]> => jobsOf(type).orderBy('id');
const statesOf = async (type: string) => (await jobs(type)).map((job) => [job.state, job.attempts]);
const queueDelete = (...prefixes: string[]) =>
  enqueueJob(scene.database, 'objects.delete', { prefixes }, scene.now());

describe('a job', () => {
  it('whose worker is not heard of goes to another, and the first can write nothing any more', async () => {
    await queueDelete('gyms/none');
    const gone = newId();
    const job = await claimJob(scene.database, gone, scene.now());
    if (!job) throw new Error('no job was due');
    scene.pass(LEASE_MS - 1000);
    expect(await renewJob(scene.database, gone, job, scene.now())).toBe(true);
    scene.pass(LEASE_MS);
    const other = startLoop();
    await other.sweep();
    expect(await statesOf('objects.delete')).toEqual([['running', 1]]);
    scene.pass(1);
    await other.sweep();
    expect(await jobs('objects.delete')).toMatchObject([
      { state: 'queued', attempts: 1, worker: null, last_error: expect.stringContaining('not heard of') },
    ]);
    expect(await renewJob(scene.database, gone, job, scene.now())).toBe(false);
    scene.pass(5_000);
    await expect.poll(() => statesOf('objects.delete'), PATIENCE).toEqual([['done', 2]]);
    expect(await completeJob(scene.database, gone, job, scene.now())).toBe(false);
    expect(await failJob(scene.database, gone, job, new Error('late'), scene.now())).toBe('lost');
    expect(await statesOf('objects.delete')).toEqual([['done', 2]]);
  });

  it('is done once, however many workers there are', async () => {
    const names = Array.from({ length: 24 }, (_, n) => `gyms/${n}`);
    for (const name of names) await queueDelete(name);
    const done: string[] = [];
    const noting: Partial<JobKinds> = {
      'objects.delete': {
        run({ prefixes }) {
          done.push(...prefixes);
          return Promise.resolve(null);
        },
      },
    };
    for (let n = 0; n < 3; n += 1) startLoop(noting);
    await expect
      .poll(async () => (await statesOf('objects.delete')).filter(([state]) => state === 'done'), PATIENCE)
      .toHaveLength(names.length);
    expect(done.toSorted()).toEqual(names.toSorted());
  });

  it('is handed back untried when its worker is told to stop', async () => {
    await queueDelete('gyms/none');
    const loop = startLoop({
      'objects.delete': {
        run: (_payload, { signal }) =>
          new Promise((_resolve, reject) => {
            signal.addEventListener('abort', () => {
              reject(new Error('stopped'));
            });
          }),
      },
    });
    await expect.poll(() => statesOf('objects.delete'), PATIENCE).toEqual([['running', 1]]);
    await loop.stop();
    expect(await jobs('objects.delete')).toMatchObject([
      { state: 'queued', attempts: 0, worker: null, run_at: scene.now() },
    ]);
  });

  it('is tried five times, later each time, and then the take goes back to its member as our fault', async () => {
    const { take } = await submitted();
    startLoop({
      'clip.process': {
        ...JOB_KINDS['clip.process'],
        run: () => Promise.reject(new Error('the tool broke')),
      },
    });
    for (const attempt of [1, 2, 3, 4]) {
      await expect
        .poll(() => statesOf('clip.process'), PATIENCE)
        .toEqual([
          ['queued', attempt],
          ['queued', attempt],
        ]);
      expect((await scene.call<TakeDto>(member, 'GET', `/api/takes/${take.id}`)).body.state).toBe(
        'processing',
      );
      const longest = 5_000 * 2 ** (attempt - 1);
      for (const job of await jobs('clip.process')) {
        const wait = job.run_at.getTime() - scene.now().getTime();
        expect(wait).toBeGreaterThanOrEqual(0);
        expect(wait).toBeLessThanOrEqual(longest);
      }
      scene.pass(longest);
    }
    await expect
      .poll(() => statesOf('clip.process'), PATIENCE)
      .toEqual([
        ['dead', 5],
        ['dead', 5],
      ]);
    expect((await jobs('clip.process'))[0]?.last_error).toBe('the tool broke');
    const given = (await scene.call<TakeDto>(member, 'GET', `/api/takes/${take.id}`)).body;
    expect(given).toMatchObject({ state: 'unplayable', problem: { reason: 'gave-up' } });
    expect(given.problem?.message).toContain('our fault');
    expect(given.problem?.remedy).toContain('Try again');
    expect(given.clips.map(({ state }) => state)).toEqual(['unplayable', 'unplayable']);
    expect(await jobsOf('mail.send')).toHaveLength(1);
  });

  it('deletes what lies under its prefixes and nothing beside them', async () => {
    const root = `gyms/${newId()}`;
    await Promise.all(
      [`${root}/ab/one`, `${root}/ab/deep/two`, `${root}/abc/three`, `${root}/d/four`].map(put),
    );
    await queueDelete(`${root}/ab`, `${root}/d/`);
    startLoop();
    await expect.poll(() => statesOf('objects.delete'), PATIENCE).toEqual([['done', 1]]);
    expect(await keysUnder(root)).toEqual([`${root}/abc/three`]);
  });
});

describe('the warning of an answer that is nearly due', () => {
  /** A waiting take, an hour before its answer is due. */
  async function nearlyDue(): Promise<string> {
    const id = await scene.waitingTake(member, await assignments());
    await jobsOf('clip.process').delete();
    const [warning] = await jobs('take.warn');
    const due: { answer_by: Date } = await scene.database('takes').where({ id }).first('answer_by');
    const runAt = warning?.run_at.getTime() ?? 0;
    expect(due.answer_by.getTime() - runAt).toBe(3_600_000);
    scene.pass(runAt - 1 - scene.now().getTime());
    expect(await claimJob(scene.database, newId(), scene.now())).toBeNull();
    scene.pass(1);
    return id;
  }
  const warnings = async () =>
    (await jobsOf('mail.send')).map((job: { payload: { to: string; subject: string } }) => job.payload);
  const notices = (id: string) =>
    scene.database('notifications').where({ kind: 'answer-by-near', link: `/board/${id}` });

  it('goes to each coach once, in the app and by mail', async () => {
    const id = await nearlyDue();
    startLoop();
    await expect.poll(() => statesOf('mail.send'), PATIENCE).toEqual([['done', 1]]);
    expect(await statesOf('take.warn')).toEqual([['done', 1]]);
    expect(await warnings()).toMatchObject([
      {
        to: `${coach.id}@ironbirch.example`,
        subject: expect.stringContaining(`${member.name} needs an answer by`),
      },
    ]);
    expect(await notices(id)).toMatchObject([{ user_id: coach.id }]);
  });

  it('is not sent when the take was answered', async () => {
    const id = await nearlyDue();
    await scene.database.transaction((trx) => setAnswered(trx, gym.id, id, coach.id, scene.now()));
    startLoop();
    await expect.poll(() => statesOf('take.warn'), PATIENCE).toEqual([['done', 1]]);
    expect(await warnings()).toEqual([]);
    expect(await notices(id)).toEqual([]);
  });

  it('is dropped when the take is no longer there', async () => {
    const id = await nearlyDue();
    await scene.database('takes').where({ id }).delete();
    startLoop();
    await expect.poll(() => statesOf('take.warn'), PATIENCE).toEqual([['done', 1]]);
    expect(await warnings()).toEqual([]);
  });
});
