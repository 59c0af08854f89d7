import * as z from 'zod';
import { Id, Instant, Ms, Person, Point, View, optionalText, text } from './common';
import { LiftDto, Tempo } from './lifts';
import { AssignmentDto, ClipDto, TakeDto } from './takes';

export const MARKS = ['clear', 'seen', 'hidden'] as const;
export const Mark = z.enum(MARKS);
export type Mark = z.infer<typeof Mark>;

/** What to do with the load: go as planned, keep it light, or use the named scale. */
export const CALLS = ['go', 'light', 'scale'] as const;
export const Call = z.enum(CALLS);
export type Call = z.infer<typeof Call>;

export const SHAPE_KINDS = ['line', 'arrow', 'circle', 'stroke', 'angle', 'plumb'] as const;
/** Vectors in fractions of the frame: line, arrow and circle take two points, angle three, plumb one, stroke many. */
export const Drawing = z.object({
  shapes: z.array(z.object({ kind: z.enum(SHAPE_KINDS), points: z.array(Point).min(1).max(400) })).max(40),
});
export type Drawing = z.infer<typeof Drawing>;

export const COMMENT_MAX = 500;
export const TOP_CUE_MAX = 120;

export const CommentDto = z.object({
  id: Id,
  takeId: Id,
  clipId: Id,
  view: View,
  atMs: Ms,
  endMs: Ms.nullable(),
  body: z.string(),
  drawing: Drawing.nullable(),
  faultId: Id.nullable(),
  author: Person,
  createdAt: Instant,
});
export type CommentDto = z.infer<typeof CommentDto>;

export const NewComment = z
  .object({
    clipId: Id,
    atMs: Ms,
    endMs: Ms.nullish(),
    body: text(COMMENT_MAX),
    drawing: Drawing.nullish(),
    faultId: Id.nullish(),
  })
  .strict()
  .refine((comment) => (comment.endMs ?? comment.atMs + 1) > comment.atMs, {
    message: 'A span ends after it starts.',
    path: ['endMs'],
  });
export const CommentChange = z
  .object({
    atMs: Ms,
    endMs: Ms.nullable(),
    body: text(COMMENT_MAX),
    drawing: Drawing.nullable(),
    faultId: Id.nullable(),
  })
  .partial()
  .strict();

export const MarkDto = z.object({
  faultId: Id,
  mark: Mark,
  /** The instant at which the fault is seen, on the named clip. */
  clipId: Id.nullable(),
  atMs: Ms.nullable(),
});
export type MarkDto = z.infer<typeof MarkDto>;
export const PutMarks = z
  .object({
    marks: z
      .array(z.object({ faultId: Id, mark: Mark, clipId: Id.nullish(), atMs: Ms.nullish() }).strict())
      .max(60),
  })
  .strict();

export const MEASURE_KINDS = ['angle', 'lean', 'depth'] as const;
export const MeasureKind = z.enum(MEASURE_KINDS);
export type MeasureKind = z.infer<typeof MeasureKind>;
export const MeasureDto = z.object({
  id: Id,
  takeId: Id,
  clipId: Id,
  atMs: Ms,
  kind: MeasureKind,
  points: z.array(Point),
  faultId: Id.nullable(),
  /** Degrees; see `server/calc/geometry` for each kind's meaning and sign. */
  value: z.number(),
  plusMinus: z.number(),
  unit: z.literal('deg'),
  author: Person,
});
export type MeasureDto = z.infer<typeof MeasureDto>;
export const NewMeasure = z
  .object({
    clipId: Id,
    atMs: Ms,
    kind: MeasureKind,
    points: z.array(Point).min(2).max(3),
    faultId: Id.nullish(),
  })
  .strict()
  .refine((measure) => measure.points.length === (measure.kind === 'angle' ? 3 : 2), {
    message: 'An angle takes three points, the vertex second; lean and depth take two.',
    path: ['points'],
  });

export const RepMark = z.object({ atMs: Ms, kind: z.enum(['top', 'bottom']) });
export type RepMark = z.infer<typeof RepMark>;
/** One rep's timing in ms, from marked tops and bottoms. */
export const RepTempo = z.object({ rep: z.number().int(), startMs: Ms, downMs: Ms, upMs: Ms });
export const RepMarksDto = z.object({ clipId: Id, marks: z.array(RepMark), tempo: z.array(RepTempo) });
export const PutRepMarks = z.object({ marks: z.array(RepMark.strict()).max(200) }).strict();

export const Refilm = z.object({
  views: z.array(View).min(1, 'Choose at least one view.'),
  by: Instant.nullable(),
  note: z.string().nullable(),
});
export type Refilm = z.infer<typeof Refilm>;
const RefilmInput = z
  .object({
    views: z.array(View).min(1, 'Choose at least one view.').max(2),
    by: Instant.nullish(),
    note: optionalText(300),
  })
  .strict();

/** What the coach has written so far; kept on the server so that nothing is lost. */
export const DraftAnswer = z
  .object({
    topCue: z.string().max(TOP_CUE_MAX).default(''),
    call: Call.nullish(),
    scaleId: Id.nullish(),
    tempo: z.string().max(20).nullish(),
    refilm: RefilmInput.nullish(),
    /** Words typed into the composer but not yet made a comment. */
    composer: z.string().max(COMMENT_MAX).default(''),
  })
  .strict();
export type DraftAnswer = z.infer<typeof DraftAnswer>;

export const NewAnswer = z
  .object({
    topCue: text(TOP_CUE_MAX),
    call: Call,
    scaleId: Id.nullish(),
    tempo: Tempo.nullish(),
    refilm: RefilmInput.nullish(),
  })
  .strict()
  .refine((answer) => answer.call !== 'scale' || (answer.scaleId ?? null) !== null, {
    message: 'Choose the scale to use.',
    path: ['scaleId'],
  });

export const ReplyDto = z.object({ id: Id, author: Person, body: z.string(), createdAt: Instant });
export type ReplyDto = z.infer<typeof ReplyDto>;
export const NewReply = z.object({ body: text(500) }).strict();

export const AnswerDto = z.object({
  topCue: z.string(),
  call: Call,
  scale: z.object({ id: Id, name: z.string(), note: z.string() }).nullable(),
  tempo: z.string().nullable(),
  refilm: Refilm.nullable(),
  author: Person,
  answeredAt: Instant,
  comments: z.array(CommentDto),
  marks: z.array(MarkDto),
  measures: z.array(MeasureDto),
  replies: z.array(ReplyDto),
});
export type AnswerDto = z.infer<typeof AnswerDto>;

/** A change of a take, as its history shows it. */
export const TakeEventDto = z.object({ type: z.string(), at: Instant, by: Person.nullable() });

/** A take with all that its reader may see; `answer` is null until one was sent. */
export const TakeDetailDto = TakeDto.extend({
  assignment: AssignmentDto,
  answer: AnswerDto.nullable(),
  history: z.array(TakeEventDto),
});
export type TakeDetailDto = z.infer<typeof TakeDetailDto>;

/** An earlier take of the same lift by the same member, with its answer. */
export const EarlierTake = z.object({ take: TakeDto, answer: AnswerDto.nullable() });

export const BoardDto = z.object({
  take: TakeDto,
  member: z.object({ id: Id, name: z.string(), kit: z.string().nullable() }),
  lift: LiftDto,
  assignment: AssignmentDto,
  clips: z.array(ClipDto),
  comments: z.array(CommentDto),
  marks: z.array(MarkDto),
  measures: z.array(MeasureDto),
  repMarks: z.array(RepMarksDto),
  draft: DraftAnswer.nullable(),
  answer: AnswerDto.nullable(),
  /** Newest first. */
  earlierTakes: z.array(EarlierTake),
});
export type BoardDto = z.infer<typeof BoardDto>;

export const QueueItemDto = z.object({
  take: TakeDto,
  member: Person,
  lift: z.object({ id: Id, name: z.string() }),
  assignment: z.object({ id: Id, title: z.string() }),
  posters: z.array(z.object({ view: View, url: z.string() })),
  answerBy: Instant,
  neededBy: Instant.nullable(),
  atStake: z.number().int().nullable(),
  pain: z.object({ where: z.string(), level: z.number().int() }).nullable(),
  pickedUpBy: Person.nullable(),
  number: z.number().int(),
});
export type QueueItemDto = z.infer<typeof QueueItemDto>;

/** A member's way with one lift: takes oldest first, each with its marks. */
export const ProgressDto = z.object({
  member: Person,
  lifts: z.array(
    z.object({
      lift: LiftDto,
      takes: z.array(z.object({ take: TakeDto, topCue: z.string().nullable(), marks: z.array(MarkDto) })),
    }),
  ),
});
export type ProgressDto = z.infer<typeof ProgressDto>;
