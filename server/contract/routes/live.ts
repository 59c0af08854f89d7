import * as z from 'zod';
import { DemoDto, HealthDto, MailboxDto, NotificationsDto, ReadNotifications } from '../live';
import { SIGNED_IN, route } from '../route';

export const streamEvents = route({
  id: 'streamEvents',
  method: 'get',
  path: '/api/events',
  access: SIGNED_IN,
  summary: 'What happens, as server-sent events; resumes from Last-Event-ID',
  produces: 'event-stream',
  status: 200,
});
export const listNotifications = route({
  id: 'listNotifications',
  method: 'get',
  path: '/api/notifications',
  access: SIGNED_IN,
  summary: 'My notices, newest first',
  answer: NotificationsDto,
});
export const readNotifications = route({
  id: 'readNotifications',
  method: 'post',
  path: '/api/notifications/read',
  access: SIGNED_IN,
  summary: 'Marks notices read; all of them when none is named',
  body: ReadNotifications,
});
export const getMailbox = route({
  id: 'getMailbox',
  method: 'get',
  path: '/api/dev/mailbox',
  access: 'anyone',
  summary: 'What the mail fake received; only while it is in use, only from loopback',
  answer: MailboxDto,
});
export const getDemo = route({
  id: 'getDemo',
  method: 'get',
  path: '/api/dev/demo',
  access: 'anyone',
  summary: 'The demo’s accounts; only in demo mode',
  answer: DemoDto,
});
export const getHealth = route({
  id: 'getHealth',
  method: 'get',
  path: '/api/health',
  access: 'anyone',
  summary: 'Whether each part answers',
  answer: HealthDto,
});
export const getMetrics = route({
  id: 'getMetrics',
  method: 'get',
  path: '/api/metrics',
  access: 'anyone',
  summary: 'Prometheus metrics; from loopback or with a token',
  produces: 'text',
  status: 200,
});
export const getOpenApi = route({
  id: 'getOpenApi',
  method: 'get',
  path: '/api/openapi.json',
  access: 'anyone',
  summary: 'This description',
  answer: z.record(z.string(), z.unknown()),
});
