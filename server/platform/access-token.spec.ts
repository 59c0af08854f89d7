import { SignJWT, jwtVerify } from 'jose';
import jwt from 'jsonwebtoken';
import { generateKeyPairSync } from 'node:crypto';
import { describe, expect, it } from 'vitest';
import { ACCESS_SECONDS, readAccessToken, signAccessToken } from './access-token';

const SECRET = 'a secret of the tests that is long enough';
const KEY = new TextEncoder().encode(SECRET);
const NOW = new Date('2026-12-01T10:00:00.000Z');
const IAT = NOW.getTime() / 1000;
const WHO = { userId: 'user', gymId: 'gym', sessionId: 'session' };
const CLAIMS = { sub: 'user', gym: 'gym', sid: 'session', typ: 'access' };

/** A token made by the second program, right unless told otherwise. */
const foreign = (change: Record<string, unknown> = {}, alg = 'HS256', key: Uint8Array = KEY) =>
  new SignJWT({ ...CLAIMS, iss: 'midfoot', aud: 'midfoot-api', iat: IAT, exp: IAT + 600, ...change })
    .setProtectedHeader({ alg })
    .sign(key);
const read = (token: string, now = NOW) => readAccessToken(SECRET, token, now);

describe('the library that reads tokens', () => {
  const key = Buffer.from(
    'AyM1SysPpbyDfgZld3umj1qzKObwVMkoqQ-EstJQLr_T-1qS0gZH75aKtMN3Yj0iPS4hcgUuTwjAzZr1Z9CAow',
    'base64url',
  );
  const payload =
    'eyJpc3MiOiJqb2UiLA0KICJleHAiOjEzMDA4MTkzODAsDQogImh0dHA6Ly9leGFtcGxlLmNvbS9pc19yb290Ijp0cnVlfQ';
  const signature = 'dBjftJeZ4CVP-mB92K27uhbUJU1p1r_wW1gFWFOEjXk';
  const head = 'eyJ0eXAiOiJKV1QiLA0KICJhbGciOiJIUzI1NiJ9';
  const at = (clockTimestamp: number) => ({ algorithms: ['HS256' as const], clockTimestamp });

  it('accepts the vector of RFC 7515 A.1 until the second it expires', () => {
    const token = `${head}.${payload}.${signature}`;
    expect(jwt.verify(token, key, at(1_300_819_379))).toMatchObject({ iss: 'joe' });
    expect(() => jwt.verify(token, key, at(1_300_819_380))).toThrow(jwt.TokenExpiredError);
  });

  it('refuses the vector with another payload', () => {
    const eve = Buffer.from(Buffer.from(payload, 'base64url').toString().replace('joe', 'eve'));
    const token = `${head}.${eve.toString('base64url')}.${signature}`;
    expect(() => jwt.verify(token, key, at(1_300_819_379))).toThrow('invalid signature');
  });
});

describe('an access token', () => {
  it('is read back, and a second program agrees', async () => {
    const token = signAccessToken(SECRET, WHO, NOW);
    expect(read(token)).toEqual(WHO);
    const { payload, protectedHeader } = await jwtVerify(token, KEY, {
      algorithms: ['HS256'],
      issuer: 'midfoot',
      audience: 'midfoot-api',
      currentDate: NOW,
    });
    expect(protectedHeader.alg).toBe('HS256');
    expect(payload).toMatchObject({ ...CLAIMS, iat: IAT, exp: IAT + ACCESS_SECONDS });
  });

  it('is read when a second program made it with the same claims', async () => {
    expect(read(await foreign())).toEqual(WHO);
  });

  it('ends at its last second', () => {
    const token = signAccessToken(SECRET, WHO, NOW);
    expect(read(token, new Date(NOW.getTime() + ACCESS_SECONDS * 1000 - 1000))).toEqual(WHO);
    expect(read(token, new Date(NOW.getTime() + ACCESS_SECONDS * 1000))).toBeNull();
  });

  it.each([
    ['another issuer', { iss: 'somebody' }],
    ['another audience', { aud: 'somewhere' }],
    ['another type', { typ: 'refresh' }],
    ['no type', { typ: undefined }],
    ['no gym', { gym: undefined }],
    ['no session', { sid: undefined }],
  ])('is refused with %s', async (_, change) => {
    expect(read(await foreign(change))).toBeNull();
  });

  it('is refused with another key, or another algorithm of the same key', async () => {
    expect(read(await foreign({}, 'HS256', new TextEncoder().encode(`${SECRET}!`)))).toBeNull();
    const long = SECRET.padEnd(64, '.');
    const token = await foreign({}, 'HS512', new TextEncoder().encode(long));
    expect(readAccessToken(long, token, NOW)).toBeNull();
  });

  it('is refused unsigned, or signed with somebody’s own RSA key', () => {
    const claims = { ...CLAIMS, iss: 'midfoot', aud: 'midfoot-api', iat: IAT, exp: IAT + 600 };
    expect(read(jwt.sign(claims, '', { algorithm: 'none' }))).toBeNull();
    const { privateKey } = generateKeyPairSync('rsa', { modulusLength: 2048 });
    expect(read(jwt.sign(claims, privateKey, { algorithm: 'RS256' }))).toBeNull();
  });

  it('is refused when it is no token at all', () => {
    expect(read('')).toBeNull();
    expect(read('a.b.c')).toBeNull();
  });
});
