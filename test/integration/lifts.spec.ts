import { afterAll, beforeAll, beforeEach, describe, expect, it } from 'vitest';
import type { LiftDto } from '../../server/contract';
import type { TakeDetailDto } from '../../server/contract/answers';
import { openScene, type Scene, type SceneGym, type ScenePerson } from './support/scene';

const START = new Date('2026-12-01T10:00:00.000Z');

let scene: Scene;
let gym: SceneGym;
let coach: ScenePerson;
let member: ScenePerson;

beforeAll(async () => {
  scene = await openScene(START);
});
afterAll(() => scene.close());
beforeEach(async () => {
  gym = await scene.gym();
  coach = await scene.person(gym, 'coach');
  member = await scene.person(gym, 'member');
});

const fault = (name: string, more = {}) => ({
  name,
  phase: 'bottom',
  view: 'side',
  cue: `Mind: ${name}`,
  ...more,
});
const scale = (name: string, more = {}) => ({ name, level: 'easier', ...more });
const NEW = {
  name: 'Split-squat hold',
  pattern: 'lunge',
  brief: { views: ['front', 'side'], repsMin: 1, repsMax: 3 },
  faults: [fault('Knee in'), fault('Heel up'), fault('Trunk folds', { drill: 'Hold at a wall.' })],
  scales: [scale('Hand on a chair'), scale('Front foot raised', { level: 'harder', note: 'One plate.' })],
};
const create = (more = {}, who = coach) =>
  scene.call<LiftDto>(who, 'POST', '/api/lifts', { ...NEW, ...more });
const change = (id: string, to: unknown, who = coach) =>
  scene.call<LiftDto>(who, 'PATCH', `/api/lifts/${id}`, to);
const read = async (id: string) => (await scene.call<LiftDto>(member, 'GET', `/api/lifts/${id}`)).body;
const namesOf = (parts: readonly { name: string }[]) => parts.map((part) => part.name);

describe('adding a lift', () => {
  it('fills in where the phone stands, and keeps faults and scales in order', async () => {
    const lift = await create();
    expect(lift.status).toBe(201);
    expect(lift.body).toMatchObject({
      name: 'Split-squat hold',
      brief: {
        views: ['front', 'side'],
        repsMin: 1,
        repsMax: 3,
        cameraHeightCm: 90,
        cameraDistanceCm: 300,
        note: '',
      },
      tempo: null,
      archivedAt: null,
      createdAt: scene.now().toISOString(),
    });
    expect(lift.body.brief.inFrame).not.toBe('');
    expect(namesOf(lift.body.faults)).toEqual(['Knee in', 'Heel up', 'Trunk folds']);
    expect(lift.body.faults.map((one) => one.drill)).toEqual([null, null, 'Hold at a wall.']);
    expect(lift.body.scales).toMatchObject([{ note: '' }, { level: 'harder', note: 'One plate.' }]);
    expect(await read(lift.body.id)).toEqual(lift.body);
  });

  it('says where the input is wrong', async () => {
    const wrong: [object, string][] = [
      [{ faults: [fault('Knee in', { cue: ' ' })] }, 'faults.0.cue'],
      [{ faults: [fault('Knee in'), fault('Heel up', { phase: 'later' })] }, 'faults.1.phase'],
      [{ scales: [scale('')] }, 'scales.0.name'],
      [{ brief: { ...NEW.brief, repsMin: 4 } }, 'brief.repsMax'],
      [{ brief: { ...NEW.brief, views: ['side', 'side'] } }, 'brief.views'],
      [{ tempo: 'slow' }, 'tempo'],
      [{ name: '  ' }, 'name'],
    ];
    for (const [more, path] of wrong) {
      expect(await create(more)).toMatchObject({ status: 400, body: { errors: [{ path }] } });
    }
    expect((await scene.call<{ items: LiftDto[] }>(coach, 'GET', '/api/lifts')).body.items).toEqual([]);
  });

  it('is for staff; a lift is seen in its own gym alone', async () => {
    expect((await create({}, member)).status).toBe(403);
    const { id } = (await create()).body;
    const stranger = await scene.person(await scene.gym(), 'owner');
    expect((await scene.call(stranger, 'GET', `/api/lifts/${id}`)).status).toBe(404);
    expect((await change(id, { name: 'Theirs' }, stranger)).status).toBe(404);
    expect((await change(id, { name: 'Mine' }, member)).status).toBe(403);
  });

  it('needs a name of its own, among the lifts on the list', async () => {
    const taken = { status: 409, body: { type: 'urn:midfoot:problem:name-taken' } };
    const first = (await create()).body;
    expect(await create()).toMatchObject(taken);
    const other = (await create({ name: 'Floor press' })).body;
    expect(await change(other.id, { name: first.name })).toMatchObject(taken);
    expect((await change(first.id, { name: first.name })).status).toBe(200);
    await change(first.id, { archived: true });
    expect((await change(other.id, { name: first.name })).status).toBe(200);
    expect(await change(first.id, { archived: false })).toMatchObject(taken);
    expect((await change(first.id, { archived: false, name: 'Split-squat hold, long' })).status).toBe(200);
  });
});

describe('changing a lift', () => {
  it('keeps what has an id, in the order given, and adds what has none', async () => {
    const { id, faults, scales } = (await create()).body;
    const [knee, heel, trunk] = faults;
    const changed = await change(id, {
      faults: [trunk, fault('Short rep'), { ...knee, cue: 'Knee over the little toe' }, heel],
    });
    expect(changed.status).toBe(200);
    expect(namesOf(changed.body.faults)).toEqual(['Trunk folds', 'Short rep', 'Knee in', 'Heel up']);
    const [first, added, third, fourth] = changed.body.faults;
    expect([first?.id, third?.id, fourth?.id]).toEqual([trunk?.id, knee?.id, heel?.id]);
    expect(faults.map((one) => one.id)).not.toContain(added?.id);
    expect(third?.cue).toBe('Knee over the little toe');
    expect(changed.body.scales).toEqual(scales);
    expect(await read(id)).toEqual(changed.body);
  });

  it('leaves alone what is not named', async () => {
    const before = (await create({ tempo: '30X0' })).body;
    const changed = await change(before.id, {
      brief: { views: ['side'], repsMin: 2, repsMax: 2, cameraHeightCm: 40 },
    });
    expect(changed.body).toEqual({
      ...before,
      brief: { ...before.brief, views: ['side'], repsMin: 2, repsMax: 2, cameraHeightCm: 40 },
    });
    expect((await change(before.id, { tempo: null })).body.tempo).toBeNull();
  });

  it('takes a fault that is left out off the list, and an old answer still names it', async () => {
    const lift = await scene.lift(gym);
    const [dropped, kept] = lift.faultIds;
    const takeId = await scene.waitingTake(member, await scene.assignment(gym, lift, coach));
    await scene.call(coach, 'POST', `/api/takes/${takeId}/pick-up`);
    await scene.call(coach, 'PUT', `/api/takes/${takeId}/marks`, {
      marks: [{ faultId: dropped, mark: 'seen' }],
    });
    expect(
      (await scene.call(coach, 'POST', `/api/takes/${takeId}/answer`, { topCue: 'Sit back', call: 'go' }))
        .status,
    ).toBe(200);
    const before = await read(lift.id);
    const changed = await change(lift.id, { faults: before.faults.filter((one) => one.id === kept) });
    expect(changed.body.faults.map((one) => one.id)).toEqual([kept]);
    const detail = await scene.call<TakeDetailDto>(member, 'GET', `/api/takes/${takeId}`);
    expect(detail.status).toBe(200);
    expect(detail.text).toContain('Fault 0');
  });

  it('refuses a fault or scale of another lift and changes nothing', async () => {
    const mine = (await create()).body;
    const other = (await create({ name: 'Floor press' })).body;
    const refused = { status: 422, body: { type: 'urn:midfoot:problem:not-of-this-lift' } };
    expect(await change(mine.id, { name: 'Taken over', faults: [...other.faults] })).toMatchObject(refused);
    expect(await change(mine.id, { scales: [...other.scales] })).toMatchObject(refused);
    expect(await create({ name: 'Third', faults: [...other.faults] })).toMatchObject(refused);
    expect(await read(mine.id)).toEqual(mine);
    expect(await read(other.id)).toEqual(other);
  });

  it('archives a lift, which stays readable, and puts it back', async () => {
    const { id } = (await create()).body;
    expect((await change(id, { archived: true })).body.archivedAt).toBe(scene.now().toISOString());
    expect((await read(id)).archivedAt).toBe(scene.now().toISOString());
    expect((await change(id, { archived: false })).body.archivedAt).toBeNull();
  });
});
