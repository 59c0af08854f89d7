import { afterAll, beforeAll, beforeEach, describe, expect, it } from 'vitest';
import type { TakeDetailDto } from '../../server/contract/answers';
import { newId } from '../../server/platform/ids';
import { JOB_KINDS } from '../../server/worker/job-kinds';
import { startJobLoop } from '../../server/worker/job-loop';
import { Caller } from '../support/caller';
import {
  openScene,
  videoBytes,
  type Scene,
  type SceneGym,
  type SceneLift,
  type ScenePerson,
} from './support/scene';

const START = new Date('2026-12-01T10:00:00.000Z');
const PASSWORD = 'lanterns over wet planks';
const HANGING_ON_TAKES = ['clips', 'comments', 'marks', 'measures', 'answers'];

let scene: Scene;
let gym: SceneGym;
let lift: SceneLift;
let member: ScenePerson;
let coach: ScenePerson;
let assignmentId: string;
let passwordHash: string;

beforeAll(async () => {
  scene = await openScene(START, { LOG_LEVEL: 'silent' });
  passwordHash = await scene.platform.passwords.hash(PASSWORD);
});
afterAll(() => scene.close());
beforeEach(async () => {
  gym = await scene.gym();
  lift = await scene.lift(gym);
  member = await scene.person(gym, 'member', {
    password_hash: passwordHash,
    born_on: '1990-04-02',
    kit: 'A bell',
  });
  coach = await scene.person(gym, 'coach', { password_hash: passwordHash });
  assignmentId = await scene.assignment(gym, lift, coach);
});

const addressOf = (who: ScenePerson) => `${who.id}@ironbirch.example`;
const erase = (who: ScenePerson, password = PASSWORD) => scene.call(who, 'DELETE', '/api/me', { password });
const signIn = (who: ScenePerson) =>
  new Caller(scene.baseUrl).call('POST', '/api/auth/sign-in', { email: addressOf(who), password: PASSWORD });
async function objectsOf(takeId: string): Promise<string[]> {
  const keys: string[] = [];
  for await (const key of scene.store.list(`gyms/${gym.id}/takes/${takeId}/`)) keys.push(key);
  return keys;
}
async function rowsOf(table: string, takeId: string): Promise<number> {
  return (await scene.database(table).where({ take_id: takeId })).length;
}
/** A take of the member that a coach answered with all that a board can hold. */
async function answered(): Promise<string> {
  const takeId = await scene.waitingTake(member, assignmentId, { note: 'Felt heavy' });
  await scene.call(coach, 'POST', `/api/takes/${takeId}/pick-up`);
  const clip: { id: string } = await scene
    .database('clips')
    .where({ take_id: takeId, view: 'side' })
    .first('id');
  const on = { clipId: clip.id, atMs: 1200 };
  const writes = [
    await scene.call(coach, 'POST', `/api/takes/${takeId}/comments`, { ...on, body: 'Knees out' }),
    await scene.call(coach, 'PUT', `/api/takes/${takeId}/marks`, {
      marks: [{ faultId: lift.faultIds[0], mark: 'seen' }],
    }),
    await scene.call(coach, 'POST', `/api/takes/${takeId}/measures`, {
      ...on,
      kind: 'lean',
      points: [
        [0.5, 0.5],
        [0.5, 0.4],
      ],
    }),
    await scene.call(coach, 'POST', `/api/takes/${takeId}/answer`, { topCue: 'Sit back', call: 'go' }),
  ];
  expect(writes.map((write) => write.status)).toEqual([201, 200, 201, 200]);
  return takeId;
}
/** Lets a worker do what waits, until nothing of a kind is left. */
async function workOff(type: string): Promise<void> {
  const loop = startJobLoop(scene.platform, scene.mailer, JOB_KINDS, newId(), 1);
  try {
    await expect
      .poll(() => scene.database('jobs').where({ type }).whereNot('state', 'done'), { timeout: 30_000 })
      .toEqual([]);
  } finally {
    await loop.stop();
  }
}

describe('the export', () => {
  it('is a zip of what is held on the person, with each clip as it was sent', async () => {
    const drafted = await scene.call<{ id: string }>(
      member,
      'POST',
      `/api/assignments/${assignmentId}/takes`,
      {},
    );
    const originals = [videoBytes(9000, 7), videoBytes(120_000, 9)];
    await scene.upload(member, drafted.body.id, 'front', originals[0] ?? Buffer.alloc(0));
    await scene.upload(member, drafted.body.id, 'side', originals[1] ?? Buffer.alloc(0));
    const stranger = await scene.person(gym, 'member');
    const foreign = await scene.waitingTake(stranger, assignmentId);

    const answer = await fetch(`${scene.baseUrl}/api/me/export`, { headers: scene.headers(member) });
    expect(answer.status).toBe(200);
    expect(answer.headers.get('content-type')).toContain('zip');
    expect(answer.headers.get('cache-control')).toBe('no-store');
    const zip = Buffer.from(await answer.arrayBuffer());
    for (const original of originals) expect(zip.includes(original)).toBe(true);
    for (const name of ['me.json', 'takes.json']) expect(zip.includes(Buffer.from(name))).toBe(true);
    expect(zip.includes(Buffer.from(addressOf(member)))).toBe(true);
    expect(zip.includes(Buffer.from(drafted.body.id))).toBe(true);
    expect(zip.includes(Buffer.from(foreign))).toBe(false);
    expect(zip.includes(Buffer.from(passwordHash))).toBe(false);
    // The record that ends the central directory (APPNOTE 4.3.16): its entries are counted at offset 10.
    const end = zip.lastIndexOf(Buffer.from('PK\u0005\u0006', 'latin1'));
    expect(end).toBeGreaterThan(0);
    expect(zip.readUInt16LE(end + 10)).toBe(4);
  });

  it('needs somebody signed in', async () => {
    expect((await fetch(`${scene.baseUrl}/api/me/export`)).status).toBe(401);
  });
});

describe('erasing oneself', () => {
  it('with a wrong password changes nothing', async () => {
    const takeId = await answered();
    expect(await erase(member, 'not my password at all')).toMatchObject({
      status: 400,
      body: { errors: [{ path: 'password' }] },
    });
    expect((await scene.call(member, 'GET', '/api/me')).status).toBe(200);
    expect((await scene.call<TakeDetailDto>(member, 'GET', `/api/takes/${takeId}`)).body.state).toBe(
      'answered',
    );
    expect(await objectsOf(takeId)).not.toEqual([]);
  });

  it('takes away takes, clips, words and objects, and leaves nobody to sign in', async () => {
    const takes = [await answered(), await scene.waitingTake(member, assignmentId)];
    const stranger = await scene.person(gym, 'member');
    const kept = await scene.waitingTake(stranger, assignmentId);
    const [first = ''] = takes;
    for (const table of HANGING_ON_TAKES) expect(await rowsOf(table, first)).toBeGreaterThan(0);
    const notices = () =>
      scene.database('notifications').whereIn(
        'link',
        takes.map((id) => `/board/${id}`),
      );
    expect(await notices()).not.toEqual([]);

    expect((await erase(member)).status).toBe(204);
    expect(await scene.database('takes').where({ member_id: member.id })).toEqual([]);
    for (const table of HANGING_ON_TAKES) expect(await rowsOf(table, first)).toBe(0);
    expect(await notices()).toEqual([]);
    expect(await scene.database('users').where({ id: member.id })).toMatchObject([
      { name: 'Former member', active: 0, password_hash: '', born_on: null, kit: null },
    ]);
    expect(await scene.database('erasures').where({ subject_id: member.id })).toHaveLength(1);
    expect((await scene.call(member, 'GET', '/api/me')).status).toBe(401);
    expect((await signIn(member)).status).toBe(401);
    expect((await scene.call(coach, 'GET', `/api/takes/${first}`)).status).toBe(404);

    await workOff('objects.delete');
    for (const id of takes) expect(await objectsOf(id)).toEqual([]);
    expect(await objectsOf(kept)).not.toEqual([]);
    expect((await scene.call(coach, 'GET', `/api/takes/${kept}`)).status).toBe(200);

    const invitation = { email: addressOf(member), name: 'Idun Falkenberg', role: 'member' };
    expect((await scene.call(coach, 'POST', '/api/invitations', invitation)).status).toBe(201);
  });

  it('leaves a coach’s answers with the members they are for, under no name', async () => {
    const takeId = await answered();
    expect((await erase(coach)).status).toBe(204);
    const detail = await scene.call<TakeDetailDto>(member, 'GET', `/api/takes/${takeId}`);
    expect(detail.body).toMatchObject({ state: 'answered', answer: { topCue: 'Sit back' } });
    expect(detail.text).toContain('Former coach');
    expect(detail.text).not.toContain(coach.name);
    expect((await signIn(coach)).status).toBe(401);
  });

  it('is refused to the only owner', async () => {
    const owner = await scene.person(gym, 'owner', { password_hash: passwordHash });
    expect(await erase(owner)).toMatchObject({
      status: 409,
      body: { type: 'urn:midfoot:problem:last-owner' },
    });
    expect((await scene.call(owner, 'GET', '/api/me')).status).toBe(200);
    await scene.person(gym, 'owner');
    expect((await erase(owner)).status).toBe(204);
  });
});
