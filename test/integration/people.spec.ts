import { afterAll, beforeAll, beforeEach, describe, expect, it } from 'vitest';
import type { InvitationDto, SessionDto, UserDto } from '../../server/contract';
import { Caller } from '../support/caller';
import { openScene, type Scene, type SceneGym, type ScenePerson } from './support/scene';

const START = new Date('2026-12-01T10:00:00.000Z');
const DAY = 86_400_000;
const PASSWORD = 'lanterns over wet planks';

let scene: Scene;
let gym: SceneGym;
let member: ScenePerson;
let coach: ScenePerson;
let owner: ScenePerson;
let serial = 0;

beforeAll(async () => {
  scene = await openScene(START);
});
afterAll(() => scene.close());
beforeEach(async () => {
  gym = await scene.gym();
  member = await scene.person(gym, 'member');
  coach = await scene.person(gym, 'coach');
  owner = await scene.person(gym, 'owner');
});

const newAddress = () => `invited${(serial += 1)}@norrhaven.example`;
const invite = (who: ScenePerson, email: string, role = 'member') =>
  scene.call<InvitationDto>(who, 'POST', '/api/invitations', { email, name: 'Idun Falkenberg', role });
/** The token in the newest mail that waits to be sent to an address. */
async function tokenFor(email: string): Promise<string> {
  const [job]: { payload: { text: string } }[] = await scene
    .database('jobs')
    .where('type', 'mail.send')
    .whereRaw("JSON_VALUE(payload, '$.to') = ?", [email])
    .orderBy('id', 'desc');
  return /\/invitation\/([\w-]+)/.exec(job?.payload.text ?? '')?.[1] ?? '';
}
const accept = (caller: Caller, token: string, more = {}) =>
  caller.call('POST', `/api/invitations/${token}/accept`, { password: PASSWORD, ...more });
const problem = (code: string) => ({ type: `urn:midfoot:problem:${code}` });
const change = (who: ScenePerson, id: string, to: unknown) =>
  scene.call<UserDto>(who, 'PATCH', `/api/people/${id}`, to);

describe('inviting', () => {
  it('is for members by a coach, for anyone by the owner, for nobody by a member', async () => {
    expect((await invite(coach, newAddress())).status).toBe(201);
    expect((await invite(coach, newAddress(), 'coach')).status).toBe(403);
    expect((await invite(coach, newAddress(), 'owner')).status).toBe(403);
    expect((await invite(owner, newAddress(), 'coach')).status).toBe(201);
    expect((await invite(owner, newAddress(), 'owner')).status).toBe(201);
    expect((await invite(member, newAddress())).status).toBe(403);
  });

  it('is told to staff, without the token', async () => {
    const email = newAddress();
    const invited = await invite(coach, email);
    expect(invited.body).toMatchObject({ email, role: 'member', invitedBy: coach.name, acceptedAt: null });
    expect(invited.text).not.toContain('oken');
    expect(invited.text).not.toContain(await tokenFor(email));
    const people = await scene.call<{ invitations: InvitationDto[] }>(owner, 'GET', '/api/people');
    expect(people.body.invitations.map((one) => one.id)).toEqual([invited.body.id]);
  });

  it('lets the invited in, who are signed in at once with the role they were given', async () => {
    const email = newAddress();
    await invite(coach, email);
    const token = await tokenFor(email);
    const caller = new Caller(scene.baseUrl);
    expect(await caller.get<InvitationDto>(`/api/invitations/${token}`)).toMatchObject({
      email,
      gymName: 'Ironbirch Barbell',
    });
    const accepted = await accept(caller, token, { bornOn: '1990-04-02' });
    expect(accepted.status).toBe(201);
    expect(accepted.body).toMatchObject({
      user: { email, role: 'member', gymId: gym.id, bornOn: '1990-04-02' },
    });
    expect((await caller.get<SessionDto>('/api/me')).user.email).toBe(email);
    const elsewhere = await new Caller(scene.baseUrl).signIn(email.toUpperCase(), PASSWORD);
    expect(elsewhere.user.email).toBe(email);
  });

  it('refuses a password that is easily guessed, and keeps the invitation', async () => {
    const email = newAddress();
    await invite(coach, email);
    const token = await tokenFor(email);
    const caller = new Caller(scene.baseUrl);
    expect(await accept(caller, token, { password: 'Ironbirch Barbell' })).toMatchObject({
      status: 400,
      body: { errors: [{ path: 'password' }] },
    });
    expect((await accept(caller, token)).status).toBe(201);
  });

  it('says of a token that is no longer good what became of it', async () => {
    const caller = new Caller(scene.baseUrl);
    const refusedAs = async (token: string, code: string) => {
      expect(await caller.call('GET', `/api/invitations/${token}`)).toMatchObject({
        status: 410,
        body: problem(code),
      });
      expect(await accept(caller, token)).toMatchObject({ status: 410, body: problem(code) });
    };
    const used = newAddress();
    await invite(coach, used);
    const usedToken = await tokenFor(used);
    await accept(new Caller(scene.baseUrl), usedToken);
    await refusedAs(usedToken, 'invitation-used');

    const withdrawn = newAddress();
    const { id } = (await invite(coach, withdrawn)).body;
    const withdrawnToken = await tokenFor(withdrawn);
    expect((await scene.call(coach, 'DELETE', `/api/invitations/${id}`)).status).toBe(204);
    expect((await scene.call(coach, 'DELETE', `/api/invitations/${id}`)).status).toBe(404);
    await refusedAs(withdrawnToken, 'invitation-withdrawn');

    const replaced = newAddress();
    await invite(coach, replaced);
    const first = await tokenFor(replaced);
    await invite(coach, replaced);
    await refusedAs(first, 'invitation-withdrawn');
    expect((await accept(new Caller(scene.baseUrl), await tokenFor(replaced))).status).toBe(201);

    const expired = newAddress();
    await invite(coach, expired);
    const expiredToken = await tokenFor(expired);
    scene.pass(7 * DAY - 1);
    expect((await caller.call('GET', `/api/invitations/${expiredToken}`)).status).toBe(200);
    scene.pass(1);
    await refusedAs(expiredToken, 'invitation-expired');

    expect((await caller.call('GET', '/api/invitations/never-given')).status).toBe(404);
  });

  it('is one account for one address', async () => {
    const email = newAddress();
    await invite(coach, email);
    const token = await tokenFor(email);
    const answers = await Promise.all([
      accept(new Caller(scene.baseUrl), token),
      accept(new Caller(scene.baseUrl), token),
    ]);
    expect(answers.map((answer) => answer.status).sort()).toEqual([201, 410]);
    expect(await invite(coach, email.toUpperCase())).toMatchObject({
      status: 409,
      body: problem('email-taken'),
    });

    // Two gyms may invite one address; whoever is accepted first has it.
    const wanted = newAddress();
    const otherCoach = await scene.person(await scene.gym(), 'coach');
    await invite(coach, wanted);
    const here = await tokenFor(wanted);
    await invite(otherCoach, wanted);
    const there = await tokenFor(wanted);
    expect((await accept(new Caller(scene.baseUrl), here)).status).toBe(201);
    expect(await accept(new Caller(scene.baseUrl), there)).toMatchObject({
      status: 409,
      body: problem('email-taken'),
    });
  });
});

describe('changing people', () => {
  it('ends sessions and puts back what was picked up when somebody is deactivated', async () => {
    const takeId = await scene.waitingTake(member, await scene.assignment(gym, await scene.lift(gym), coach));
    expect((await scene.call(coach, 'POST', `/api/takes/${takeId}/pick-up`)).status).toBe(200);
    expect(await change(owner, coach.id, { active: false })).toMatchObject({
      status: 200,
      body: { active: false },
    });
    expect((await scene.call(coach, 'GET', '/api/me')).status).toBe(401);
    expect(await scene.database('takes').where({ id: takeId })).toMatchObject([
      { state: 'waiting', picked_up_by: null, picked_up_until: null },
    ]);
    expect((await scene.call(owner, 'POST', `/api/takes/${takeId}/pick-up`)).status).toBe(200);
  });

  it('keeps those who were deactivated out until they are let in again', async () => {
    const email = newAddress();
    const person = await scene.person(gym, 'member', {
      email,
      password_hash: await scene.platform.passwords.hash(PASSWORD),
    });
    const signIn = () =>
      new Caller(scene.baseUrl).call('POST', '/api/auth/sign-in', { email, password: PASSWORD });
    expect((await signIn()).status).toBe(200);
    await change(owner, person.id, { active: false });
    expect((await signIn()).status).toBe(401);
    await change(owner, person.id, { active: true });
    expect((await signIn()).status).toBe(200);
  });

  it('leaves a gym an active owner', async () => {
    for (const to of [{ active: false }, { role: 'coach' }, { role: 'member' }]) {
      expect(await change(owner, owner.id, to)).toMatchObject({ status: 409, body: problem('last-owner') });
    }
    const second = await scene.person(gym, 'owner');
    const both = await Promise.all([
      change(owner, second.id, { role: 'coach' }),
      change(second, owner.id, { role: 'coach' }),
    ]);
    expect(both.filter((answer) => answer.status === 200)).toHaveLength(1);
    expect(await scene.database('users').where({ gym_id: gym.id, role: 'owner' })).toHaveLength(1);
  });

  it('applies a role at once, and takes what a coach held from a coach who becomes a member', async () => {
    const queueOf = async (who: ScenePerson) => (await scene.call(who, 'GET', '/api/queue')).status;
    const takeId = await scene.waitingTake(member, await scene.assignment(gym, await scene.lift(gym), coach));
    expect(await queueOf(member)).toBe(403);
    await change(owner, member.id, { role: 'coach' });
    expect(await queueOf(member)).toBe(200);
    await scene.call(coach, 'POST', `/api/takes/${takeId}/pick-up`);
    await change(owner, coach.id, { role: 'member' });
    expect(await queueOf(coach)).toBe(403);
    expect(await scene.database('takes').where({ id: takeId })).toMatchObject([{ picked_up_by: null }]);
  });

  it('is for the owner of the same gym', async () => {
    const stranger = await scene.person(await scene.gym(), 'owner');
    expect((await change(coach, member.id, { role: 'coach' })).status).toBe(403);
    expect((await change(member, member.id, { role: 'owner' })).status).toBe(403);
    expect((await change(stranger, member.id, { role: 'coach' })).status).toBe(404);
  });
});

describe('a member under 18', () => {
  it('is seen by coaches when a guardian’s consent is recorded', async () => {
    const young = await scene.person(gym, 'member');
    const assignmentId = await scene.assignment(gym, await scene.lift(gym), coach);
    const takeId = await scene.waitingTake(young, assignmentId);
    await scene.database('users').where({ id: young.id }).update({ born_on: '2011-06-01' });
    // Nothing more can be handed in, and what was handed in before the age was known is not shown.
    await expect(scene.waitingTake(young, assignmentId)).rejects.toThrow('guardian-consent');
    const board = async () => (await scene.call(coach, 'GET', `/api/takes/${takeId}/board`)).status;
    const consent = (who: ScenePerson, id: string) =>
      scene.call<UserDto>(who, 'POST', `/api/people/${id}/guardian-consent`, {
        guardianName: 'Tove Falkenberg',
      });
    expect(await board()).toBe(403);
    expect((await consent(young, young.id)).status).toBe(403);
    expect(await consent(coach, young.id)).toMatchObject({
      status: 201,
      body: {
        needsGuardianConsent: false,
        guardianConsent: { guardianName: 'Tove Falkenberg', at: scene.now().toISOString() },
      },
    });
    expect(await board()).toBe(200);
    expect((await consent(coach, owner.id)).status).toBe(422);
  });
});
