import type { Response } from 'express';
import { liveRoutes } from '../../contract';
import { eventsAfter, latestSeq, type StreamedEvent } from '../../platform/events';
import type { Actor } from '../../platform/http/actor';
import type { Routes } from '../../platform/http/routes';
import type { Platform } from '../../platform/platform';

/** A comment this often keeps proxies from closing a quiet stream, and tells when a client has gone. */
const HEARTBEAT_MS = 20_000;
/** After this long the client connects again, so that a session that has ended does not listen on. */
const STREAM_MS = 10 * 60_000;

const concerns = (actor: Actor, streamed: StreamedEvent) =>
  streamed.gymId === actor.gymId &&
  (streamed.toAll || streamed.toUserId === actor.userId || (streamed.toStaff && actor.role !== 'member'));

const write = (res: Response, streamed: StreamedEvent) => {
  res.write(`id: ${streamed.event.seq}\ndata: ${JSON.stringify(streamed.event)}\n\n`);
};

export function registerEventStreamRoutes(routes: Routes, platform: Platform): void {
  routes.stream(liveRoutes.streamEvents, async ({ actor, req, res }) => {
    const lastSeen = Number(req.get('last-event-id') ?? req.query['lastEventId']);
    const from =
      Number.isSafeInteger(lastSeen) && lastSeen > 0 ? lastSeen : await latestSeq(platform.database);
    res.writeHead(200, {
      'Content-Type': 'text/event-stream',
      'Cache-Control': 'no-store',
      'X-Accel-Buffering': 'no',
    });
    res.write(`retry: 2000\nid: ${from}\n\n`);

    let position = from;
    const send = (streamed: StreamedEvent) => {
      if (streamed.event.seq <= position) return;
      position = streamed.event.seq;
      if (concerns(actor, streamed)) write(res, streamed);
    };
    // Live events wait until what was missed has been written, so that nothing is skipped or told twice.
    let held: StreamedEvent[] | null = [];
    const unsubscribe = platform.events.subscribe((streamed) => {
      if (streamed.gymId !== actor.gymId) return;
      if (held) held.push(streamed);
      else send(streamed);
    });
    const heartbeat = setInterval(() => res.write(': \n\n'), HEARTBEAT_MS);
    const end = setTimeout(() => res.end(), STREAM_MS);
    res.on('close', () => {
      unsubscribe();
      clearInterval(heartbeat);
      clearTimeout(end);
    });
    for (;;) {
      const missed = await eventsAfter(platform.database, actor.gymId, position);
      missed.forEach(send);
      if (missed.length === 0) break;
    }
    held.forEach(send);
    held = null;
  });
}
