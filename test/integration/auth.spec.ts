import { afterAll, afterEach, beforeAll, describe, expect, inject, it } from 'vitest';
import type { MailboxDto, SessionDto } from '../../server/contract';
import { newId } from '../../server/platform/ids';
import { startApp, type TestApp } from '../support/app';
import { Caller } from '../support/caller';
import { openScene, type Scene } from './support/scene';

const PASSWORD = 'seven quiet herons at dawn';
const OTHER = 'nine loud geese before noon';
const MINUTE = 60_000;
const DAY = 24 * 60 * MINUTE;

let scene: Scene;
beforeAll(async () => {
  scene = await openScene(new Date('2026-12-01T10:00:00.000Z'));
});
afterAll(() => scene.close());
// Tries from one address are counted together; each test begins with none.
afterEach(() => scene.database('rate_limits').delete());

const address = () => `${newId()}@granite.example`;
const newCaller = () => new Caller(scene.baseUrl);
const opening = (email: string) => ({
  gymName: 'Granite Cove Barbell',
  timeZone: 'Europe/Stockholm',
  name: 'Runa Eklund',
  email,
  password: PASSWORD,
});

async function opened() {
  const email = address();
  const caller = newCaller();
  const { user } = await caller.ok<SessionDto>('POST', '/api/gyms', opening(email));
  return { caller, email, user };
}
const me = async (caller: Caller) => (await caller.call('GET', '/api/me')).status;
const refresh = async (caller: Caller) => (await caller.call('POST', '/api/auth/refresh')).status;
const signIn = (email: string, password: string, caller = newCaller()) =>
  caller.call('POST', '/api/auth/sign-in', { email, password });
const setCookies = (headers: Headers) => headers.getSetCookie().filter((cookie) => /mf_/.test(cookie));

describe('opening a gym', () => {
  it('signs its owner in', async () => {
    const { caller, email } = await opened();
    expect(await caller.get('/api/me')).toMatchObject({
      user: { email, role: 'owner' },
      gym: { name: 'Granite Cove Barbell', timeZone: 'Europe/Stockholm' },
    });
  });

  it('tells a weak password and a bad time zone at their fields, and opens nothing', async () => {
    const email = address();
    const answer = async (change: object) =>
      (await newCaller().call('POST', '/api/gyms', { ...opening(email), ...change })) as {
        status: number;
        body: { errors?: { path: string }[] };
      };
    for (const [path, value] of [
      ['password', 'short'],
      ['password', 'passwordpassword'],
      ['password', 'granite cove barbell'],
      ['timeZone', 'Mars/Olympus'],
    ] as const) {
      const { status, body } = await answer({ [path]: value });
      expect([value, status, body.errors?.map((error) => error.path)]).toEqual([value, 400, [path]]);
    }
    expect(await scene.database('users').where({ email })).toEqual([]);
  });

  it('takes an address once', async () => {
    const { email } = await opened();
    expect((await newCaller().call('POST', '/api/gyms', opening(email.toUpperCase()))).status).toBe(409);
  });
});

describe('signing in', () => {
  it('answers an unknown address and a wrong password alike', async () => {
    const { email } = await opened();
    const [wrong, unknown] = [await signIn(email, OTHER), await signIn(address(), OTHER)];
    expect(wrong.status).toBe(401);
    expect(unknown.status).toBe(401);
    expect(unknown.body).toEqual(wrong.body);
  });

  it('takes the password as it is typed on another keyboard', async () => {
    const email = address();
    const password = 'fjorton små båtar på sjön';
    await newCaller().ok('POST', '/api/gyms', { ...opening(email), password: password.normalize('NFC') });
    expect((await signIn(email, password.normalize('NFD'))).status).toBe(200);
  });

  it('slows down after five wrong tries for one account, says how long, and locks nobody out', async () => {
    const { email } = await opened();
    for (let i = 0; i < 5; i += 1) expect((await signIn(email, OTHER)).status).toBe(401);
    const slowed = await signIn(email, PASSWORD);
    expect(slowed.status).toBe(429);
    expect(Number(slowed.headers.get('retry-after'))).toBeGreaterThan(0);
    await scene.database('rate_limits').delete();
    expect((await signIn(email, PASSWORD)).status).toBe(200);
  });

  it('is over when signed out, on the server too', async () => {
    const { caller } = await opened();
    const kept = new Map(caller.cookies);
    await caller.ok('POST', '/api/auth/sign-out');
    expect(await me(caller)).toBe(401);
    const thief = newCaller();
    for (const [name, value] of kept) thief.cookies.set(name, value);
    expect(await me(thief)).toBe(401);
    expect(await refresh(thief)).toBe(401);
  });
});

describe('a session', () => {
  it('is renewed by its refresh token when the access token has run out', async () => {
    const { caller } = await opened();
    scene.pass(11 * MINUTE);
    expect(await me(caller)).toBe(401);
    expect(await refresh(caller)).toBe(204);
    expect(await me(caller)).toBe(200);
  });

  it('takes a spent token for ten seconds, for two tabs, and ends at a later use', async () => {
    const { caller } = await opened();
    const tab = newCaller();
    for (const [name, value] of caller.cookies) tab.cookies.set(name, value);
    const late = newCaller();
    for (const [name, value] of caller.cookies) late.cookies.set(name, value);
    expect(await refresh(caller)).toBe(204);
    scene.pass(5_000);
    expect(await refresh(tab)).toBe(204);
    scene.pass(11_000);
    expect(await refresh(late)).toBe(401);
    expect(await refresh(caller)).toBe(401);
    expect(await me(caller)).toBe(401);
  });

  it('ends after thirty days without use', async () => {
    const { caller } = await opened();
    scene.pass(31 * DAY);
    expect(await refresh(caller)).toBe(401);
  });

  it('is listed and can be ended from another device', async () => {
    const { caller, email } = await opened();
    const phone = newCaller();
    await signIn(email, PASSWORD, phone);
    const { items } = await caller.get<{ items: { id: string; current: boolean }[] }>('/api/me/sessions');
    expect(items).toHaveLength(2);
    const other = items.find((one) => !one.current);
    await caller.ok('DELETE', `/api/me/sessions/${other?.id ?? ''}`);
    expect(await me(phone)).toBe(401);
    expect(await me(caller)).toBe(200);
  });

  it('needs the page’s own token for calls that change something', async () => {
    const { caller } = await opened();
    const call = (headers: Record<string, string>) =>
      caller.call('PATCH', '/api/me', { kit: 'One bell' }, headers);
    expect((await call({ 'X-XSRF-TOKEN': 'of-another-page' })).status).toBe(403);
    expect((await call({ 'Sec-Fetch-Site': 'cross-site' })).status).toBe(403);
    expect((await call({})).status).toBe(200);
  });
});

describe('changing the password', () => {
  it('needs the present one, and ends the other sessions', async () => {
    const { caller, email } = await opened();
    const phone = newCaller();
    await signIn(email, PASSWORD, phone);
    const change = (currentPassword: string) =>
      caller.call('PATCH', '/api/me', { currentPassword, password: OTHER });
    const refused = await change('not the present one');
    expect(refused.status).toBe(400);
    expect(refused.body).toMatchObject({ errors: [{ path: 'currentPassword' }] });
    expect((await change(PASSWORD)).status).toBe(200);
    expect(await me(caller)).toBe(200);
    expect(await me(phone)).toBe(401);
    expect((await signIn(email, PASSWORD)).status).toBe(401);
    expect((await signIn(email, OTHER)).status).toBe(200);
  });
});

describe('a forgotten password', () => {
  let app: TestApp;
  beforeAll(async () => {
    app = await startApp();
    await app.work();
  });
  afterAll(() => app.stop());
  afterEach(() => app.platform.database('rate_limits').delete());

  const tokensFor = async (email: string, count: number): Promise<string[]> => {
    for (let tries = 0; tries < 200; tries += 1) {
      const { items } = (await (await fetch(inject('services').mail.mailboxUrl)).json()) as MailboxDto;
      const found = items.filter((mail) => mail.to.includes(email) && /new password/.test(mail.subject));
      if (found.length >= count) return found.map((mail) => /\/reset\/(\S+)/.exec(mail.text)?.[1] ?? '');
      await new Promise((resolve) => setTimeout(resolve, 100));
    }
    throw new Error(`no link was mailed to ${email}`);
  };
  const reset = (token: string, password = OTHER) =>
    app.caller().call('POST', '/api/auth/reset', { token, password });
  const openedHere = async () => {
    const email = address();
    const caller = app.caller();
    await caller.ok('POST', '/api/gyms', opening(email));
    return { caller, email };
  };
  const forgot = async (email: string) =>
    (await app.caller().call('POST', '/api/auth/forgot', { email })).status;

  it('is answered alike whether or not the address has an account', async () => {
    const { email } = await openedHere();
    expect(await forgot(email)).toBe(202);
    expect(await forgot(address())).toBe(202);
  });

  it('is replaced by a mailed link that works once and signs every device out', async () => {
    const { caller, email } = await openedHere();
    await forgot(email);
    const [token = ''] = await tokensFor(email, 1);
    const weak = await reset(token, 'passwordpassword');
    expect(weak.body).toMatchObject({ errors: [{ path: 'password' }] });
    expect((await reset(token)).status).toBe(204);
    expect((await caller.call('GET', '/api/me')).status).toBe(401);
    expect((await app.caller().call('POST', '/api/auth/sign-in', { email, password: OTHER })).status).toBe(
      200,
    );
    const again = await reset(token, PASSWORD);
    expect([again.status, again.body]).toMatchObject([410, { type: 'urn:midfoot:problem:reset-used' }]);
  });

  it('keeps to the newest link, for one hour', async () => {
    const { email } = await openedHere();
    await forgot(email);
    const [first = ''] = await tokensFor(email, 1);
    await forgot(email);
    const second = (await tokensFor(email, 2)).find((token) => token !== first) ?? '';
    expect((await reset(first)).status).toBe(410);
    await app.platform.database('reset_tokens').update({ expires_at: new Date(Date.now() - 1000) });
    const late = await reset(second);
    expect([late.status, late.body]).toMatchObject([410, { type: 'urn:midfoot:problem:reset-expired' }]);
    expect((await reset('nobody-was-ever-given-this')).status).toBe(410);
  });
});

describe('the cookies', () => {
  it('are out of scripts’ reach and stay on this site', async () => {
    const answer = await newCaller().call('POST', '/api/gyms', opening(address()));
    const cookies = setCookies(answer.headers);
    expect(cookies).toHaveLength(2);
    for (const cookie of cookies) expect(cookie).toMatch(/Path=\/;.*HttpOnly;.*SameSite=Lax/);
  });

  it('over HTTPS are pinned to this host, and are taken away in a way that browsers accept', async () => {
    const app = await startApp({ secureCookies: true });
    try {
      const caller = app.caller();
      // The pair is Secure too; a browser on HTTPS sends it, and so does this caller.
      const answer = await caller.call('POST', '/api/gyms', opening(address()));
      const signedOut = await caller.call('POST', '/api/auth/sign-out');
      for (const cookie of [...setCookies(answer.headers), ...setCookies(signedOut.headers)]) {
        expect(cookie).toMatch(/^__Host-mf_/);
        expect(cookie).toMatch(/Path=\/;/);
        expect(cookie).toMatch(/HttpOnly; Secure/);
      }
      expect(setCookies(signedOut.headers)).toHaveLength(2);
    } finally {
      await app.stop();
    }
  });
});
