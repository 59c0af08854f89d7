import * as z from 'zod';
import { Id, PageQuery, pageOf } from '../common';
import { LiftChange, LiftDto, NewLift } from '../lifts';
import { AssignmentDetailDto, AssignmentDto, NewAssignment } from '../takes';
import { SIGNED_IN, STAFF, route } from '../route';

const id = z.object({ id: Id });

export const listLifts = route({
  id: 'listLifts',
  method: 'get',
  path: '/api/lifts',
  access: SIGNED_IN,
  summary: 'The gym’s library',
  answer: z.object({ items: z.array(LiftDto) }),
});
export const createLift = route({
  id: 'createLift',
  method: 'post',
  path: '/api/lifts',
  access: STAFF,
  summary: 'Adds a lift',
  body: NewLift,
  status: 201,
  answer: LiftDto,
  creates: true,
});
export const getLift = route({
  id: 'getLift',
  method: 'get',
  path: '/api/lifts/:id',
  access: SIGNED_IN,
  summary: 'One lift',
  params: id,
  answer: LiftDto,
});
export const changeLift = route({
  id: 'changeLift',
  method: 'patch',
  path: '/api/lifts/:id',
  access: STAFF,
  summary: 'Changes a lift',
  params: id,
  body: LiftChange,
  answer: LiftDto,
});

export const listAssignments = route({
  id: 'listAssignments',
  method: 'get',
  path: '/api/assignments',
  access: SIGNED_IN,
  summary: 'Assignments, newest first: a member’s own, or all for coaches',
  query: PageQuery,
  answer: pageOf(AssignmentDto),
});
export const createAssignment = route({
  id: 'createAssignment',
  method: 'post',
  path: '/api/assignments',
  access: STAFF,
  summary: 'Asks members to film a lift',
  body: NewAssignment,
  status: 201,
  answer: AssignmentDto,
  creates: true,
});
export const getAssignment = route({
  id: 'getAssignment',
  method: 'get',
  path: '/api/assignments/:id',
  access: SIGNED_IN,
  summary: 'One assignment; for coaches with who has filmed',
  params: id,
  answer: AssignmentDetailDto,
});
export const closeAssignment = route({
  id: 'closeAssignment',
  method: 'post',
  path: '/api/assignments/:id/close',
  access: STAFF,
  summary: 'Takes an assignment off members’ Today',
  params: id,
  answer: AssignmentDto,
});
export const reopenAssignment = route({
  id: 'reopenAssignment',
  method: 'post',
  path: '/api/assignments/:id/reopen',
  access: STAFF,
  summary: 'Puts a closed assignment back',
  params: id,
  answer: AssignmentDto,
});
