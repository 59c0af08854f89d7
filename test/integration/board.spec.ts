import { afterAll, beforeAll, beforeEach, describe, expect, it } from 'vitest';
import type { BoardDto, CommentDto, MeasureDto } from '../../server/contract/answers';
import { openScene, type Scene, type SceneGym, type SceneLift, type ScenePerson } from './support/scene';

const START = new Date('2026-12-01T10:00:00.000Z');

let scene: Scene;
let gym: SceneGym;
let member: ScenePerson;
let coach: ScenePerson;
let second: ScenePerson;
let lift: SceneLift;
let takeId: string;
let clipId: string;

beforeAll(async () => {
  scene = await openScene(START);
});
afterAll(() => scene.close());
beforeEach(async () => {
  gym = await scene.gym();
  member = await scene.person(gym, 'member', { kit: 'One 16 kg bell' });
  coach = await scene.person(gym, 'coach');
  second = await scene.person(gym, 'owner');
  lift = await scene.lift(gym);
  takeId = await scene.waitingTake(member, await scene.assignment(gym, lift, coach));
  clipId = (await board()).clips.find((clip) => clip.view === 'side')?.id ?? '';
});

const board = async (who = coach) =>
  (await scene.call<BoardDto>(who, 'GET', `/api/takes/${takeId}/board`)).body;
const pickUp = (who = coach) => scene.call(who, 'POST', `/api/takes/${takeId}/pick-up`);
const comment = (who: ScenePerson, more = {}) =>
  scene.call<CommentDto>(who, 'POST', `/api/takes/${takeId}/comments`, {
    clipId,
    atMs: 1200,
    body: 'Knees follow the toes',
    ...more,
  });
const measureWith = (kind: string, points: number[][]) =>
  scene.call<MeasureDto>(coach, 'POST', `/api/takes/${takeId}/measures`, {
    clipId,
    atMs: 1200,
    kind,
    points,
  });

describe('the board', () => {
  it('tells all that it draws in one answer', async () => {
    expect(await board()).toMatchObject({
      take: { id: takeId, state: 'waiting' },
      member: { id: member.id, kit: 'One 16 kg bell' },
      lift: { id: lift.id },
      assignment: { title: 'Film your squat' },
      clips: [{ view: 'front' }, { view: 'side' }],
      comments: [],
      marks: [],
      measures: [],
      repMarks: [{ marks: [] }, { marks: [] }],
      draft: null,
      answer: null,
      earlierTakes: [],
    });
  });

  it('offers the faults and scales that stand on the list now, and keeps removed ones on answered takes', async () => {
    const [removed] = lift.faultIds;
    const archive = { archived_at: scene.now() };
    await scene.database('lift_faults').where('id', removed).update(archive);
    await scene.database('lift_scales').where('id', lift.scaleIds[0]).update(archive);
    const offered = (await board()).lift;
    expect(offered.faults.map((fault) => fault.id)).toEqual(lift.faultIds.slice(1));
    expect(offered.scales).toEqual([]);
    await pickUp();
    const send = (answer: object) => scene.call(coach, 'POST', `/api/takes/${takeId}/answer`, answer);
    const withRemoved = { topCue: 'Sit', call: 'scale', scaleId: lift.scaleIds[0] };
    expect((await send(withRemoved)).status).toBe(422);
    expect((await send({ topCue: 'Sit', call: 'go' })).status).toBe(200);
    expect((await board()).lift.faults.map((fault) => fault.id)).toContain(removed);
  });

  it('may be looked at by every coach, and by nobody else', async () => {
    const stranger = await scene.person(await scene.gym(), 'coach');
    const status = async (who: ScenePerson) =>
      (await scene.call(who, 'GET', `/api/takes/${takeId}/board`)).status;
    expect(await status(second)).toBe(200);
    expect(await status(member)).toBe(403);
    expect(await status(stranger)).toBe(404);
  });
});

describe('writing on the board', () => {
  it('needs the take to be picked up, and says who has it', async () => {
    const free = await comment(coach);
    expect(free.status).toBe(409);
    expect(free.body).toMatchObject({ type: 'urn:midfoot:problem:not-picked-up' });
    await pickUp(second);
    const writes = [
      comment(coach),
      scene.call(coach, 'PUT', `/api/takes/${takeId}/marks`, { marks: [] }),
      measureWith('lean', [
        [0.5, 0.5],
        [0.5, 0.4],
      ]),
      scene.call(coach, 'PUT', `/api/clips/${clipId}/rep-marks`, { marks: [] }),
      scene.call(coach, 'PUT', `/api/takes/${takeId}/draft`, { topCue: 'Mine' }),
      scene.call(coach, 'POST', `/api/takes/${takeId}/answer`, { topCue: 'Mine', call: 'go' }),
    ];
    for (const answer of await Promise.all(writes)) {
      expect(answer.status).toBe(409);
      expect(answer.body).toMatchObject({ by: { id: second.id, name: second.name } });
    }
    expect((await board()).comments).toEqual([]);
  });

  it('loses no words to a lease that ran out, unless another coach took over', async () => {
    await pickUp();
    scene.pass(120_000);
    expect((await comment(coach)).status).toBe(201);
    expect((await board()).take).toMatchObject({ state: 'picked-up', pickedUpBy: { id: coach.id } });
    scene.pass(120_000);
    await pickUp(second);
    expect((await comment(coach)).status).toBe(409);
    await scene.call(second, 'DELETE', `/api/takes/${takeId}/pick-up`);
    expect((await comment(coach)).status).toBe(409);
  });

  it('is not for members or other gyms', async () => {
    await pickUp();
    const stranger = await scene.person(await scene.gym(), 'coach');
    expect((await comment(member)).status).toBe(403);
    expect((await comment(stranger)).status).toBe(404);
  });
});

describe('comments', () => {
  beforeEach(() => pickUp());

  it('stand at their instant, are changed by their author alone, and go', async () => {
    const late = await comment(coach, { atMs: 3000, body: 'Later' });
    const early = await comment(coach, { atMs: 500, endMs: 900, faultId: lift.faultIds[0] });
    expect(early.body).toMatchObject({ view: 'side', author: { id: coach.id }, faultId: lift.faultIds[0] });
    expect((await board()).comments.map((row) => row.id)).toEqual([early.body.id, late.body.id]);
    const path = `/api/comments/${late.body.id}`;
    const changed = await scene.call<CommentDto>(coach, 'PATCH', path, { atMs: 2500, body: 'Sooner' });
    expect(changed.body).toMatchObject({ atMs: 2500, body: 'Sooner' });
    expect((await scene.call(coach, 'PATCH', path, { endMs: 2000 })).status).toBe(422);

    await scene.call(coach, 'DELETE', `/api/takes/${takeId}/pick-up`);
    await pickUp(second);
    expect((await scene.call(second, 'PATCH', path, { body: 'Not mine' })).status).toBe(403);
    expect((await scene.call(second, 'DELETE', path)).status).toBe(403);
    await scene.call(second, 'DELETE', `/api/takes/${takeId}/pick-up`);
    await pickUp();
    expect((await scene.call(coach, 'DELETE', path)).status).toBe(204);
    expect((await board()).comments.map((row) => row.id)).toEqual([early.body.id]);
    const stranger = await scene.person(await scene.gym(), 'coach');
    expect((await scene.call(stranger, 'DELETE', `/api/comments/${early.body.id}`)).status).toBe(404);
  });

  it('keep a drawing as it was drawn', async () => {
    const drawing = {
      shapes: [
        {
          kind: 'line',
          points: [
            [0.1, 0.2],
            [0.3, 0.4],
          ],
        },
      ],
    };
    await comment(coach, { drawing });
    expect((await board()).comments[0]?.drawing).toEqual(drawing);
  });

  it('belong to a clip, an instant and a fault of this take', async () => {
    const otherLift = await scene.lift(gym);
    expect((await comment(coach, { atMs: 6001 })).status).toBe(422);
    expect((await comment(coach, { endMs: 1200 })).status).toBe(400);
    expect((await comment(coach, { faultId: otherLift.faultIds[0] })).status).toBe(422);
    const other = await scene.waitingTake(member, await scene.assignment(gym, lift, coach));
    const foreign = await scene.database('clips').where({ take_id: other }).first();
    expect((await comment(coach, { clipId: foreign.id })).status).toBe(422);
  });
});

describe('marks', () => {
  beforeEach(() => pickUp());
  const put = (marks: unknown[]) => scene.call(coach, 'PUT', `/api/takes/${takeId}/marks`, { marks });

  it('are set as a whole, in the order of the lift’s list', async () => {
    const [first, other] = lift.faultIds;
    await put([{ faultId: first, mark: 'clear' }]);
    const set = await put([
      { faultId: other, mark: 'hidden' },
      { faultId: first, mark: 'seen', clipId, atMs: 1300 },
    ]);
    const marks = [
      { faultId: first, mark: 'seen', clipId, atMs: 1300 },
      { faultId: other, mark: 'hidden', clipId: null, atMs: null },
    ];
    expect(set.body).toEqual({ marks });
    await put([{ faultId: other, mark: 'clear' }]);
    expect((await board()).marks).toEqual([{ faultId: other, mark: 'clear', clipId: null, atMs: null }]);
  });

  it('are of this lift’s faults, each once', async () => {
    const foreign = await scene.lift(gym);
    expect((await put([{ faultId: foreign.faultIds[0], mark: 'seen' }])).status).toBe(422);
    const twice = { faultId: lift.faultIds[0], mark: 'seen' };
    expect((await put([twice, twice])).status).toBe(422);
    expect((await board()).marks).toEqual([]);
  });
});

describe('measures', () => {
  beforeEach(() => pickUp());

  it('are taken on the displayed picture, not on a square one', async () => {
    // Constructed on a frame of 9 to 16, as the clip's 720 × 1280: 116.807°; of the bare fractions it would be 91.364°.
    const angle = await measureWith('angle', [
      [0.3, 0.45],
      [0.22, 0.62],
      [0.38, 0.7],
    ]);
    expect(angle.status).toBe(201);
    expect(angle.body.value).toBeCloseTo(116.807059, 6);
    expect(angle.body).toMatchObject({ unit: 'deg', kind: 'angle', author: { id: coach.id } });
    expect(angle.body.plusMinus).toBeGreaterThan(0);
    const [kept] = (await board()).measures;
    expect(kept?.value).toBeCloseTo(116.807, 3);
    expect((await scene.call(coach, 'DELETE', `/api/measures/${angle.body.id}`)).status).toBe(204);
    expect((await board()).measures).toEqual([]);
  });

  it('lean to the right of the frame and sink below the knee as positive numbers', async () => {
    const lean = await measureWith('lean', [
      [0.5, 0.6],
      [0.6, 0.6 - (0.1 * 720) / 1280],
    ]);
    expect(lean.body.value).toBeCloseTo(45, 6);
    const depth = await measureWith('depth', [
      [0.4, 0.62],
      [0.6, 0.6],
    ]);
    expect(depth.body.value).toBeCloseTo((Math.atan2(0.02 * 1280, 0.2 * 720) * 180) / Math.PI, 6);
  });

  it('are refused where there is no angle', async () => {
    const answer = await measureWith('lean', [
      [0.5, 0.5],
      [0.5, 0.5],
    ]);
    expect(answer.status).toBe(422);
    expect(
      (
        await measureWith('angle', [
          [0.5, 0.5],
          [0.1, 0.1],
        ])
      ).status,
    ).toBe(400);
  });
});

describe('rep marks', () => {
  it('answer with the tempo of each rep', async () => {
    await pickUp();
    const marks = [
      { atMs: 0, kind: 'top' },
      { atMs: 2000, kind: 'bottom' },
      { atMs: 3000, kind: 'top' },
    ];
    const answer = await scene.call(coach, 'PUT', `/api/clips/${clipId}/rep-marks`, { marks });
    const tempo = [{ rep: 1, startMs: 0, downMs: 2000, upMs: 1000 }];
    expect(answer).toMatchObject({ status: 200, body: { clipId, marks, tempo } });
    expect((await board()).repMarks.find((row) => row.clipId === clipId)).toEqual({ clipId, marks, tempo });
    const stranger = await scene.person(await scene.gym(), 'coach');
    expect((await scene.call(stranger, 'PUT', `/api/clips/${clipId}/rep-marks`, { marks })).status).toBe(404);
  });
});

describe('the draft of an answer', () => {
  it('is kept as it was typed', async () => {
    await pickUp();
    const draft = { topCue: 'Sit betw', composer: 'and then', call: 'light' };
    expect((await scene.call(coach, 'PUT', `/api/takes/${takeId}/draft`, draft)).status).toBe(200);
    await scene.call(coach, 'PUT', `/api/takes/${takeId}/draft`, { ...draft, topCue: 'Sit between' });
    expect((await board()).draft).toMatchObject({ ...draft, topCue: 'Sit between' });
  });
});
