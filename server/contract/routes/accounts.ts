import * as z from 'zod';
import { Id } from '../common';
import { GymChange, GymDto } from '../gyms';
import {
  AcceptInvitation,
  ForgotPassword,
  GuardianConsent,
  InvitationDto,
  MeChange,
  NewInvitation,
  OpenGym,
  PersonChange,
  PublicSessionDto,
  ResetPassword,
  SessionDto,
  SignIn,
  UserDto,
} from '../people';
import { OWNER, SIGNED_IN, STAFF, route } from '../route';

const id = z.object({ id: Id });
const token = z.object({ token: z.string().min(1).max(200) });

export const openGym = route({
  id: 'openGym',
  method: 'post',
  path: '/api/gyms',
  access: 'anyone',
  summary: 'Opens a gym and signs its owner in',
  body: OpenGym,
  status: 201,
  answer: SessionDto,
});
export const signIn = route({
  id: 'signIn',
  method: 'post',
  path: '/api/auth/sign-in',
  access: 'anyone',
  summary: 'Signs in',
  body: SignIn,
  answer: SessionDto,
});
export const refresh = route({
  id: 'refresh',
  method: 'post',
  path: '/api/auth/refresh',
  access: 'anyone',
  summary: 'Rotates the refresh token and renews the session',
});
export const signOut = route({
  id: 'signOut',
  method: 'post',
  path: '/api/auth/sign-out',
  access: 'anyone',
  summary: 'Ends this session',
});
export const forgotPassword = route({
  id: 'forgotPassword',
  method: 'post',
  path: '/api/auth/forgot',
  access: 'anyone',
  summary: 'Mails a link to choose a new password; the same answer whether or not the account exists',
  body: ForgotPassword,
  status: 202,
});
export const resetPassword = route({
  id: 'resetPassword',
  method: 'post',
  path: '/api/auth/reset',
  access: 'anyone',
  summary: 'Chooses a new password with a mailed token; ends all sessions',
  body: ResetPassword,
});

export const getMe = route({
  id: 'getMe',
  method: 'get',
  path: '/api/me',
  access: SIGNED_IN,
  summary: 'Who I am',
  answer: SessionDto,
});
export const changeMe = route({
  id: 'changeMe',
  method: 'patch',
  path: '/api/me',
  access: SIGNED_IN,
  summary: 'Changes my name, kit or password',
  body: MeChange,
  answer: SessionDto,
});
export const exportMe = route({
  id: 'exportMe',
  method: 'get',
  path: '/api/me/export',
  access: SIGNED_IN,
  summary: 'All that is held on me, clips included, as a zip',
  produces: 'zip',
  status: 200,
});
export const eraseMe = route({
  id: 'eraseMe',
  method: 'delete',
  path: '/api/me',
  access: SIGNED_IN,
  summary: 'Erases me and my clips',
  body: z.object({ password: z.string().max(800) }).strict(),
});
export const listSessions = route({
  id: 'listSessions',
  method: 'get',
  path: '/api/me/sessions',
  access: SIGNED_IN,
  summary: 'Where I am signed in',
  answer: z.object({ items: z.array(PublicSessionDto) }),
});
export const endSession = route({
  id: 'endSession',
  method: 'delete',
  path: '/api/me/sessions/:id',
  access: SIGNED_IN,
  summary: 'Ends one of my sessions',
  params: id,
});

export const listPeople = route({
  id: 'listPeople',
  method: 'get',
  path: '/api/people',
  access: STAFF,
  summary: 'Everyone of the gym',
  answer: z.object({ items: z.array(UserDto), invitations: z.array(InvitationDto) }),
});
export const changePerson = route({
  id: 'changePerson',
  method: 'patch',
  path: '/api/people/:id',
  access: OWNER,
  summary: 'Changes a role, or deactivates or reactivates an account',
  params: id,
  body: PersonChange,
  answer: UserDto,
});
export const recordGuardianConsent = route({
  id: 'recordGuardianConsent',
  method: 'post',
  path: '/api/people/:id/guardian-consent',
  access: STAFF,
  summary: 'Records the consent of the guardian of a member under 18',
  params: id,
  body: GuardianConsent,
  status: 201,
  answer: UserDto,
  creates: true,
});

export const invite = route({
  id: 'invite',
  method: 'post',
  path: '/api/invitations',
  access: STAFF,
  summary: 'Invites by mail: a coach members, the owner anyone',
  body: NewInvitation,
  status: 201,
  answer: InvitationDto,
  creates: true,
});
export const withdrawInvitation = route({
  id: 'withdrawInvitation',
  method: 'delete',
  path: '/api/invitations/:id',
  access: STAFF,
  summary: 'Withdraws an invitation that was not accepted yet',
  params: id,
});
export const getInvitation = route({
  id: 'getInvitation',
  method: 'get',
  path: '/api/invitations/:token',
  access: 'anyone',
  summary: 'What an invitation says',
  params: token,
  answer: InvitationDto,
});
export const acceptInvitation = route({
  id: 'acceptInvitation',
  method: 'post',
  path: '/api/invitations/:token/accept',
  access: 'anyone',
  summary: 'Accepts an invitation and signs in',
  params: token,
  body: AcceptInvitation,
  status: 201,
  answer: SessionDto,
});

export const getGym = route({
  id: 'getGym',
  method: 'get',
  path: '/api/gym',
  access: SIGNED_IN,
  summary: 'The gym and its promise',
  answer: GymDto,
});
export const changeGym = route({
  id: 'changeGym',
  method: 'patch',
  path: '/api/gym',
  access: OWNER,
  summary: 'Changes the gym',
  body: GymChange,
  answer: GymDto,
});
