import { afterAll, beforeAll, beforeEach, describe, expect, it } from 'vitest';
import type { BoardDto, ProgressDto, TakeDetailDto } from '../../server/contract/answers';
import type { TakeDto } from '../../server/contract/takes';
import { openScene, type Scene, type SceneGym, type SceneLift, type ScenePerson } from './support/scene';

const START = new Date('2026-12-01T10:00:00.000Z');

let scene: Scene;
let gym: SceneGym;
let member: ScenePerson;
let coach: ScenePerson;
let lift: SceneLift;
let assignmentId: string;
let takeId: string;

beforeAll(async () => {
  scene = await openScene(START);
});
afterAll(() => scene.close());
beforeEach(async () => {
  gym = await scene.gym();
  member = await scene.person(gym, 'member');
  coach = await scene.person(gym, 'coach');
  lift = await scene.lift(gym);
  assignmentId = await scene.assignment(gym, lift, coach);
  takeId = await scene.waitingTake(member, assignmentId);
});

const pickUp = (id = takeId, who = coach) => scene.call(who, 'POST', `/api/takes/${id}/pick-up`);
const send = (body: Record<string, unknown>, headers = {}, id = takeId) =>
  scene.call<TakeDetailDto>(coach, 'POST', `/api/takes/${id}/answer`, body, headers);
const take = async (who = member, id = takeId) =>
  (await scene.call<TakeDetailDto>(who, 'GET', `/api/takes/${id}`)).body;
const clipOf = async (view: string) => (await take(coach)).clips.find((clip) => clip.view === view)?.id;
const notices = (who: ScenePerson, kind: string) =>
  scene.database('notifications').where({ user_id: who.id, kind });

describe('sending an answer', () => {
  it('needs a top cue, and a scale of this lift when it calls for one', async () => {
    await pickUp();
    expect((await send({ topCue: ' ', call: 'go' })).status).toBe(400);
    expect((await send({ topCue: 'Brace', call: 'scale' })).status).toBe(400);
    const foreign = await scene.lift(gym);
    expect((await send({ topCue: 'Brace', call: 'scale', scaleId: foreign.scaleIds[0] })).status).toBe(422);
    expect((await take()).state).toBe('picked-up');
  });

  it('tells the member at once and by mail, and shows what was put on the board', async () => {
    await pickUp();
    const clipId = await clipOf('side');
    await scene.call(coach, 'POST', `/api/takes/${takeId}/comments`, { clipId, atMs: 1200, body: 'Here' });
    await scene.call(coach, 'PUT', `/api/takes/${takeId}/marks`, {
      marks: [{ faultId: lift.faultIds[0], mark: 'seen' }],
    });
    await scene.call(coach, 'PUT', `/api/takes/${takeId}/draft`, { topCue: 'Sit' });
    expect((await take()).answer).toBeNull();
    scene.pass(1000);
    const answer = await send({
      topCue: 'Sit between your heels',
      call: 'scale',
      scaleId: lift.scaleIds[0],
      tempo: '30X0',
    });
    expect(answer.status).toBe(200);
    expect(answer.body).toMatchObject({
      state: 'answered',
      answeredAt: scene.now().toISOString(),
      pickedUpBy: null,
    });
    const mine = await take();
    expect(mine.answer).toMatchObject({
      topCue: 'Sit between your heels',
      call: 'scale',
      scale: { id: lift.scaleIds[0], name: 'Box squat' },
      tempo: '30X0',
      refilm: null,
      author: { id: coach.id, name: coach.name },
      comments: [{ body: 'Here', view: 'side' }],
      marks: [{ faultId: lift.faultIds[0], mark: 'seen' }],
    });
    expect(mine.history.at(-1)).toMatchObject({ type: 'take.answered', by: { id: coach.id } });
    expect(await notices(member, 'take-answered')).toMatchObject([
      { link: `/answers/${takeId}`, body: 'Sit between your heels' },
    ]);
    const mail = await scene
      .database('jobs')
      .where({ type: 'mail.send' })
      .andWhere('payload', 'like', `%/answers/${takeId}%`);
    expect(mail).toHaveLength(1);
    expect(await scene.database('draft_answers').where({ take_id: takeId })).toEqual([]);
  });

  it('happens once, however often and by whomever it is sent', async () => {
    await pickUp();
    const body = { topCue: 'Brace first', call: 'go' };
    const key = { 'idempotency-key': 'answer-1' };
    const first = await send(body, key);
    expect((await send(body, key)).body).toEqual(first.body);
    expect((await send(body)).status).toBe(409);
    expect((await pickUp(takeId, await scene.person(gym, 'owner'))).status).toBe(409);
    expect(await scene.database('answers').where({ take_id: takeId })).toHaveLength(1);
    expect(await notices(member, 'take-answered')).toHaveLength(1);
  });

  it('is one answer of two sent at the same time', async () => {
    await pickUp();
    const answers = await Promise.all([
      send({ topCue: 'One', call: 'go' }),
      send({ topCue: 'Two', call: 'light' }),
    ]);
    expect(answers.map((answer) => answer.status).sort()).toEqual([200, 409]);
    expect(await scene.database('answers').where({ take_id: takeId })).toHaveLength(1);
  });

  it('ends writing on the board, and taking the take back', async () => {
    await pickUp();
    const clipId = await clipOf('side');
    await send({ topCue: 'Brace first', call: 'go' });
    const late = await scene.call(coach, 'POST', `/api/takes/${takeId}/comments`, {
      clipId,
      atMs: 0,
      body: 'Late',
    });
    expect(late.status).toBe(409);
    expect((await scene.call(member, 'POST', `/api/takes/${takeId}/withdraw`)).status).toBe(409);
  });
});

describe('reading an answer', () => {
  it('is noted once', async () => {
    const read = () => scene.call(member, 'POST', `/api/takes/${takeId}/read`);
    expect((await read()).status).toBe(409);
    await pickUp();
    await send({ topCue: 'Brace first', call: 'go' });
    const unread = async (value: string) =>
      (await scene.call<{ items: TakeDto[] }>(member, 'GET', `/api/takes?unread=${value}`)).body.items.length;
    expect(await unread('true')).toBe(1);
    expect((await read()).status).toBe(204);
    const first = (await take()).readAt;
    expect(first).toBe(scene.now().toISOString());
    scene.pass(5000);
    await read();
    expect((await take()).readAt).toBe(first);
    expect([await unread('true'), await unread('false')]).toEqual([0, 1]);
    expect(await scene.database('events').where({ take_id: takeId, type: 'take.read' })).toHaveLength(1);
  });
});

describe('filming again', () => {
  it('asks for the refilm’s views, knows its predecessor, and shows it on the board', async () => {
    await pickUp();
    await send({
      topCue: 'Sit between your heels',
      call: 'light',
      refilm: { views: ['side'], by: '2026-12-03T10:00:00.000Z', note: 'Three slow reps' },
    });
    expect((await take()).answer?.refilm).toEqual({
      views: ['side'],
      by: '2026-12-03T10:00:00.000Z',
      note: 'Three slow reps',
    });
    scene.pass(1000);
    const again = await scene.waitingTake(member, assignmentId);
    const second = await take(member, again);
    expect(second).toMatchObject({ number: 2, previousTakeId: takeId, views: ['side'] });
    const board = await scene.call<BoardDto>(coach, 'GET', `/api/takes/${again}/board`);
    expect(board.body.earlierTakes).toMatchObject([
      { take: { id: takeId, number: 1 }, answer: { topCue: 'Sit between your heels' } },
    ]);
    const queue = await scene.call<{ items: { number: number }[] }>(
      coach,
      'GET',
      '/api/queue?only=second-takes',
    );
    expect(queue.body.items.map((item) => item.number)).toEqual([2]);
  });

  it('asks for the brief’s views again when the last answer asked for no refilm', async () => {
    await pickUp();
    await send({ topCue: 'Good', call: 'go' });
    scene.pass(1000);
    const next = await scene.call<TakeDto>(member, 'POST', `/api/assignments/${assignmentId}/takes`, {});
    expect(next.body.views).toEqual(['front', 'side']);
  });

  it('adds up to a member’s progress', async () => {
    await pickUp();
    await scene.call(coach, 'PUT', `/api/takes/${takeId}/marks`, {
      marks: [{ faultId: lift.faultIds[0], mark: 'seen' }],
    });
    await send({ topCue: 'Sit between your heels', call: 'go' });
    scene.pass(1000);
    await scene.waitingTake(member, assignmentId);
    const path = `/api/progress?memberId=${member.id}`;
    for (const answer of [
      await scene.call<ProgressDto>(member, 'GET', '/api/progress'),
      await scene.call<ProgressDto>(coach, 'GET', path),
    ]) {
      expect(answer.body.lifts).toMatchObject([
        {
          lift: { id: lift.id },
          takes: [
            { take: { number: 1 }, topCue: 'Sit between your heels', marks: [{ mark: 'seen' }] },
            { take: { number: 2 }, topCue: null, marks: [] },
          ],
        },
      ]);
    }
    const other = await scene.person(gym, 'member');
    const stranger = await scene.person(await scene.gym(), 'coach');
    expect((await scene.call(other, 'GET', path)).status).toBe(404);
    expect((await scene.call(stranger, 'GET', path)).status).toBe(404);
    expect((await scene.call(coach, 'GET', '/api/progress')).status).toBe(400);
  });
});

describe('writing back', () => {
  const reply = (who: ScenePerson, body: string) =>
    scene.call(who, 'POST', `/api/takes/${takeId}/replies`, { body });

  it('waits for the answer, and reaches the other side', async () => {
    expect((await reply(member, 'Hello?')).status).toBe(409);
    await pickUp();
    await send({ topCue: 'Brace first', call: 'go' });
    expect((await reply(member, 'With the same load?')).status).toBe(201);
    expect(await notices(coach, 'take-replied')).toMatchObject([{ body: 'With the same load?' }]);
    scene.pass(1000);
    expect((await reply(coach, 'Yes.')).status).toBe(201);
    expect(await notices(member, 'take-replied')).toMatchObject([{ link: `/answers/${takeId}` }]);
    expect((await take()).answer?.replies).toMatchObject([
      { body: 'With the same load?', author: { id: member.id } },
      { body: 'Yes.', author: { id: coach.id } },
    ]);
    const other = await scene.person(gym, 'member');
    const stranger = await scene.person(await scene.gym(), 'coach');
    expect((await reply(other, 'Me too')).status).toBe(404);
    expect((await reply(stranger, 'Me too')).status).toBe(404);
  });
});

describe('captions', () => {
  const captions = (who: ScenePerson, view: string) =>
    scene.call(who, 'GET', `/api/takes/${takeId}/comments.vtt?view=${view}`);

  it('are the comments on one view, for the member only once they were sent', async () => {
    await pickUp();
    const [front, side] = [await clipOf('front'), await clipOf('side')];
    const add = (body: Record<string, unknown>) =>
      scene.call(coach, 'POST', `/api/takes/${takeId}/comments`, body);
    await add({ clipId: side, atMs: 1500, endMs: 2250, body: 'Chest <up> & proud' });
    await add({ clipId: front, atMs: 0, body: 'Feet' });
    expect((await captions(member, 'side')).text).toBe('WEBVTT\n');
    await send({ topCue: 'Chest up', call: 'go' });
    const answer = await captions(member, 'side');
    expect(answer.headers.get('content-type')).toBe('text/vtt; charset=utf-8');
    expect(answer.text).toBe('WEBVTT\n\n00:00:01.500 --> 00:00:02.250\nChest &lt;up&gt; &amp; proud\n');
    expect((await captions(coach, 'front')).text).toContain('00:00:00.000 --> 00:00:03.000\nFeet');
    expect((await captions(member, 'back')).status).toBe(400);
    const stranger = await scene.person(await scene.gym(), 'coach');
    expect((await captions(stranger, 'side')).status).toBe(404);
  });
});
