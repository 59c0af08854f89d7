import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import type { RouteDescriptor } from '../../server/contract/route';
import { hashSecret, newId, newSecret } from '../../server/platform/ids';
import { createPasswordHasher } from '../../server/platform/passwords';
import { openScene, videoBytes, type Scene, type ScenePerson } from './support/scene';

const START = new Date('2026-12-01T10:00:00.000Z');

/** Real things of one gym, for the parameters of a call. */
interface World {
  readonly member: ScenePerson;
  readonly coach: ScenePerson;
  readonly owner: ScenePerson;
  readonly liftId: string;
  readonly assignmentId: string;
  readonly takeId: string;
  readonly clipId: string;
  readonly commentId: string;
  readonly measureId: string;
  readonly invitationId: string;
  readonly token: string;
}

type Sent = Readonly<Record<string, unknown>>;
interface Recipe {
  /** The thing that stands for `:id`; its other parameters. */
  readonly params?: (world: World) => Readonly<Record<string, string>>;
  readonly query?: (world: World) => string;
  readonly body?: (world: World) => Sent;
}

const take = (world: World) => ({ id: world.takeId });
const clip = (world: World) => ({ id: world.clipId });
const pair = { email: 'nobody@granite.example', password: 'seven quiet herons at dawn' };

/** How to call each route with things of a world; a route that is missing here fails the test. */
const RECIPES: Readonly<Record<string, Recipe>> = {
  openGym: {
    body: () => ({
      ...pair,
      email: `${newId()}@granite.example`,
      gymName: 'Granite',
      timeZone: 'UTC',
      name: 'Runa',
    }),
  },
  signIn: { body: () => pair },
  refresh: {},
  signOut: {},
  forgotPassword: { body: () => ({ email: pair.email }) },
  resetPassword: { body: () => ({ token: 'unknown', password: pair.password }) },
  getMe: {},
  changeMe: { body: () => ({ kit: 'One bell' }) },
  exportMe: {},
  eraseMe: { body: () => ({ password: 'not it' }) },
  listSessions: {},
  endSession: { params: (world) => ({ id: world.member.sessionId }) },
  listPeople: {},
  changePerson: { params: (world) => ({ id: world.member.id }), body: () => ({ active: true }) },
  recordGuardianConsent: {
    params: (world) => ({ id: world.member.id }),
    body: () => ({ guardianName: 'Ann' }),
  },
  invite: { body: () => ({ email: `${newId()}@granite.example`, name: 'New', role: 'member' }) },
  withdrawInvitation: { params: (world) => ({ id: world.invitationId }) },
  getInvitation: { params: (world) => ({ token: world.token }) },
  acceptInvitation: {
    params: (world) => ({ token: world.token }),
    body: () => ({ password: pair.password }),
  },
  getGym: {},
  changeGym: { body: () => ({ promiseHours: 6 }) },
  listLifts: {},
  createLift: {
    body: () => ({ name: newId(), pattern: 'squat', brief: { views: ['side'], repsMin: 1, repsMax: 2 } }),
  },
  getLift: { params: (world) => ({ id: world.liftId }) },
  changeLift: { params: (world) => ({ id: world.liftId }), body: () => ({ tempo: '30X0' }) },
  listAssignments: {},
  createAssignment: {
    body: (world) => ({ liftId: world.liftId, title: 'Film it', audience: { all: true } }),
  },
  getAssignment: { params: (world) => ({ id: world.assignmentId }) },
  closeAssignment: { params: (world) => ({ id: world.assignmentId }) },
  reopenAssignment: { params: (world) => ({ id: world.assignmentId }) },
  createTake: { params: (world) => ({ id: world.assignmentId }), body: () => ({}) },
  changeTake: { params: take, body: () => ({ note: 'Later' }) },
  uploadClip: { params: (world) => ({ id: world.takeId, view: 'side' }) },
  removeClip: { params: clip },
  changeClip: { params: clip, body: () => ({ trim: { startMs: 0, endMs: 2000 } }) },
  submitTake: { params: take },
  withdrawTake: { params: take },
  retryTake: { params: take },
  getTake: { params: take },
  listTakes: {},
  markRead: { params: take },
  getProgress: { query: (world) => `?memberId=${world.member.id}` },
  getClipMedia: { params: (world) => ({ id: world.clipId, kind: 'proxy' }) },
  getClipThumbnail: { params: (world) => ({ id: world.clipId, n: '3' }) },
  getCaptions: { params: take, query: () => '?view=side' },
  getQueue: {},
  pickUp: { params: take },
  putBack: { params: take },
  getBoard: { params: take },
  addComment: { params: take, body: (world) => ({ clipId: world.clipId, atMs: 100, body: 'Here' }) },
  changeComment: { params: (world) => ({ id: world.commentId }), body: () => ({ body: 'There' }) },
  deleteComment: { params: (world) => ({ id: world.commentId }) },
  putMarks: { params: take, body: () => ({ marks: [] }) },
  addMeasure: {
    params: take,
    body: (world) => ({
      clipId: world.clipId,
      atMs: 100,
      kind: 'lean',
      points: [
        [0.4, 0.8],
        [0.5, 0.2],
      ],
    }),
  },
  deleteMeasure: { params: (world) => ({ id: world.measureId }) },
  putRepMarks: { params: clip, body: () => ({ marks: [] }) },
  putDraft: { params: take, body: () => ({ topCue: 'Sit', composer: '' }) },
  sendAnswer: { params: take, body: () => ({ topCue: 'Sit back', call: 'go' }) },
  addReply: { params: take, body: () => ({ body: 'Thank you' }) },
  getTurnaround: {},
  getTurnaroundCsv: {},
  getFaultSummary: {},
  streamEvents: {},
  listNotifications: {},
  readNotifications: { body: () => ({}) },
  getMailbox: {},
  getDemo: {},
  getHealth: {},
  getMetrics: {},
  getOpenApi: {},
};

let scene: Scene;
let world: World;
let stranger: World;
let passwordHash: string;

async function makeWorld(): Promise<World> {
  const gym = await scene.gym();
  const [member, coach, owner] = [
    await scene.person(gym, 'member', { password_hash: passwordHash }),
    await scene.person(gym, 'coach', { password_hash: passwordHash }),
    await scene.person(gym, 'owner', { password_hash: passwordHash }),
  ];
  const lift = await scene.lift(gym);
  const assignmentId = await scene.assignment(gym, lift, coach);
  const takeId = await scene.waitingTake(member, assignmentId);
  const at = `/api/takes/${takeId}`;
  await scene.call(coach, 'POST', `${at}/pick-up`);
  const { body: board } = await scene.call<{ clips: { id: string; view: string }[] }>(
    coach,
    'GET',
    `${at}/board`,
  );
  const clipId = board.clips.find((one) => one.view === 'side')?.id ?? '';
  const comment = await scene.call<{ id: string }>(coach, 'POST', `${at}/comments`, {
    clipId,
    atMs: 100,
    body: 'A',
  });
  const measure = await scene.call<{ id: string }>(coach, 'POST', `${at}/measures`, {
    clipId,
    atMs: 100,
    kind: 'lean',
    points: [
      [0.4, 0.8],
      [0.5, 0.2],
    ],
  });
  const token = newSecret();
  const invitationId = newId();
  await scene.database('invitations').insert({
    id: invitationId,
    gym_id: gym.id,
    token_hash: hashSecret(token),
    email: `${invitationId}@granite.example`,
    name: 'Invited',
    role: 'member',
    invited_by: owner.id,
    created_at: scene.now(),
    expires_at: new Date(scene.now().getTime() + 86_400_000),
  });
  return {
    ...{ member, coach, owner, assignmentId, takeId, clipId, invitationId, token },
    liftId: lift.id,
    commentId: comment.body.id,
    measureId: measure.body.id,
  };
}

beforeAll(async () => {
  scene = await openScene(START);
  passwordHash = await createPasswordHasher(256, 1).hash(pair.password);
  world = await makeWorld();
  stranger = await makeWorld();
});
afterAll(() => scene.close());

function recipeOf(route: RouteDescriptor): Recipe {
  const recipe = RECIPES[route.id];
  if (!recipe) throw new Error(`${route.id} has no recipe: say how it is called`);
  return recipe;
}

/** Calls a route with the things of a world. @param who nobody when null */
async function statusOf(route: RouteDescriptor, who: ScenePerson | null, things: World): Promise<number> {
  const { params, query, body } = recipeOf(route);
  const path = Object.entries(params?.(things) ?? {}).reduce(
    (left, [name, value]) => left.replace(`:${name}`, value),
    route.path,
  );
  if (/:[a-z]/.test(path)) throw new Error(`the recipe of ${route.id} leaves ${path}`);
  const pass = who ? scene.headers(who) : { cookie: 'XSRF-TOKEN=token', 'x-xsrf-token': 'token' };
  const headers = new Headers(pass);
  let sent: string | FormData | undefined;
  if (route.upload) {
    sent = new FormData();
    sent.append('file', new Blob([new Uint8Array(videoBytes(4000))], { type: 'video/mp4' }), 'clip.mp4');
  } else if (body) {
    sent = JSON.stringify(body(things));
    headers.set('content-type', 'application/json');
  }
  const ending = new AbortController();
  const response = await fetch(`${scene.baseUrl}${path}${query?.(things) ?? ''}`, {
    method: route.method.toUpperCase(),
    headers,
    signal: ending.signal,
    ...(sent === undefined ? {} : { body: sent }),
  });
  // A stream of events has no end of its own.
  if (route.produces === 'event-stream') ending.abort();
  else await response.arrayBuffer();
  return response.status;
}

const ROLES = ['member', 'coach', 'owner'] as const;

describe('every registered route', () => {
  it('is known here, and nothing here is unknown', () => {
    expect(scene.routes.map((route) => route.id).sort()).toEqual(Object.keys(RECIPES).sort());
  });

  it('asks nobody in who is signed out, but where anyone may call', async () => {
    for (const route of scene.routes.filter((one) => one.access !== 'anyone')) {
      expect([route.id, await statusOf(route, null, world)]).toEqual([route.id, 401]);
    }
  });

  it('refuses the roles it does not name', async () => {
    for (const route of scene.routes) {
      if (route.access === 'anyone') continue;
      for (const role of ROLES.filter((one) => !route.access.includes(one))) {
        expect([route.id, role, await statusOf(route, world[role], world)]).toEqual([route.id, role, 403]);
      }
    }
  });

  it('answers people of another gym as if its things were not there', async () => {
    for (const route of scene.routes) {
      const { params, query } = recipeOf(route);
      if (route.access === 'anyone' || (!params && route.id !== 'getProgress')) continue;
      expect(params !== undefined || query !== undefined).toBe(true);
      for (const role of ROLES.filter((one) => route.access.includes(one))) {
        expect([route.id, role, await statusOf(route, stranger[role], world)]).toEqual([route.id, role, 404]);
      }
    }
  });

  it('takes no thing of another gym in a body either', async () => {
    const route = scene.routes.find((one) => one.id === 'createAssignment');
    if (!route) throw new Error('there is no such route');
    expect(await statusOf(route, stranger.coach, world)).toBe(422);
    const foreignClip = await scene.call(stranger.coach, 'POST', `/api/takes/${stranger.takeId}/comments`, {
      clipId: world.clipId,
      atMs: 100,
      body: 'Not mine',
    });
    expect([404, 422]).toContain(foreignClip.status);
  });

  it('hides one member’s things from another', async () => {
    const other = await scene.person({ id: world.member.gymId }, 'member');
    for (const id of [
      'getTake',
      'changeTake',
      'submitTake',
      'withdrawTake',
      'retryTake',
      'markRead',
      'addReply',
    ]) {
      const route = scene.routes.find((one) => one.id === id);
      if (!route) throw new Error(`there is no ${id}`);
      expect([id, await statusOf(route, other, world)]).toEqual([id, 404]);
    }
    for (const id of [
      'getClipMedia',
      'getClipThumbnail',
      'uploadClip',
      'removeClip',
      'changeClip',
      'getProgress',
    ]) {
      const route = scene.routes.find((one) => one.id === id);
      if (!route) throw new Error(`there is no ${id}`);
      expect([id, await statusOf(route, other, world)]).toEqual([id, 404]);
    }
  });

  it('lets in the roles it names', { timeout: 180_000 }, async () => {
    for (const route of scene.routes) {
      if (route.access === 'anyone') continue;
      for (const role of route.access) {
        // Many of the calls use their things up.
        const fresh = route.method === 'get' ? world : await makeWorld();
        const status = await statusOf(route, fresh[role], fresh);
        expect([route.id, role, status < 500 && status !== 401 && status !== 403]).toEqual([
          route.id,
          role,
          true,
        ]);
      }
    }
  });
});
