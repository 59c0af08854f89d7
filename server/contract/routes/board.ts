import * as z from 'zod';
import { Id, Instant, PageQuery } from '../common';
import {
  BoardDto,
  CommentChange,
  CommentDto,
  DraftAnswer,
  MarkDto,
  MeasureDto,
  NewAnswer,
  NewComment,
  NewMeasure,
  NewReply,
  PutMarks,
  PutRepMarks,
  QueueItemDto,
  RepMarksDto,
  ReplyDto,
  TakeDetailDto,
} from '../answers';
import { SIGNED_IN, STAFF, route } from '../route';

const id = z.object({ id: Id });

export const getQueue = route({
  id: 'getQueue',
  method: 'get',
  path: '/api/queue',
  access: STAFF,
  summary: 'Takes that wait, pain first, then by answer-by',
  query: PageQuery.extend({
    liftId: Id.optional(),
    only: z.enum(['needed-today', 'second-takes', 'nobody-has-it']).optional(),
  }),
  answer: z.object({
    items: z.array(QueueItemDto),
    next: z.string().nullable(),
    waiting: z.number().int(),
    hurting: z.number().int(),
    unplayable: z.number().int(),
  }),
});
export const pickUp = route({
  id: 'pickUp',
  method: 'post',
  path: '/api/takes/:id/pick-up',
  access: STAFF,
  summary: 'Picks a take up to answer it, or renews the lease; 409 says who has it',
  params: id,
  answer: z.object({ until: Instant }),
});
export const putBack = route({
  id: 'putBack',
  method: 'delete',
  path: '/api/takes/:id/pick-up',
  access: STAFF,
  summary: 'Returns a take to the queue',
  params: id,
});
export const getBoard = route({
  id: 'getBoard',
  method: 'get',
  path: '/api/takes/:id/board',
  access: STAFF,
  summary: 'Everything the board draws',
  params: id,
  answer: BoardDto,
});
export const addComment = route({
  id: 'addComment',
  method: 'post',
  path: '/api/takes/:id/comments',
  access: STAFF,
  summary: 'Comments at an instant',
  params: id,
  body: NewComment,
  status: 201,
  answer: CommentDto,
  creates: true,
});
export const changeComment = route({
  id: 'changeComment',
  method: 'patch',
  path: '/api/comments/:id',
  access: STAFF,
  summary: 'Changes one of my comments',
  params: id,
  body: CommentChange,
  answer: CommentDto,
});
export const deleteComment = route({
  id: 'deleteComment',
  method: 'delete',
  path: '/api/comments/:id',
  access: STAFF,
  summary: 'Deletes one of my comments',
  params: id,
});
export const putMarks = route({
  id: 'putMarks',
  method: 'put',
  path: '/api/takes/:id/marks',
  access: STAFF,
  summary: 'Sets the marks of the checklist, as a whole',
  params: id,
  body: PutMarks,
  answer: z.object({ marks: z.array(MarkDto) }),
});
export const addMeasure = route({
  id: 'addMeasure',
  method: 'post',
  path: '/api/takes/:id/measures',
  access: STAFF,
  summary: 'Takes a measure from points on a frame',
  params: id,
  body: NewMeasure,
  status: 201,
  answer: MeasureDto,
  creates: true,
});
export const deleteMeasure = route({
  id: 'deleteMeasure',
  method: 'delete',
  path: '/api/measures/:id',
  access: STAFF,
  summary: 'Deletes a measure',
  params: id,
});
export const putRepMarks = route({
  id: 'putRepMarks',
  method: 'put',
  path: '/api/clips/:id/rep-marks',
  access: STAFF,
  summary: 'Sets the rep instants of a clip; answers the tempo per rep',
  params: id,
  body: PutRepMarks,
  answer: RepMarksDto,
});
export const putDraft = route({
  id: 'putDraft',
  method: 'put',
  path: '/api/takes/:id/draft',
  access: STAFF,
  summary: 'Keeps what the coach has written so far',
  params: id,
  body: DraftAnswer,
  answer: DraftAnswer,
});
export const sendAnswer = route({
  id: 'sendAnswer',
  method: 'post',
  path: '/api/takes/:id/answer',
  access: STAFF,
  summary: 'Sends the answer, once',
  params: id,
  body: NewAnswer,
  answer: TakeDetailDto,
  creates: true,
});
export const addReply = route({
  id: 'addReply',
  method: 'post',
  path: '/api/takes/:id/replies',
  access: SIGNED_IN,
  summary: 'One thing asked back, or said back, after the answer',
  params: id,
  body: NewReply,
  status: 201,
  answer: ReplyDto,
  creates: true,
});
