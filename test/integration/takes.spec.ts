import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import type { TakeDetailDto } from '../../server/contract/answers';
import type { ClipDto, TakeDto } from '../../server/contract/takes';
import { takesPage } from '../../server/modules/takes/takes-repository';
import {
  openScene,
  videoBytes,
  type Scene,
  type SceneGym,
  type SceneLift,
  type ScenePerson,
} from './support/scene';

/** A Tuesday, 11:00 in Stockholm. */
const START = new Date('2026-12-01T10:00:00.000Z');
const HOUR = 3_600_000;

let scene: Scene;
let gym: SceneGym;
let member: ScenePerson;
let coach: ScenePerson;
let lift: SceneLift;

beforeAll(async () => {
  scene = await openScene(START);
});
afterAll(() => scene.close());

/** A fresh gym for each part, so that parts cannot see each other. */
async function newGym() {
  gym = await scene.gym();
  member = await scene.person(gym, 'member');
  coach = await scene.person(gym, 'coach');
  lift = await scene.lift(gym);
}
const begin = (who: ScenePerson, assignmentId: string, words = {}) =>
  scene.call<TakeDto>(who, 'POST', `/api/assignments/${assignmentId}/takes`, words);
const submit = (who: ScenePerson, takeId: string) =>
  scene.call<TakeDto>(who, 'POST', `/api/takes/${takeId}/submit`);

describe('beginning a take', () => {
  beforeAll(newGym);

  it('gives a draft with the brief’s views, and the same draft when asked again', async () => {
    const assignment = await scene.assignment(gym, lift, coach);
    const first = await begin(member, assignment, { load: '16 kg', pain: { where: 'knee', level: 3 } });
    expect(first.status).toBe(201);
    expect(first.body).toMatchObject({
      number: 1,
      state: 'draft',
      assignmentId: assignment,
      views: ['front', 'side'],
      load: '16 kg',
      pain: { where: 'knee', level: 3 },
      previousTakeId: null,
      clips: [],
    });
    const again = await begin(member, assignment, { note: 'Felt heavy' });
    expect(again.body).toMatchObject({ id: first.body.id, load: '16 kg', note: 'Felt heavy' });
  });

  it('makes one draft of two calls at once', async () => {
    const assignment = await scene.assignment(gym, lift, coach);
    const [one, two] = await Promise.all([begin(member, assignment), begin(member, assignment)]);
    expect(one.body.id).toBe(two.body.id);
    expect(await scene.database('takes').where({ assignment_id: assignment })).toHaveLength(1);
  });

  it('is refused to members who were not asked, to other gyms, and once the assignment is closed', async () => {
    const other = await scene.person(gym, 'member');
    const mine = await scene.assignment(gym, lift, coach, { members: [member] });
    const closed = await scene.assignment(gym, lift, coach, { closed: true });
    const stranger = await scene.person(await scene.gym(), 'member');
    expect((await begin(other, mine)).status).toBe(404);
    expect((await begin(stranger, mine)).status).toBe(404);
    expect((await begin(coach, mine)).status).toBe(403);
    expect((await begin(member, closed)).status).toBe(409);
  });

  it('gives one take for one Idempotency-Key', async () => {
    const assignment = await scene.assignment(gym, lift, coach);
    const key = { 'idempotency-key': 'first-try' };
    const path = `/api/assignments/${assignment}/takes`;
    const one = await scene.call(member, 'POST', path, { load: '8 kg' }, key);
    const two = await scene.call(member, 'POST', path, { load: '8 kg' }, key);
    expect(two.body).toEqual(one.body);
    expect((await scene.call(member, 'POST', path, { load: '12 kg' }, key)).status).toBe(422);
  });
});

describe('handing a take in', () => {
  beforeAll(newGym);

  it('needs every view, and names the one that is missing', async () => {
    const take = (await begin(member, await scene.assignment(gym, lift, coach))).body;
    await scene.upload(member, take.id, 'front', videoBytes(3000));
    const answer = await submit(member, take.id);
    expect(answer.status).toBe(422);
    expect(answer.body).toMatchObject({ errors: [{ path: 'side' }] });
  });

  it('promises an answer in coaching hours, and waits once every clip is playable', async () => {
    const assignment = await scene.assignment(gym, lift, coach, { reps: 8, rounds: 5 });
    const take = (await begin(member, assignment)).body;
    const front = await scene.upload<ClipDto>(member, take.id, 'front', videoBytes(3000));
    const side = await scene.upload<ClipDto>(member, take.id, 'side', videoBytes(4000));
    const submitted = await submit(member, take.id);
    expect(submitted.body).toMatchObject({
      state: 'processing',
      atStake: 40,
      submittedAt: START.toISOString(),
      // 8 coaching hours after 11:00 local end at 19:00 local.
      answerBy: '2026-12-01T18:00:00.000Z',
    });
    await scene.makeReady(front.body.id);
    expect((await scene.call<TakeDto>(member, 'GET', `/api/takes/${take.id}`)).body.state).toBe('processing');
    await scene.makeReady(side.body.id);
    const detail = (await scene.call<TakeDetailDto>(member, 'GET', `/api/takes/${take.id}`)).body;
    expect(detail.state).toBe('waiting');
    expect(detail.history.map((event) => event.type)).toEqual([
      'take.created',
      'take.submitted',
      'take.waiting',
    ]);
    const [warning] = await scene
      .database('jobs')
      .where({ type: 'take.warn' })
      .andWhere('dedupe_key', 'like', `%${take.id}%`);
    expect(warning.run_at).toEqual(new Date('2026-12-01T17:00:00.000Z'));
    const notices = await scene.database('notifications').where({ gym_id: gym.id, kind: 'take-waiting' });
    expect(notices.map((notice: { user_id: string }) => notice.user_id)).toContain(coach.id);
  });

  it('is needed by the earlier of the member’s own time and the promise', async () => {
    const assignment = await scene.assignment(gym, lift, coach);
    const neededBy = '2026-12-01T15:30:00.000Z';
    const id = await scene.waitingTake(member, assignment, { neededBy });
    expect((await scene.call(member, 'GET', `/api/takes/${id}`)).body).toMatchObject({
      answerBy: neededBy,
      neededBy,
    });
  });

  it('answers a second submit like the first', async () => {
    const id = await scene.waitingTake(member, await scene.assignment(gym, lift, coach));
    const first = (await scene.call(member, 'GET', `/api/takes/${id}`)).body;
    scene.pass(HOUR);
    const second = await submit(member, id);
    expect(second.status).toBe(200);
    expect(second.body).toMatchObject({ submittedAt: first['submittedAt'], answerBy: first['answerBy'] });
    expect(await scene.database('events').where({ take_id: id, type: 'take.submitted' })).toHaveLength(1);
  });

  it('tells the coaches at once when something hurts', async () => {
    const assignment = await scene.assignment(gym, lift, coach);
    const id = await scene.waitingTake(member, assignment, { pain: { where: 'lower back', level: 6 } });
    const [notice] = await scene.database('notifications').where({ user_id: coach.id, kind: 'pain' });
    expect(notice).toMatchObject({ link: `/board/${id}` });
    expect(notice.body).toContain('lower back, 6 of 10');
  });

  it('is refused while a minor’s guardian has not agreed', async () => {
    const minor = await scene.person(gym, 'member', { born_on: '2011-03-04' });
    const take = (await begin(minor, await scene.assignment(gym, lift, coach))).body;
    for (const view of ['front', 'side']) await scene.upload(minor, take.id, view, videoBytes(3000));
    const answer = await submit(minor, take.id);
    expect(answer.status).toBe(422);
    expect(answer.text).toContain('guardian');
    await scene.database('users').where({ id: minor.id }).update({ guardian_consent_at: scene.now() });
    expect((await submit(minor, take.id)).status).toBe(200);
  });
});

describe('a take that cannot be played', () => {
  beforeAll(newGym);

  it('goes back to its member with reason and remedy, is mended by another clip and submitted again', async () => {
    const take = (await begin(member, await scene.assignment(gym, lift, coach))).body;
    const front = await scene.upload<ClipDto>(member, take.id, 'front', videoBytes(3000));
    const side = await scene.upload<ClipDto>(member, take.id, 'side', videoBytes(4000));
    await submit(member, take.id);
    await scene.makeReady(front.body.id);
    await scene.makeUnplayable(side.body.id, 'too-short');
    const broken = (await scene.call<TakeDto>(member, 'GET', `/api/takes/${take.id}`)).body;
    expect(broken).toMatchObject({ state: 'unplayable', problem: { reason: 'too-short' } });
    expect(broken.problem?.remedy).not.toBe('');
    expect((await submit(member, take.id)).body).toMatchObject({ errors: [{ path: 'side' }] });
    const notices = await scene
      .database('notifications')
      .where({ user_id: member.id, kind: 'take-unplayable' });
    expect(notices).toHaveLength(1);

    const replaced = await scene.upload<ClipDto>(member, take.id, 'side', videoBytes(5000));
    expect(replaced.status).toBe(201);
    await scene.makeReady(replaced.body.id);
    expect((await submit(member, take.id)).body).toMatchObject({ state: 'waiting', problem: null });
  });

  it('can be tried again as it is', async () => {
    const take = (await begin(member, await scene.assignment(gym, lift, coach))).body;
    const clips = [];
    for (const view of ['front', 'side'])
      clips.push((await scene.upload<ClipDto>(member, take.id, view, videoBytes(3000))).body.id);
    await submit(member, take.id);
    await scene.makeUnplayable(clips[0] ?? '', 'gave-up');
    const retried = await scene.call<TakeDto>(member, 'POST', `/api/takes/${take.id}/retry`);
    expect(retried.body).toMatchObject({ state: 'processing', problem: null });
    const jobs = await scene
      .database('jobs')
      .where({ type: 'clip.process' })
      .andWhere('dedupe_key', 'like', `%${clips[0]}%`);
    expect(jobs).toHaveLength(2);
    expect((await scene.call(member, 'POST', `/api/takes/${take.id}/retry`)).status).toBe(409);
  });
});

describe('taking a take back', () => {
  beforeAll(newGym);

  it('deletes its clips and leaves the take as withdrawn, once', async () => {
    const assignment = await scene.assignment(gym, lift, coach);
    const id = await scene.waitingTake(member, assignment);
    const withdrawn = await scene.call<TakeDto>(member, 'POST', `/api/takes/${id}/withdraw`);
    expect(withdrawn.body).toMatchObject({ state: 'withdrawn', clips: [] });
    expect(await scene.database('clips').where({ take_id: id })).toHaveLength(0);
    const jobs = await scene
      .database('jobs')
      .where({ type: 'objects.delete' })
      .andWhere('payload', 'like', `%takes/${id}/%`);
    expect(jobs).toHaveLength(1);
    expect((await scene.call(member, 'POST', `/api/takes/${id}/withdraw`)).status).toBe(200);
    expect((await submit(member, id)).status).toBe(409);
    const next = await begin(member, assignment);
    expect(next.body).toMatchObject({ number: 2, previousTakeId: null });
  });
});

describe('who sees a take', () => {
  beforeAll(newGym);

  it('is its member, and coaches of the gym once it was handed in; nobody else', async () => {
    const assignment = await scene.assignment(gym, lift, coach);
    const draft = (await begin(member, assignment)).body.id;
    const otherMember = await scene.person(gym, 'member');
    const otherGym = await scene.gym();
    const strangers = [await scene.person(otherGym, 'owner'), await scene.person(otherGym, 'member')];
    const status = async (who: ScenePerson, id: string) =>
      (await scene.call(who, 'GET', `/api/takes/${id}`)).status;
    expect(await status(member, draft)).toBe(200);
    expect(await status(coach, draft)).toBe(404);
    const id = await scene.waitingTake(member, await scene.assignment(gym, lift, coach));
    expect(await status(coach, id)).toBe(200);
    for (const who of [otherMember, ...strangers]) {
      expect(await status(who, id)).toBe(404);
      for (const [method, path] of [
        ['POST', 'submit'],
        ['POST', 'withdraw'],
        ['POST', 'retry'],
        ['POST', 'read'],
        ['PATCH', ''],
      ] as const) {
        const answer = await scene.call(who, method, `/api/takes/${id}/${path}`.replace(/\/$/, ''), {});
        expect([403, 404]).toContain(answer.status);
        expect(answer.text).not.toContain(member.id);
      }
    }
    expect((await scene.call(member, 'GET', `/api/takes/${id}`)).body['state']).toBe('waiting');
  });
});

describe('lists of takes', () => {
  it('come newest first, page by page, each take once', async () => {
    await newGym();
    const ids: string[] = [];
    for (let i = 0; i < 5; i += 1) {
      ids.unshift(await scene.waitingTake(member, await scene.assignment(gym, lift, coach)));
      if (i !== 2) scene.pass(1000);
    }
    for (const who of [member, coach]) {
      const seen: string[] = [];
      let cursor: string | null = '';
      while (cursor !== null) {
        const query: string = cursor === '' ? '' : `&cursor=${cursor}`;
        const page = await scene.call<{ items: TakeDto[]; next: string | null }>(
          who,
          'GET',
          `/api/takes?limit=2${query}`,
        );
        expect(page.status).toBe(200);
        seen.push(...page.body.items.map((take) => take.id));
        cursor = page.body.next;
      }
      expect(seen).toEqual(ids);
    }
    expect((await scene.call(member, 'GET', `/api/takes?memberId=${coach.id}`)).status).toBe(404);
    expect((await scene.call(member, 'GET', '/api/takes?cursor=nonsense')).status).toBe(400);
    const drafts = await scene.call<{ items: TakeDto[] }>(coach, 'GET', '/api/takes?state=draft');
    expect(drafts.body.items).toEqual([]);
  });

  it('are read from an index from the cursor on, without sorting, in a gym that has nearly all takes', async () => {
    await newGym();
    const assignment = await scene.assignment(gym, lift, coach);
    const at = (i: number) => new Date(START.getTime() + i * 1000);
    await scene.database.batchInsert(
      'takes',
      Array.from({ length: 3000 }, (_, i) => ({
        id: `00000000-0000-7000-8000-${String(i).padStart(12, '0')}`,
        gym_id: gym.id,
        assignment_id: assignment,
        lift_id: lift.id,
        member_id: member.id,
        number: i + 1,
        state: 'answered',
        views: '["front"]',
        created_at: at(i),
      })),
      500,
    );
    await scene.database.raw('ANALYZE TABLE takes');
    const cursor = { at: at(1500), id: '00000000-0000-7000-8000-000000001500' };
    for (const [filter, index] of [
      [{ withoutDrafts: true }, 'takes_list'],
      [{ withoutDrafts: false, memberId: member.id }, 'takes_member'],
    ] as const) {
      const query = takesPage(scene.database, gym.id, filter, cursor, 51, scene.now());
      const { sql, bindings } = query.toSQL().toNative();
      const [[plan]] = await scene.database.raw(`EXPLAIN ${sql}`, [...bindings]);
      expect(plan).toMatchObject({ key: index, type: 'range' });
      expect(plan.Extra).not.toContain('filesort');
      const rows = await query;
      expect(rows).toHaveLength(51);
      expect(rows[0]?.id).toBe('00000000-0000-7000-8000-000000001499');
    }
  });
});
