import jwt from 'jsonwebtoken';
import * as z from 'zod';

const ISSUER = 'midfoot';
const AUDIENCE = 'midfoot-api';
/** Life of an access token, seconds. */
export const ACCESS_SECONDS = 600;

const Claims = z.object({ sub: z.string(), gym: z.string(), sid: z.string(), typ: z.literal('access') });

export interface AccessClaims {
  readonly userId: string;
  readonly gymId: string;
  readonly sessionId: string;
}

/** Signs a short-lived access token: HS256, fixed issuer, audience and type. */
export function signAccessToken(secret: string, claims: AccessClaims, now: Date): string {
  const iat = Math.floor(now.getTime() / 1000);
  return jwt.sign(
    {
      sub: claims.userId,
      gym: claims.gymId,
      sid: claims.sessionId,
      typ: 'access',
      iat,
      exp: iat + ACCESS_SECONDS,
    },
    secret,
    {
      algorithm: 'HS256',
      issuer: ISSUER,
      audience: AUDIENCE,
    },
  );
}

/** Reads an access token, or null when its signature, algorithm, time, issuer, audience or type is not right. */
export function readAccessToken(secret: string, token: string, now: Date): AccessClaims | null {
  try {
    const payload = jwt.verify(token, secret, {
      algorithms: ['HS256'],
      issuer: ISSUER,
      audience: AUDIENCE,
      clockTimestamp: Math.floor(now.getTime() / 1000),
    });
    const claims = Claims.safeParse(payload);
    return claims.success
      ? { userId: claims.data.sub, gymId: claims.data.gym, sessionId: claims.data.sid }
      : null;
  } catch (error) {
    if (error instanceof jwt.JsonWebTokenError) return null;
    throw error;
  }
}
