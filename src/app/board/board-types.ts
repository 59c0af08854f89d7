import type { BodyOf, boardRoutes } from '@contract';

export type { Call, DraftAnswer, LiftDto, Mark, MarkDto, TakeState } from '@contract';
export type NewAnswerBody = BodyOf<typeof boardRoutes.sendAnswer>;
