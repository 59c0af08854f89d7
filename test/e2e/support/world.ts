import { randomBytes } from 'node:crypto';
import { readFile } from 'node:fs/promises';
import type {
  AssignmentDto,
  BoardDto,
  InvitationDto,
  LiftDto,
  MailboxDto,
  SessionDto,
  TakeDto,
} from '../../../server/contract';
import type { Caller } from '../../support/caller';
import { phoneClip } from './phone-clips';
import { caller } from './stage-access';

export interface Person {
  readonly name: string;
  readonly email: string;
  readonly password: string;
  readonly id: string;
  /** The person's own way to the api, for what a test needs but does not try. */
  readonly api: Caller;
}

export interface World {
  readonly owner: Person;
  readonly coach: Person;
  readonly member: Person;
  readonly lift: LiftDto;
  readonly assignment: AssignmentDto;
}

export const PASSWORD = 'seven quiet herons at dawn';

export const address = (who: string) => `${who}.${randomBytes(4).toString('hex')}@slipway.example`;

/** The newest mail to an address; waits for it. */
export async function mailTo(
  api: Caller,
  email: string,
  subject: RegExp,
): Promise<MailboxDto['items'][number]> {
  for (let tries = 0; tries < 150; tries += 1) {
    const { items } = await api.get<MailboxDto>('/api/dev/mailbox');
    const mail = items.find((item) => item.to.includes(email) && subject.test(item.subject));
    if (mail) return mail;
    await new Promise((resolve) => setTimeout(resolve, 200));
  }
  throw new Error(`No mail to ${email} with a subject like ${String(subject)} arrived within 30 s.`);
}

/** The one link of a mail, as a path of the client. */
export function linkOf(mail: { text: string }): string {
  const link = /https?:\/\/\S+/.exec(mail.text)?.[0];
  if (!link) throw new Error(`The mail has no link: ${mail.text}`);
  return link;
}

async function accepted(inviter: Caller, name: string, role: 'member' | 'coach'): Promise<Person> {
  const email = address(role);
  await inviter.ok<InvitationDto>('POST', '/api/invitations', { name, email, role });
  const token =
    linkOf(await mailTo(inviter, email, /invites you/))
      .split('/')
      .at(-1) ?? '';
  const api = caller();
  const { user } = await api.ok<SessionDto>('POST', `/api/invitations/${token}/accept`, {
    password: PASSWORD,
  });
  return { name, email, password: PASSWORD, id: user.id, api };
}

/** A gym with an owner, a coach, a member, one lift and one assignment, made through the api. */
export async function makeWorld(): Promise<World> {
  const ownerApi = caller();
  const email = address('owner');
  const opened = await ownerApi.ok<SessionDto>('POST', '/api/gyms', {
    gymName: 'Slipway Strength',
    timeZone: 'Europe/Stockholm',
    name: 'Wilma Achterberg',
    email,
    password: PASSWORD,
  });
  const owner = { name: 'Wilma Achterberg', email, password: PASSWORD, id: opened.user.id, api: ownerApi };
  const coach = await accepted(ownerApi, 'Maren Oduya', 'coach');
  const member = await accepted(ownerApi, 'Tove Lindqvist', 'member');
  const lift = await coach.api.ok<LiftDto>('POST', '/api/lifts', {
    name: 'Goblet squat',
    pattern: 'squat',
    brief: { views: ['front', 'side'], repsMin: 1, repsMax: 3 },
    tempo: '30X1',
    faults: [
      {
        name: 'Heels lift',
        phase: 'bottom',
        view: 'side',
        cue: 'Leave a full print on the floor',
        drill: 'Squat to a box, three slow',
      },
      { name: 'Knees fall in', phase: 'up', view: 'front', cue: 'Spread the floor apart', drill: null },
      {
        name: 'Bell drifts away',
        phase: 'down',
        view: 'side',
        cue: 'Keep the bell over the laces',
        drill: null,
      },
    ],
    scales: [
      { name: 'Squat to a box', level: 'easier', note: 'Box at knee height' },
      { name: 'Heels on a plate', level: 'same', note: '' },
    ],
  });
  const assignment = await coach.api.ok<AssignmentDto>('POST', '/api/assignments', {
    liftId: lift.id,
    title: 'Film your goblet squat before Thursday',
    load: '24 kg',
    reps: 8,
    rounds: 4,
    untilAnsweredScaleId: lift.scales[0]?.id,
    audience: { all: true },
  });
  return { owner, coach, member, lift, assignment };
}

/** A take of the member with small drawn clips, handed in and waiting. */
export async function filmedTake(member: Person, assignmentId: string): Promise<TakeDto> {
  const take = await member.api.ok<TakeDto>('POST', `/api/assignments/${assignmentId}/takes`, {
    load: '24 kg',
  });
  for (const view of take.views) {
    const bytes = await readFile(await phoneClip(`plain-${view}.mp4`));
    const sent = await member.api.upload(`/api/takes/${take.id}/clips/${view}`, new Uint8Array(bytes));
    if (sent.status !== 201) throw new Error(`the ${view} clip was answered ${String(sent.status)}`);
  }
  await member.api.ok('POST', `/api/takes/${take.id}/submit`);
  for (let tries = 0; tries < 300; tries += 1) {
    const now = await member.api.get<TakeDto>(`/api/takes/${take.id}`);
    if (now.state === 'waiting') return now;
    if (now.state !== 'processing') throw new Error(`the take is ${now.state}`);
    await new Promise((resolve) => setTimeout(resolve, 200));
  }
  throw new Error('the clips were not ready within a minute');
}

/** Answers a waiting take with a comment, marks and a request for another take. */
export async function answeredTake(coach: Person, take: TakeDto): Promise<void> {
  const at = (path: string) => `/api/takes/${take.id}/${path}`;
  await coach.api.ok('POST', at('pick-up'));
  const board = await coach.api.get<BoardDto>(at('board'));
  const side = board.clips.find((clip) => clip.view === 'side');
  const [fault] = board.lift.faults;
  if (!side || !fault) throw new Error('the take has no side clip, or its lift no fault');
  await coach.api.ok('POST', at('comments'), {
    clipId: side.id,
    atMs: 700,
    body: 'Here the heels leave the floor',
  });
  await coach.api.ok('PUT', at('marks'), {
    marks: board.lift.faults.map((one) =>
      one.id === fault.id
        ? { faultId: one.id, mark: 'seen', clipId: side.id, atMs: 700 }
        : { faultId: one.id, mark: 'clear' },
    ),
  });
  await coach.api.ok('POST', at('measures'), {
    clipId: side.id,
    atMs: 700,
    kind: 'angle',
    points: [
      [0.5, 0.3],
      [0.45, 0.5],
      [0.55, 0.65],
    ],
  });
  await coach.api.ok('POST', at('answer'), {
    topCue: fault.cue,
    call: 'scale',
    scaleId: board.lift.scales[0]?.id,
    refilm: { views: ['side'], note: 'Two slow ones' },
  });
}
