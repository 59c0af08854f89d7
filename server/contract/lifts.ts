import * as z from 'zod';
import { Id, Instant, View, optionalText, text } from './common';

/** The movement pattern, in the trade's words. */
export const PATTERNS = ['hinge', 'squat', 'press', 'lunge', 'pull', 'brace'] as const;
export const Pattern = z.enum(PATTERNS);
export type Pattern = z.infer<typeof Pattern>;

/** Where in a rep a fault shows. */
export const PHASES = ['set-up', 'down', 'bottom', 'up', 'top', 'throughout'] as const;
export const Phase = z.enum(PHASES);
export type Phase = z.infer<typeof Phase>;

/** The view that shows a fault best. */
export const FAULT_VIEWS = ['front', 'side', 'either'] as const;
export const FaultView = z.enum(FAULT_VIEWS);

/** Where a version of the lift stands beside the lift itself. */
export const SCALE_LEVELS = ['easier', 'same', 'harder'] as const;
export const ScaleLevel = z.enum(SCALE_LEVELS);

/**
 * Four counts in seconds: down, pause at the bottom, up, pause at the top; X = as fast as possible under
 * control, allowed for the two moving phases except the lowering. Written `40X0` or, where a count takes two
 * digits, with dashes: `10-0-2-0`.
 */
export const Tempo = z
  .string()
  .trim()
  .regex(
    /^(\d\d[\dX]\d|\d{1,2}-\d{1,2}-(\d{1,2}|X)-\d{1,2})$/,
    'Write a tempo as four counts, for instance 30X0 or 10-0-2-0.',
  );

export const BriefDto = z.object({
  views: z.array(View).min(1, 'Ask for at least one view.'),
  repsMin: z.number().int().min(1, 'At least one rep.').max(50),
  repsMax: z.number().int().min(1).max(50),
  /** Camera height in centimetres above the floor. */
  cameraHeightCm: z.number().int().min(0).max(300),
  /** Distance from camera to lifter in centimetres. */
  cameraDistanceCm: z.number().int().min(50).max(1500),
  /** What must be in the picture. */
  inFrame: z.string().max(200),
  note: z.string().max(500),
});

export const FaultDto = z.object({
  id: Id,
  name: z.string(),
  phase: Phase,
  view: FaultView,
  cue: z.string(),
  drill: z.string().nullable(),
});
export type FaultDto = z.infer<typeof FaultDto>;

export const ScaleDto = z.object({ id: Id, name: z.string(), level: ScaleLevel, note: z.string() });
export type ScaleDto = z.infer<typeof ScaleDto>;

export const LiftDto = z.object({
  id: Id,
  name: z.string(),
  pattern: Pattern,
  brief: BriefDto,
  tempo: z.string().nullable(),
  faults: z.array(FaultDto),
  scales: z.array(ScaleDto),
  createdAt: Instant,
  archivedAt: Instant.nullable(),
});
export type LiftDto = z.infer<typeof LiftDto>;

const BriefInput = BriefDto.partial({
  cameraHeightCm: true,
  cameraDistanceCm: true,
  inFrame: true,
  note: true,
}).superRefine((brief, ctx) => {
  if (brief.repsMax < brief.repsMin) {
    ctx.addIssue({ code: 'custom', path: ['repsMax'], message: 'The most reps cannot be below the fewest.' });
  }
  if (new Set(brief.views).size !== brief.views.length) {
    ctx.addIssue({ code: 'custom', path: ['views'], message: 'Name each view once.' });
  }
});

/** A fault or scale with an id is kept and changed; without one it is new; one left out is archived. */
const FaultInput = z
  .object({
    id: Id.optional(),
    name: text(80),
    phase: Phase,
    view: FaultView,
    cue: text(120),
    drill: optionalText(300),
  })
  .strict();
const ScaleInput = z
  .object({
    id: Id.optional(),
    name: text(80),
    level: ScaleLevel,
    note: z.string().trim().max(300).default(''),
  })
  .strict();

export const NewLift = z
  .object({
    name: text(80),
    pattern: Pattern,
    brief: BriefInput,
    tempo: Tempo.nullish(),
    faults: z.array(FaultInput).max(30, 'Keep the checklist to 30 faults.').default([]),
    scales: z.array(ScaleInput).max(20, 'Keep to 20 scales.').default([]),
  })
  .strict();
export const LiftChange = z
  .object({
    name: text(80),
    pattern: Pattern,
    brief: BriefInput,
    tempo: Tempo.nullable(),
    faults: z.array(FaultInput).max(30, 'Keep the checklist to 30 faults.'),
    scales: z.array(ScaleInput).max(20, 'Keep to 20 scales.'),
    archived: z.boolean(),
  })
  .partial()
  .strict();
