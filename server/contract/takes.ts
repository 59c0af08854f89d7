import * as z from 'zod';
import { Id, Instant, Ms, Person, Rational, View, optionalText, text } from './common';
import { LiftDto } from './lifts';

export const TAKE_STATES = [
  'draft',
  'processing',
  'waiting',
  'picked-up',
  'answered',
  'unplayable',
  'withdrawn',
] as const;
export const TakeState = z.enum(TAKE_STATES);
export type TakeState = z.infer<typeof TakeState>;

/** A clip's way from the last byte to a playable picture. */
export const CLIP_STATES = ['uploaded', 'processing', 'ready', 'unplayable'] as const;
export const ClipState = z.enum(CLIP_STATES);
export type ClipState = z.infer<typeof ClipState>;

/** Why a clip cannot be used, said for the member, with what to do about it. */
export const ClipProblem = z.object({ reason: z.string(), message: z.string(), remedy: z.string() });
export type ClipProblem = z.infer<typeof ClipProblem>;

export const ClipMedia = z.object({
  /** Addresses under this API; for those who may see the take. */
  proxy: z.string(),
  poster: z.string(),
  filmstrip: z.string(),
  thumbnails: z.array(z.string()),
});

export const ClipDto = z.object({
  id: Id,
  takeId: Id,
  view: View,
  state: ClipState,
  /** 0 to 100, while processing. */
  progress: z.number(),
  sizeBytes: z.number().int(),
  sha256: z.string(),
  /** Of the proxy; null until the clip is ready. */
  durationMs: Ms.nullable(),
  width: z.number().int().nullable(),
  height: z.number().int().nullable(),
  fps: Rational.nullable(),
  frames: z.number().int().nullable(),
  trim: z.object({ startMs: Ms, endMs: Ms }).nullable(),
  problem: ClipProblem.nullable(),
  media: ClipMedia.nullable(),
});
export type ClipDto = z.infer<typeof ClipDto>;

export const Pain = z.object({ where: text(120), level: z.number().int().min(1).max(10) }).strict();
export type Pain = z.infer<typeof Pain>;

export const TakeDto = z.object({
  id: Id,
  number: z.number().int().min(1),
  state: TakeState,
  assignmentId: Id,
  previousTakeId: Id.nullable(),
  member: Person,
  lift: z.object({ id: Id, name: z.string() }),
  /** The views asked for: the brief's, or those of the refilm request that led here. */
  views: z.array(View),
  neededBy: Instant.nullable(),
  load: z.string().nullable(),
  implement: z.string().nullable(),
  note: z.string().nullable(),
  pain: Pain.nullable(),
  /** Reps × rounds waiting behind the answer; null when the assignment does not say. */
  atStake: z.number().int().nullable(),
  answerBy: Instant.nullable(),
  submittedAt: Instant.nullable(),
  answeredAt: Instant.nullable(),
  /** When the member first opened the answer. */
  readAt: Instant.nullable(),
  pickedUpBy: Person.nullable(),
  pickedUpUntil: Instant.nullable(),
  problem: ClipProblem.nullable(),
  clips: z.array(ClipDto),
  createdAt: Instant,
});
export type TakeDto = z.infer<typeof TakeDto>;

export const AssignmentDto = z.object({
  id: Id,
  lift: LiftDto,
  title: z.string(),
  note: z.string().nullable(),
  load: z.string().nullable(),
  reps: z.number().int().nullable(),
  rounds: z.number().int().nullable(),
  trainAt: Instant.nullable(),
  untilAnsweredScaleId: Id.nullable(),
  audience: z.union([z.object({ all: z.literal(true) }), z.object({ memberIds: z.array(Id) })]),
  createdBy: Person,
  createdAt: Instant,
  closedAt: Instant.nullable(),
  /** For coaches: how many were asked and how many have submitted a take. Null for members. */
  counts: z.object({ asked: z.number().int(), filmed: z.number().int() }).nullable(),
  /** For a member: the caller's own takes of this assignment, oldest first. Empty for coaches. */
  myTakes: z.array(TakeDto),
});
export type AssignmentDto = z.infer<typeof AssignmentDto>;

/** One member asked, and how far they are. */
export const AskedMember = z.object({
  member: Person,
  takes: z.number().int(),
  latest: z
    .object({ takeId: Id, number: z.number().int(), state: TakeState, submittedAt: Instant.nullable() })
    .nullable(),
});
export const AssignmentDetailDto = AssignmentDto.extend({ asked: z.array(AskedMember) });
export type AssignmentDetailDto = z.infer<typeof AssignmentDetailDto>;

export const NewAssignment = z
  .object({
    liftId: Id,
    title: text(120),
    note: optionalText(1000),
    load: optionalText(60),
    reps: z.number().int().min(1).max(1000).nullish(),
    rounds: z.number().int().min(1).max(100).nullish(),
    trainAt: Instant.nullish(),
    untilAnsweredScaleId: Id.nullish(),
    audience: z.union([
      z.object({ all: z.literal(true) }).strict(),
      z.object({ memberIds: z.array(Id).min(1, 'Choose at least one member.').max(500) }).strict(),
    ]),
  })
  .strict();

export const NewTake = z
  .object({
    neededBy: Instant.nullish(),
    load: optionalText(60),
    implement: optionalText(80),
    note: optionalText(500),
    pain: Pain.nullish(),
  })
  .strict();
export const TakeChange = NewTake;
