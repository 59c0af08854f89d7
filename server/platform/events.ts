import { EventEmitter } from 'node:events';
import type { EventDto, EventType } from '../contract/live';
import type { Database, Transaction } from './database';
import type { Logger } from './logging';

export interface NewEvent {
  readonly gymId: string;
  readonly type: EventType;
  readonly actorId: string | null;
  readonly takeId?: string | null;
  readonly clipId?: string | null;
  readonly percent?: number | null;
  /** Who is told beside the gym's coaches: one person, everyone, or nobody. */
  readonly to: { readonly staff: boolean; readonly userId?: string; readonly all?: boolean };
}

/** Writes an event in the same transaction as the change it tells. */
export async function recordEvent(trx: Transaction | Database, event: NewEvent, now: Date): Promise<void> {
  await trx('events').insert({
    gym_id: event.gymId,
    type: event.type,
    at: now,
    actor_id: event.actorId,
    take_id: event.takeId ?? null,
    clip_id: event.clipId ?? null,
    percent: event.percent ?? null,
    to_staff: event.to.staff,
    to_user_id: event.to.userId ?? null,
    to_all: event.to.all ?? false,
  });
}

export interface StreamedEvent {
  readonly event: EventDto;
  readonly gymId: string;
  readonly toStaff: boolean;
  readonly toUserId: string | null;
  readonly toAll: boolean;
}

interface EventRow {
  seq: number;
  gym_id: string;
  type: EventType;
  at: Date;
  actor_id: string | null;
  take_id: string | null;
  clip_id: string | null;
  percent: number | null;
  to_staff: 0 | 1;
  to_user_id: string | null;
  to_all: 0 | 1;
}

const toStreamed = (row: EventRow): StreamedEvent => ({
  event: {
    seq: row.seq,
    type: row.type,
    at: row.at.toISOString(),
    actorId: row.actor_id,
    takeId: row.take_id,
    clipId: row.clip_id,
    percent: row.percent,
  },
  gymId: row.gym_id,
  toStaff: row.to_staff === 1,
  toUserId: row.to_user_id,
  toAll: row.to_all === 1,
});

const BATCH = 500;

/**
 * Gives committed events their place in the stream. An auto-increment id is taken before commit, so a reader that
 * follows it skips events that commit late; here one writer at a time, held apart by the counter's row lock, numbers
 * what is already committed.
 * @returns how many were numbered
 */
export async function numberEvents(database: Database): Promise<number> {
  const pending = await database('events').whereNull('seq').first('id');
  if (!pending) return 0;
  return database.transaction(async (trx) => {
    const counter: { seq: number } | undefined = await trx('event_counter')
      .where({ only_row: 1 })
      .first('seq')
      .forUpdate();
    if (!counter) throw new Error('the event counter has no row; run the migrations');
    const rows: { id: number }[] = await trx('events')
      .whereNull('seq')
      .orderBy('id')
      .limit(BATCH)
      .select('id')
      .forUpdate()
      .skipLocked();
    let seq = counter.seq;
    for (const { id } of rows) {
      seq += 1;
      await trx('events').where({ id }).update({ seq });
    }
    await trx('event_counter').where({ only_row: 1 }).update({ seq });
    return rows.length;
  });
}

/** The newest position of the stream. */
export async function latestSeq(database: Database): Promise<number> {
  const row: { seq: number } | undefined = await database('event_counter')
    .where({ only_row: 1 })
    .first('seq');
  return row?.seq ?? 0;
}

/** Events of one gym after a position, oldest first, at most `limit`. */
export async function eventsAfter(
  database: Database,
  gymId: string,
  seq: number,
  limit = 500,
): Promise<StreamedEvent[]> {
  const rows: EventRow[] = await database('events')
    .where('gym_id', gymId)
    .andWhere('seq', '>', seq)
    .orderBy('seq')
    .limit(limit);
  return rows.map(toStreamed);
}

export interface EventStream {
  /** Calls `listener` for each new event; returns how to stop. */
  subscribe(listener: (streamed: StreamedEvent) => void): () => void;
  stop(): Promise<void>;
}

/** Polls the stream and hands new events to this process's listeners; numbers what is pending on the way. */
export function startEventStream(database: Database, logger: Logger, pollMs = 100): EventStream {
  const emitter = new EventEmitter();
  emitter.setMaxListeners(0);
  let position: number | null = null;
  let stopped = false;

  const poll = async () => {
    position ??= await latestSeq(database);
    await numberEvents(database);
    const rows: EventRow[] = await database('events').where('seq', '>', position).orderBy('seq').limit(BATCH);
    for (const row of rows) emitter.emit('event', toStreamed(row));
    position = rows.at(-1)?.seq ?? position;
  };
  const loop = async () => {
    while (!stopped) {
      try {
        await poll();
      } catch (error) {
        if (stopped) break;
        logger.warn({ err: error }, 'the event stream could not be read; trying again');
        await new Promise((resolve) => setTimeout(resolve, 1000));
      }
      await new Promise((resolve) => setTimeout(resolve, pollMs));
    }
  };
  const running = loop();
  return {
    subscribe(listener) {
      emitter.on('event', listener);
      return () => emitter.off('event', listener);
    },
    async stop() {
      stopped = true;
      await running;
    },
  };
}
