import * as z from 'zod';
import { Id, Instant, Role } from './common';

/** What can happen, told live and kept as a take's history. */
export const EVENT_TYPES = [
  'take.created',
  'take.submitted',
  'take.waiting',
  'take.picked-up',
  'take.put-back',
  'take.lapsed',
  'take.answered',
  'take.read',
  'take.unplayable',
  'take.retried',
  'take.withdrawn',
  'take.replied',
  'clip.uploaded',
  'clip.progress',
  'clip.ready',
  'clip.unplayable',
  'board.changed',
  'assignment.created',
  'notification.created',
  'people.changed',
  'lifts.changed',
  'gym.changed',
] as const;
export const EventType = z.enum(EVENT_TYPES);
export type EventType = z.infer<typeof EventType>;

export const EventDto = z.object({
  /** Position in the stream; also the SSE `id`. */
  seq: z.number().int(),
  type: EventType,
  at: Instant,
  actorId: Id.nullable(),
  takeId: Id.nullable(),
  clipId: Id.nullable(),
  /** Per cent, of `clip.progress`. */
  percent: z.number().nullable(),
});
export type EventDto = z.infer<typeof EventDto>;

export const NotificationDto = z.object({
  id: Id,
  kind: z.enum([
    'take-answered',
    'take-waiting',
    'take-unplayable',
    'take-replied',
    'assignment',
    'answer-by-near',
    'pain',
  ]),
  title: z.string(),
  body: z.string(),
  /** A path of the client, for instance `/answers/TAKE`. */
  link: z.string(),
  at: Instant,
  readAt: Instant.nullable(),
});
export type NotificationDto = z.infer<typeof NotificationDto>;
export const NotificationsDto = z.object({ items: z.array(NotificationDto), unread: z.number().int() });
export type NotificationsDto = z.infer<typeof NotificationsDto>;
export const ReadNotifications = z.object({ ids: z.array(Id).max(200).optional() }).strict();

export const MailDto = z.object({
  to: z.string(),
  subject: z.string(),
  text: z.string(),
  html: z.string(),
  at: Instant,
});
export type MailDto = z.infer<typeof MailDto>;
export const MailboxDto = z.object({ items: z.array(MailDto) });
export type MailboxDto = z.infer<typeof MailboxDto>;

export const DemoDto = z.object({
  accounts: z.array(z.object({ name: z.string(), role: Role, email: z.string(), password: z.string() })),
});
export type DemoDto = z.infer<typeof DemoDto>;

const Part = z.enum(['ok', 'down']);
export const HealthDto = z.object({
  status: z.enum(['ok', 'degraded']),
  database: Part,
  objectStore: Part,
  mail: Part,
  worker: Part,
  version: z.string(),
});
export type HealthDto = z.infer<typeof HealthDto>;
