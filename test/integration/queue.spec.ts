import { afterAll, beforeAll, beforeEach, describe, expect, it } from 'vitest';
import type { QueueItemDto } from '../../server/contract/answers';
import { sweepLapsed } from '../../server/modules/queue';
import { placesQuery } from '../../server/modules/queue/queue-repository';
import { openScene, type Scene, type SceneGym, type SceneLift, type ScenePerson } from './support/scene';

const START = new Date('2026-12-01T10:00:00.000Z');
const HOUR = 3_600_000;

interface QueuePage {
  items: QueueItemDto[];
  next: string | null;
  waiting: number;
  hurting: number;
  unplayable: number;
}

let scene: Scene;
let gym: SceneGym;
let member: ScenePerson;
let coach: ScenePerson;
let second: ScenePerson;
let lift: SceneLift;

beforeAll(async () => {
  scene = await openScene(START);
});
afterAll(() => scene.close());
beforeEach(async () => {
  gym = await scene.gym();
  member = await scene.person(gym, 'member');
  coach = await scene.person(gym, 'coach');
  second = await scene.person(gym, 'owner');
  lift = await scene.lift(gym);
});

const waiting = async (words = {}, of = lift) =>
  scene.waitingTake(member, await scene.assignment(gym, of, coach), words);
const queue = (query = '', who = coach) => scene.call<QueuePage>(who, 'GET', `/api/queue${query}`);
const idsOf = (page: { body: QueuePage }) => page.body.items.map((item) => item.take.id);
const pickUp = (who: ScenePerson, id: string) => scene.call(who, 'POST', `/api/takes/${id}/pick-up`);
const putBack = (who: ScenePerson, id: string) => scene.call(who, 'DELETE', `/api/takes/${id}/pick-up`);
const inHours = (hours: number) => new Date(scene.now().getTime() + hours * HOUR).toISOString();

describe('the queue', () => {
  it('puts pain first, then what is due first, then the oldest, and says why', async () => {
    const later = await waiting({ neededBy: inHours(4) });
    const promised = await waiting();
    const soon = await waiting({ neededBy: inHours(2) });
    const hurting = await waiting({ pain: { where: 'shoulder', level: 4 } });
    const page = await queue();
    expect(idsOf(page)).toEqual([hurting, soon, later, promised]);
    expect(page.body).toMatchObject({ waiting: 4, hurting: 1, unplayable: 0, next: null });
    expect(page.body.items[0]).toMatchObject({
      pain: { where: 'shoulder', level: 4 },
      member: { id: member.id },
      lift: { id: lift.id, name: 'Goblet squat' },
      assignment: { title: 'Film your squat' },
      number: 1,
      pickedUpBy: null,
    });
    expect(page.body.items[0]?.posters.map((poster) => poster.view)).toEqual(['front', 'side']);
  });

  it('comes page by page, across the border between hurting and not, each take once', async () => {
    const hurting = [
      await waiting({ neededBy: inHours(2), pain: { where: 'knee', level: 2 } }),
      await waiting({ neededBy: inHours(3), pain: { where: 'knee', level: 2 } }),
    ];
    const others = [await waiting({ neededBy: inHours(1) }), await waiting({ neededBy: inHours(1) })];
    const seen: string[] = [];
    let cursor: string | null = null;
    do {
      const page: { body: QueuePage } = await queue(`?limit=1${cursor ? `&cursor=${cursor}` : ''}`);
      seen.push(...idsOf(page));
      cursor = page.body.next;
    } while (cursor);
    expect(seen).toEqual([...hurting, ...others]);
  });

  it('can be narrowed by lift, by need and by who has it', async () => {
    const swing = await scene.lift(gym, { name: 'Swing' });
    const swings = await waiting({ neededBy: inHours(30) }, swing);
    const today = await waiting({ neededBy: inHours(3) });
    await pickUp(coach, today);
    expect(idsOf(await queue(`?liftId=${swing.id}`))).toEqual([swings]);
    expect(idsOf(await queue('?only=needed-today'))).toEqual([today]);
    expect(idsOf(await queue('?only=nobody-has-it'))).toEqual([swings]);
    expect(idsOf(await queue('?only=second-takes'))).toEqual([]);
  });

  it('is for coaches of the gym alone', async () => {
    const id = await waiting();
    const stranger = await scene.person(await scene.gym(), 'coach');
    expect((await queue('', member)).status).toBe(403);
    expect(idsOf(await queue('', stranger))).toEqual([]);
    expect((await pickUp(stranger, id)).status).toBe(404);
    expect((await putBack(stranger, id)).status).toBe(404);
    expect((await pickUp(member, id)).status).toBe(403);
  });

  it('is read from its index without sorting', async () => {
    const assignment = await scene.assignment(gym, lift, coach);
    await scene.database.batchInsert(
      'takes',
      Array.from({ length: 2000 }, (_, i) => ({
        id: `10000000-0000-7000-8000-${String(i).padStart(12, '0')}`,
        gym_id: gym.id,
        assignment_id: assignment,
        lift_id: lift.id,
        member_id: member.id,
        number: i + 1,
        state: i % 2 === 0 ? 'waiting' : 'answered',
        views: '["front"]',
        answer_by: new Date(START.getTime() + i * 1000),
        created_at: START,
      })),
      500,
    );
    await scene.database.raw('ANALYZE TABLE takes');
    const after = {
      rank: 1,
      answerBy: new Date(START.getTime() + 1_000_000),
      id: '10000000-0000-7000-8000-000000001000',
    };
    for (const within of [null, { rank: 1, after }]) {
      const { sql, bindings } = placesQuery(scene.database, gym.id, {}, within, 51).toSQL().toNative();
      const [[plan]] = await scene.database.raw(`EXPLAIN ${sql}`, [...bindings]);
      expect(plan.key).toBe('takes_queue');
      expect(plan.Extra).not.toContain('filesort');
      expect(plan.type).toBe(within ? 'range' : 'ref');
    }
    const rows = await placesQuery(scene.database, gym.id, {}, { rank: 1, after }, 1);
    expect(rows).toMatchObject([{ id: '10000000-0000-7000-8000-000000001002' }]);
  });
});

describe('picking a take up', () => {
  it('keeps others off it until it lapses, and says who has it', async () => {
    const id = await waiting();
    const picked = await pickUp(coach, id);
    expect(picked).toMatchObject({ status: 200, body: { until: inHours(90 / 3600) } });
    const held = await queue();
    expect(held.body.items[0]?.take).toMatchObject({ state: 'picked-up', pickedUpBy: { id: coach.id } });
    const refused = await pickUp(second, id);
    expect(refused.status).toBe(409);
    expect(refused.body).toMatchObject({
      by: { id: coach.id, name: coach.name },
      until: picked.body['until'],
    });
    expect((await putBack(second, id)).status).toBe(409);

    scene.pass(60_000);
    expect((await pickUp(coach, id)).body['until']).toBe(inHours(90 / 3600));
    scene.pass(80_000);
    expect((await pickUp(second, id)).status).toBe(409);
    scene.pass(10_000);
    expect((await queue()).body.items[0]?.take.state).toBe('waiting');
    expect((await pickUp(second, id)).status).toBe(200);
    const events = await scene
      .database('events')
      .where({ take_id: id, type: 'take.picked-up' })
      .orderBy('id');
    expect(events.map((event: { actor_id: string }) => event.actor_id)).toEqual([coach.id, second.id]);
  });

  it('gives it to one of two who ask at once', async () => {
    const id = await waiting();
    const answers = await Promise.all([pickUp(coach, id), pickUp(second, id)]);
    expect(answers.map((answer) => answer.status).sort()).toEqual([200, 409]);
  });

  it('ends by putting it back', async () => {
    const id = await waiting();
    await pickUp(coach, id);
    expect((await putBack(coach, id)).status).toBe(204);
    expect((await putBack(coach, id)).status).toBe(204);
    expect((await pickUp(second, id)).status).toBe(200);
    expect(await scene.database('events').where({ take_id: id, type: 'take.put-back' })).toHaveLength(1);
  });

  it('is undone for everyone to see when the lease has run out', async () => {
    // Leases that other parts left behind run out and go first.
    scene.pass(HOUR);
    await sweepLapsed(scene.database, scene.now());
    const lapsed = await waiting();
    const renewed = await waiting();
    await pickUp(coach, lapsed);
    await pickUp(coach, renewed);
    scene.pass(89_000);
    await pickUp(coach, renewed);
    expect(await sweepLapsed(scene.database, scene.now())).toBe(0);
    scene.pass(1000);
    expect(await sweepLapsed(scene.database, scene.now())).toBe(1);
    expect(await scene.database('takes').where({ id: lapsed })).toMatchObject([
      { picked_up_by: null, picked_up_until: null },
    ]);
    expect(await scene.database('events').where({ type: 'take.lapsed', gym_id: gym.id })).toMatchObject([
      { take_id: lapsed, to_staff: 1 },
    ]);
    expect(await sweepLapsed(scene.database, scene.now())).toBe(0);
  });

  it('is refused for what does not wait', async () => {
    const id = await waiting();
    await scene.call(member, 'POST', `/api/takes/${id}/withdraw`);
    expect((await pickUp(coach, id)).status).toBe(409);
  });
});
