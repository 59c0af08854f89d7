import type { Database } from '../../server/platform/database';
import type { World } from '../e2e/support/world';
import { median, ms, timed, times, type Row } from './table';

const CALLS = 40;

/** Takes that wait, spread over the promise's hours, made by the database itself. */
async function addWaiting(database: Database, world: World, from: number, to: number): Promise<void> {
  const assignment: { gym_id: string; lift_id: string } | undefined = await database('assignments')
    .where('id', world.assignment.id)
    .first('gym_id', 'lift_id');
  if (!assignment) throw new Error('the assignment is not there');
  await database.raw(
    `INSERT INTO takes (id, gym_id, assignment_id, lift_id, member_id, number, state, views, queue_rank, answer_by,
       promise_hours, submitted_at, waiting_at, created_at)
     SELECT CONCAT('bench-', LPAD(seq, 12, '0')), ?, ?, ?, ?, seq, 'waiting', '["front","side"]', 1,
       NOW(3) + INTERVAL (seq MOD 50000) SECOND, 8, NOW(3), NOW(3), NOW(3)
     FROM seq_${String(from)}_to_${String(to)}`,
    [assignment.gym_id, world.assignment.id, assignment.lift_id, world.member.id],
  );
  await database.raw('ANALYZE TABLE takes');
}

async function pageMs(world: World): Promise<number> {
  const call = () => world.coach.api.get('/api/queue?limit=50');
  for (let i = 0; i < 5; i += 1) await call();
  const all: number[] = [];
  for (let i = 0; i < CALLS; i += 1) all.push(await timed(call));
  return median(all);
}

/** The queue's first page with a thousand waiting takes and with a hundred thousand. */
export async function benchQueue(database: Database, world: World): Promise<Row[]> {
  await addWaiting(database, world, 101, 1_100);
  const few = await pageMs(world);
  await addWaiting(database, world, 1_101, 100_100);
  const many = await pageMs(world);
  return [
    {
      metric: 'queue, first page, 100 k waiting takes / 1 k',
      bare: ms(few),
      ours: ms(many),
      ratio: times(many / few),
      target: '≤ 1.5 (at 1 M)',
    },
  ];
}
