import { DateTime } from 'luxon';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import type { FaultSummaryDto, TurnaroundDto } from '../../server/contract/turnaround';
import { newId } from '../../server/platform/ids';
import { openScene, type Scene, type SceneGym, type SceneLift, type ScenePerson } from './support/scene';

/** A Friday, 13:00 in Stockholm. */
const NOW = new Date('2026-12-04T12:00:00.000Z');
const HOUR = 3_600_000;
const ZONE = 'Europe/Stockholm';

let scene: Scene;
let gym: SceneGym;
let owner: ScenePerson;
let coach: ScenePerson;
let members: ScenePerson[];
let lifts: SceneLift[];

/** Freireich et al. (1963), hours for weeks: how long each waited, and whether it was answered. */
const ANSWERED = [6, 6, 6, 7, 10, 13, 16, 22, 23];
const WAITING = [6, 9, 10, 11, 17, 19, 20, 25, 32, 32, 34, 35];

beforeAll(async () => {
  scene = await openScene(NOW);
  gym = await scene.gym();
  owner = await scene.person(gym, 'owner');
  coach = await scene.person(gym, 'coach', { name: '=Maren' });
  members = [await scene.person(gym, 'member'), await scene.person(gym, 'member')];
  lifts = [await scene.lift(gym, { name: 'Goblet squat' }), await scene.lift(gym, { name: 'Swing' })];
  const assignments = await Promise.all(lifts.map((lift) => scene.assignment(gym, lift, coach)));
  let number = 0;
  const add = async (hours: number, state: string, i: number) => {
    number += 1;
    const submitted = new Date(NOW.getTime() - hours * HOUR);
    const id = newId();
    await scene.database('takes').insert({
      id,
      gym_id: gym.id,
      assignment_id: assignments[i % 2],
      lift_id: lifts[i % 2]?.id,
      member_id: members[i % 2]?.id,
      number,
      state,
      views: '["front"]',
      answer_by: new Date(submitted.getTime() + 8 * HOUR),
      promise_hours: 8,
      submitted_at: submitted,
      waiting_at: submitted,
      answered_at: state === 'answered' ? NOW : null,
      answered_by: state === 'answered' ? (i % 3 === 0 ? owner.id : coach.id) : null,
      created_at: submitted,
    });
    return id;
  };
  for (const [i, hours] of ANSWERED.entries()) {
    const id = await add(hours, 'answered', i);
    await scene.database('marks').insert({
      take_id: id,
      gym_id: gym.id,
      fault_id: lifts[i % 2]?.faultIds[0],
      mark: (['seen', 'clear', 'hidden'] as const)[i % 3],
      marked_by: coach.id,
    });
  }
  for (const [i, hours] of WAITING.entries()) await add(hours, 'waiting', i);
  await add(40, 'unplayable', 0);
  // Of another gym, which must not count.
  const elsewhere = await scene.gym();
  const other = await scene.person(elsewhere, 'member');
  await scene.waitingTake(other, await scene.assignment(elsewhere, await scene.lift(elsewhere), other));
});
afterAll(() => scene.close());

const figures = async (query = '') =>
  (await scene.call<TurnaroundDto>(owner, 'GET', `/api/turnaround${query}`)).body;
const count = async (sql: string, ...bindings: (string | Date)[]) => {
  const [[row]] = await scene.database.raw(`SELECT COUNT(*) AS n FROM takes WHERE gym_id = ? AND ${sql}`, [
    gym.id,
    ...bindings,
  ]);
  return Number(row.n);
};

describe('turnaround', () => {
  it('counts takes that still wait as waiting: R gives a median of 23, not 10', async () => {
    const told = await figures();
    expect(told).toMatchObject({ answered: 9, waiting: 12, withdrawn: 0, clock: 'wall', p90: null });
    expect(told.median).toEqual({ hours: 23, low: 13, high: null });
    expect(told.curve.map((step) => [step.hours, step.atRisk])).toEqual([
      [6, 21],
      [7, 17],
      [10, 15],
      [13, 12],
      [16, 11],
      [22, 7],
      [23, 6],
    ]);
    expect(told.curve[0]?.waitingShare).toBeCloseTo(0.857143, 6);
    expect(told.curve[0]?.low).toBeCloseTo(0.6197, 4);
    expect(told.curve[0]?.high).toBeCloseTo(0.9516, 4);
  });

  it('keeps the promise as the database counts it', async () => {
    const kept = await count("state = 'answered' AND answered_at <= answer_by");
    const broken =
      (await count("state = 'answered' AND answered_at > answer_by")) +
      (await count("state = 'waiting' AND answer_by < ?", NOW));
    const undecided = await count("state = 'waiting' AND answer_by >= ?", NOW);
    expect((await figures()).kept).toEqual({ share: kept / (kept + broken), kept, broken, undecided });
    expect(kept + broken + undecided).toBe(21);
  });

  it('splits by coach, lift and week, and the parts add up', async () => {
    const told = await figures();
    for (const { coach: person, answered } of told.byCoach) {
      expect(answered).toBe(await count('answered_by = ?', person.id));
    }
    for (const { lift, answered, waiting } of told.byLift) {
      expect(answered).toBe(await count("lift_id = ? AND state = 'answered'", lift.id));
      expect(waiting).toBe(await count("lift_id = ? AND state = 'waiting'", lift.id));
    }
    const sum = (groups: { answered: number; waiting: number }[]) =>
      groups.reduce((total, group) => total + group.answered + group.waiting, 0);
    expect(sum(told.byLift)).toBe(21);
    expect(sum(told.byWeek)).toBe(21);
    expect(told.byCoach.reduce((total, group) => total + group.answered, 0)).toBe(9);
    expect(told.byWeek.map((group) => group.weekStart)).toEqual(['2026-11-30']);
    const submitted = told.week.flat().reduce((total, cell) => total + cell.submitted, 0);
    expect([told.week.length, told.week[0]?.length, submitted]).toEqual([7, 24, 21]);
    const rows: { submitted_at: Date }[] = await scene
      .database('takes')
      .where({ gym_id: gym.id })
      .whereNot('state', 'unplayable');
    const local = DateTime.fromJSDate(rows[0]?.submitted_at ?? NOW, { zone: ZONE });
    const same = rows.filter((row) => {
      const at = DateTime.fromJSDate(row.submitted_at, { zone: ZONE });
      return at.weekday === local.weekday && at.hour === local.hour;
    });
    expect(told.week[local.weekday - 1]?.[local.hour]?.submitted).toBe(same.length);
  });

  it('lists what waits, oldest first', async () => {
    const told = await figures();
    expect(told.aging.map((take) => take.waitedHours)).toEqual([...WAITING].sort((a, b) => b - a));
    expect(told.aging[0]?.submittedAt).toBe(new Date(NOW.getTime() - 35 * HOUR).toISOString());
  });

  it('can be narrowed to a lift, a coach and days', async () => {
    const lift = lifts[1]?.id ?? '';
    expect(await figures(`?liftId=${lift}`)).toMatchObject({
      answered: await count("lift_id = ? AND state = 'answered'", lift),
      waiting: await count("lift_id = ? AND state = 'waiting'", lift),
    });
    expect(await figures(`?coachId=${coach.id}`)).toMatchObject({
      answered: await count('answered_by = ?', coach.id),
      waiting: 0,
    });
    const midnight = new Date('2026-12-03T23:00:00.000Z');
    const today = await figures('?from=2026-12-04&to=2026-12-04');
    expect(today).toMatchObject({ from: '2026-12-04', to: '2026-12-04' });
    expect(today.answered + today.waiting).toBe(
      await count("state <> 'unplayable' AND submitted_at >= ?", midnight),
    );
    const backwards = await scene.call(owner, 'GET', '/api/turnaround?from=2026-12-04&to=2026-12-01');
    expect(backwards.status).toBe(400);
  });

  it('counts coaching hours alone when asked to', async () => {
    // 23 hours before Friday 13:00 is Thursday 14:00; the gym coaches until 20:00 and again from 06:00.
    const told = await figures('?clock=coaching');
    expect(told.clock).toBe('coaching');
    const oldest = told.aging[0]?.waitedHours;
    // 35 hours before is Thursday 02:00: 14 hours of Thursday and 7 of Friday.
    expect(oldest).toBe(21);
    expect(told.median.hours).toBe(13);
  });

  it('is the owner’s alone', async () => {
    for (const who of [coach, members[0]]) {
      if (!who) throw new Error('no such person');
      expect((await scene.call(who, 'GET', '/api/turnaround')).status).toBe(403);
      expect((await scene.call(who, 'GET', '/api/turnaround.csv')).status).toBe(403);
    }
    const stranger = await scene.person(await scene.gym(), 'owner');
    expect((await scene.call<TurnaroundDto>(stranger, 'GET', '/api/turnaround')).body).toMatchObject({
      answered: 0,
      waiting: 0,
      median: { hours: null },
    });
  });
});

describe('the takes behind the figures', () => {
  it('come as a file that a spreadsheet reads without running anything in it', async () => {
    const answer = await fetch(`${scene.baseUrl}/api/turnaround.csv`, { headers: scene.headers(owner) });
    expect(answer.headers.get('content-type')).toBe('text/csv; charset=utf-8');
    expect(answer.headers.get('content-disposition')).toBe('attachment; filename="turnaround.csv"');
    const bytes = Buffer.from(await answer.arrayBuffer());
    expect([...bytes.subarray(0, 3)]).toEqual([0xef, 0xbb, 0xbf]);
    const lines = bytes.toString('utf8').trim().split('\r\n');
    expect(lines).toHaveLength(1 + 21);
    expect(lines[0]).toContain('take,member,lift,number,state,submitted');
    expect(lines.filter((line) => line.includes(",'=Maren,")).length).toBe(
      await count('answered_by = ?', coach.id),
    );
    expect(lines[1]).toContain('2026-12-03T01:00:00.000Z');
  });
});

describe('the summary of faults', () => {
  it('counts how often each was seen among the takes on which it could be judged', async () => {
    const summary = (await scene.call<FaultSummaryDto>(coach, 'GET', '/api/faults/summary')).body;
    expect(summary.lifts).toHaveLength(2);
    for (const { lift, takes, faults } of summary.lifts) {
      expect(takes).toBe(await count("lift_id = ? AND state = 'answered'", lift.id));
      const [[row]] = await scene.database.raw(
        "SELECT SUM(mark = 'seen') AS seen, SUM(mark <> 'hidden') AS marked FROM marks WHERE gym_id = ? AND fault_id = ?",
        [gym.id, faults[0]?.faultId ?? ''],
      );
      expect(faults[0]).toMatchObject({ seen: Number(row.seen), marked: Number(row.marked) });
      expect(faults[1]).toMatchObject({ seen: 0, marked: 0 });
    }
    expect((await scene.call(members[0] ?? owner, 'GET', '/api/faults/summary')).status).toBe(403);
  });
});
