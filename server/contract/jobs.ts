import * as z from 'zod';
import { Id } from './common';

/** Payload of each kind of job, keyed by its type. */
export const JOB_PAYLOADS = {
  /** Turn an uploaded clip into its proxy and stills. */
  'clip.process': z.object({ clipId: Id, gymId: Id }),
  /** Send one mail. */
  'mail.send': z.object({ to: z.string(), subject: z.string(), text: z.string(), html: z.string() }),
  /** Delete objects of the store under these prefixes. */
  'objects.delete': z.object({ prefixes: z.array(z.string()).min(1) }),
  /** Warn coaches of a take whose answer-by is near and that still waits. */
  'take.warn': z.object({ takeId: Id, gymId: Id }),
} as const;
export type JobType = keyof typeof JOB_PAYLOADS;
export type JobPayload<T extends JobType> = z.infer<(typeof JOB_PAYLOADS)[T]>;
