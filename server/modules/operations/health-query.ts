import type { Database } from '../../platform/database';

/** When any worker was last heard of. */
export async function newestWorkerBeat(db: Database): Promise<Date | null> {
  const row: { at: Date } | undefined = await db('worker_beats').orderBy('at', 'desc').first('at');
  return row?.at ?? null;
}

/** Jobs by state, for the metrics. */
export async function countJobs(db: Database): Promise<Map<string, number>> {
  const rows: { state: string; n: number }[] = await db('jobs')
    .select('state')
    .count({ n: '*' })
    .groupBy('state');
  return new Map(rows.map((row) => [row.state, Number(row.n)]));
}

/** Takes that wait, over all gyms, for the metrics. */
export async function countWaiting(db: Database): Promise<number> {
  const row = await db('takes').where('state', 'waiting').count({ n: '*' }).first();
  return Number(row?.n ?? 0);
}
