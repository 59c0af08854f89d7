import * as z from 'zod';
import { Id, Ms, PageQuery, View, pageOf } from '../common';
import { ClipDto, NewTake, TakeChange, TakeDto, TakeState } from '../takes';
import { ProgressDto, TakeDetailDto } from '../answers';
import { MEMBER, SIGNED_IN, route } from '../route';

const id = z.object({ id: Id });

export const createTake = route({
  id: 'createTake',
  method: 'post',
  path: '/api/assignments/:id/takes',
  access: MEMBER,
  summary: 'Begins a take; an open draft of the same assignment is answered again',
  params: id,
  body: NewTake,
  status: 201,
  answer: TakeDto,
  creates: true,
});
export const changeTake = route({
  id: 'changeTake',
  method: 'patch',
  path: '/api/takes/:id',
  access: MEMBER,
  summary: 'Changes what the member says, before submitting',
  params: id,
  body: TakeChange,
  answer: TakeDto,
});
export const uploadClip = route({
  id: 'uploadClip',
  method: 'post',
  path: '/api/takes/:id/clips/:view',
  access: MEMBER,
  summary: 'Sends one clip; again before submitting replaces it',
  params: z.object({ id: Id, view: View }),
  upload: true,
  status: 201,
  answer: ClipDto,
  creates: true,
});
export const removeClip = route({
  id: 'removeClip',
  method: 'delete',
  path: '/api/clips/:id',
  access: MEMBER,
  summary: 'Removes a clip, before submitting',
  params: id,
});
export const changeClip = route({
  id: 'changeClip',
  method: 'patch',
  path: '/api/clips/:id',
  access: MEMBER,
  summary: 'Sets start and end of a clip, before submitting',
  params: id,
  body: z.object({ trim: z.object({ startMs: Ms, endMs: Ms }).strict().nullable() }).strict(),
  answer: ClipDto,
});
export const submitTake = route({
  id: 'submitTake',
  method: 'post',
  path: '/api/takes/:id/submit',
  access: MEMBER,
  summary: 'Hands the take in; a second submit is answered like the first',
  params: id,
  answer: TakeDto,
});
export const withdrawTake = route({
  id: 'withdrawTake',
  method: 'post',
  path: '/api/takes/:id/withdraw',
  access: MEMBER,
  summary: 'Takes it back before it is answered; its clips are deleted',
  params: id,
  answer: TakeDto,
});
export const retryTake = route({
  id: 'retryTake',
  method: 'post',
  path: '/api/takes/:id/retry',
  access: SIGNED_IN,
  summary: 'Tries again to make an unplayable take playable',
  params: id,
  answer: TakeDto,
});
export const getTake = route({
  id: 'getTake',
  method: 'get',
  path: '/api/takes/:id',
  access: SIGNED_IN,
  summary: 'One take, with its answer once sent',
  params: id,
  answer: TakeDetailDto,
});
export const listTakes = route({
  id: 'listTakes',
  method: 'get',
  path: '/api/takes',
  access: SIGNED_IN,
  summary: 'Takes, newest first; a member sees only their own',
  query: PageQuery.extend({
    memberId: Id.optional(),
    liftId: Id.optional(),
    state: TakeState.optional(),
    unread: z.enum(['true', 'false']).optional(),
  }),
  answer: pageOf(TakeDto),
});
export const markRead = route({
  id: 'markRead',
  method: 'post',
  path: '/api/takes/:id/read',
  access: MEMBER,
  summary: 'Notes that the member has opened the answer',
  params: id,
});
export const getProgress = route({
  id: 'getProgress',
  method: 'get',
  path: '/api/progress',
  access: SIGNED_IN,
  summary: 'Takes and faults per lift, of me or (coaches) of a member',
  query: z.object({ memberId: Id.optional() }),
  answer: ProgressDto,
});

/** `thumbnail` takes its number 0 to 11 as a further part of the path. */
export const MEDIA_KINDS = ['proxy', 'poster', 'filmstrip', 'original'] as const;
export const getClipMedia = route({
  id: 'getClipMedia',
  method: 'get',
  path: '/api/clips/:id/:kind',
  access: SIGNED_IN,
  summary: 'A clip’s proxy, poster, filmstrip or original; byte ranges',
  params: z.object({ id: Id, kind: z.enum(MEDIA_KINDS) }),
  produces: 'bytes',
  status: 200,
});
export const getClipThumbnail = route({
  id: 'getClipThumbnail',
  method: 'get',
  path: '/api/clips/:id/thumbnail/:n',
  access: SIGNED_IN,
  summary: 'One of twelve stills of a clip, evenly over its length',
  params: z.object({ id: Id, n: z.coerce.number().int().min(0).max(11) }),
  produces: 'bytes',
  status: 200,
});
export const getCaptions = route({
  id: 'getCaptions',
  method: 'get',
  path: '/api/takes/:id/comments.vtt',
  access: SIGNED_IN,
  summary: 'The comments on one view as WebVTT',
  params: id,
  query: z.object({ view: View }),
  produces: 'vtt',
  status: 200,
});
