import { afterAll, beforeAll, beforeEach, describe, expect, it } from 'vitest';
import type { AssignmentDetailDto, AssignmentDto } from '../../server/contract';
import { openScene, type Scene, type SceneGym, type SceneLift, type ScenePerson } from './support/scene';

const START = new Date('2026-12-01T10:00:00.000Z');

interface AssignmentPage {
  items: AssignmentDto[];
  next: string | null;
}

let scene: Scene;
let gym: SceneGym;
let lift: SceneLift;
let coach: ScenePerson;
let member: ScenePerson;
let second: ScenePerson;

beforeAll(async () => {
  scene = await openScene(START);
});
afterAll(() => scene.close());
beforeEach(async () => {
  gym = await scene.gym();
  lift = await scene.lift(gym);
  coach = await scene.person(gym, 'coach');
  member = await scene.person(gym, 'member');
  second = await scene.person(gym, 'member');
});

const ask = (more: Record<string, unknown> = {}, headers = {}, who = coach) =>
  scene.call<AssignmentDto>(
    who,
    'POST',
    '/api/assignments',
    { liftId: lift.id, title: 'Film two reps', audience: { all: true }, ...more },
    headers,
  );
const list = async (who: ScenePerson, query = '') =>
  (await scene.call<AssignmentPage>(who, 'GET', `/api/assignments${query}`)).body;
const idsOf = async (who: ScenePerson) => (await list(who)).items.map((one) => one.id);
const get = (who: ScenePerson, id: string) =>
  scene.call<AssignmentDetailDto>(who, 'GET', `/api/assignments/${id}`);
const asked = (who: ScenePerson) =>
  scene.database('notifications').where({ user_id: who.id, kind: 'assignment' });

describe('asking for a take', () => {
  it('reaches everyone, also who joins later', async () => {
    const made = await ask({ note: 'Slow on the way down', reps: 8, rounds: 5, load: '16 kg' });
    expect(made).toMatchObject({
      status: 201,
      body: { audience: { all: true }, reps: 8, rounds: 5, load: '16 kg', counts: { asked: 2, filmed: 0 } },
    });
    const later = await scene.person(gym, 'member');
    for (const who of [member, second, later]) expect(await idsOf(who)).toEqual([made.body.id]);
    expect((await list(coach)).items[0]?.counts).toEqual({ asked: 3, filmed: 0 });
  });

  it('reaches those who are named, who are not told who else is', async () => {
    const third = await scene.person(gym, 'member');
    const { id, audience } = (await ask({ audience: { memberIds: [member.id, second.id, member.id] } })).body;
    expect(audience).toEqual({ memberIds: [member.id, second.id].sort() });
    expect(await idsOf(third)).toEqual([]);
    expect((await get(third, id)).status).toBe(404);
    const own = await get(member, id);
    expect(own.body).toMatchObject({ audience: { memberIds: [member.id] }, asked: [], counts: null });
    expect(own.text).not.toContain(second.id);
    expect((await list(member)).items[0]?.audience).toEqual({ memberIds: [member.id] });
  });

  it('tells those asked, and nobody else', async () => {
    const { id } = (await ask({ audience: { memberIds: [member.id] } })).body;
    expect(await asked(member)).toMatchObject([
      { title: 'Film your goblet squat', body: `${coach.name} asks: Film two reps`, link: `/filming/${id}` },
    ]);
    expect(await asked(second)).toEqual([]);
    expect(await asked(coach)).toEqual([]);
  });

  it('is done once for one idempotency key', async () => {
    const key = { 'idempotency-key': 'week-49-squat' };
    const first = await ask({}, key);
    const again = await ask({}, key);
    expect([first.status, again.status]).toEqual([201, 201]);
    expect(again.body).toEqual(first.body);
    expect(await idsOf(coach)).toEqual([first.body.id]);
    expect(await asked(member)).toHaveLength(1);
  });

  it('is refused with the place for what cannot be asked', async () => {
    const other = await scene.lift(gym, { name: 'Swing' });
    const stranger = await scene.person(await scene.gym(), 'member');
    const left = await scene.person(gym, 'member', { active: false });
    const archived = await scene.lift(gym, { name: 'Hollow hold' });
    await scene.call(coach, 'PATCH', `/api/lifts/${archived.id}`, { archived: true });
    const elsewhere = await scene.lift(await scene.gym());
    const wrong: [Record<string, unknown>, string][] = [
      [{ liftId: archived.id }, 'liftId'],
      [{ liftId: elsewhere.id }, 'liftId'],
      [{ untilAnsweredScaleId: other.scaleIds[0] }, 'untilAnsweredScaleId'],
      [{ audience: { memberIds: [member.id, coach.id] } }, 'audience'],
      [{ audience: { memberIds: [stranger.id] } }, 'audience'],
      [{ audience: { memberIds: [left.id] } }, 'audience'],
    ];
    for (const [more, path] of wrong) {
      expect(await ask(more)).toMatchObject({ status: 422, body: { errors: [{ path }] } });
    }
    expect(await ask({ title: ' ' })).toMatchObject({ status: 400, body: { errors: [{ path: 'title' }] } });
    expect((await ask({}, {}, member)).status).toBe(403);
    expect(await idsOf(coach)).toEqual([]);
    expect(await asked(member)).toEqual([]);
  });

  it('offers until the answer only a scale that is still on the lift’s list', async () => {
    const [scaleId] = lift.scaleIds;
    expect((await ask({ untilAnsweredScaleId: scaleId })).body.untilAnsweredScaleId).toBe(scaleId);
    await scene.call(coach, 'PATCH', `/api/lifts/${lift.id}`, { scales: [] });
    expect(await ask({ untilAnsweredScaleId: scaleId })).toMatchObject({
      status: 422,
      body: { errors: [{ path: 'untilAnsweredScaleId' }] },
    });
  });
});

describe('who has filmed', () => {
  it('is counted and listed for staff', async () => {
    const { id } = (await ask()).body;
    const takeId = await scene.waitingTake(member, id);
    const detail = await get(coach, id);
    expect(detail.body.counts).toEqual({ asked: 2, filmed: 1 });
    const latestOf = (who: ScenePerson) => detail.body.asked.find((one) => one.member.id === who.id);
    expect(detail.body.asked).toHaveLength(2);
    expect(latestOf(member)).toMatchObject({ takes: 1, latest: { takeId, number: 1, state: 'waiting' } });
    expect(latestOf(second)).toMatchObject({ takes: 0, latest: null });
    expect((await get(member, id)).body.myTakes).toMatchObject([{ id: takeId }]);
    expect((await get(second, id)).body.myTakes).toEqual([]);
  });
});

describe('closing', () => {
  it('takes it off Today, and who filmed can still read it', async () => {
    const { id } = (await ask({ audience: { memberIds: [member.id] } })).body;
    const takeId = await scene.waitingTake(member, id);
    const set = (what: string, who = coach) =>
      scene.call<AssignmentDto>(who, 'POST', `/api/assignments/${id}/${what}`);
    expect((await set('close', member)).status).toBe(403);
    expect((await set('close')).body.closedAt).toBe(scene.now().toISOString());
    expect((await set('close')).status).toBe(200);
    expect(await idsOf(member)).toEqual([]);
    expect(await idsOf(coach)).toEqual([id]);
    expect((await get(member, id)).body.myTakes).toMatchObject([{ id: takeId }]);
    expect((await set('reopen')).body.closedAt).toBeNull();
    expect(await idsOf(member)).toEqual([id]);
  });
});

describe('the list', () => {
  it('comes page by page, newest first, each once', async () => {
    const made: string[] = [];
    for (let n = 0; n < 7; n += 1) {
      // Some at the same instant: the place in the list is then the id's.
      if (n % 3 === 0) scene.pass(1000);
      made.push((await ask()).body.id);
    }
    for (const who of [coach, member]) {
      const seen: string[] = [];
      let cursor: string | null = null;
      do {
        const page: AssignmentPage = await list(who, `?limit=2${cursor ? `&cursor=${cursor}` : ''}`);
        seen.push(...page.items.map((one) => one.id));
        cursor = page.next;
      } while (cursor);
      expect(seen).toEqual([...made].reverse());
    }
  });
});
