import { argon2id as secondOpinion } from '@noble/hashes/argon2.js';
import argon2 from 'argon2';
import { describe, expect, it, vi } from 'vitest';
import { createPasswordHasher } from './passwords';

const FAST = [256, 2] as const;

describe('argon2id', () => {
  const RFC_9106 = '0d640df58d78766c08c037a34a8b53c9d01ef0452d75b65eb52520e96b01e659';
  const password = Buffer.alloc(32, 1);
  const salt = Buffer.alloc(16, 2);
  const secret = Buffer.alloc(8, 3);
  const data = Buffer.alloc(12, 4);

  it('gives the vector of RFC 9106 section 5.3, and so does a second program', async () => {
    const ours = await argon2.hash(password, {
      type: argon2.argon2id,
      version: 0x13,
      memoryCost: 32,
      timeCost: 3,
      parallelism: 4,
      hashLength: 32,
      salt,
      secret,
      associatedData: data,
      raw: true,
    });
    expect(ours.toString('hex')).toBe(RFC_9106);
    const theirs = secondOpinion(password, salt, {
      t: 3,
      m: 32,
      p: 4,
      dkLen: 32,
      key: secret,
      personalization: data,
    });
    expect(Buffer.from(theirs).toString('hex')).toBe(RFC_9106);
  });
});

describe('a password hash', () => {
  it('accepts and refuses against the reference encoding', async () => {
    const encoded = '$argon2id$v=19$m=256,t=2,p=1$c29tZXNhbHQ$nf65EOgLrQMR/uIPnA4rEsF5h7TKyQwu9U1bMCHGi/4';
    const hasher = createPasswordHasher(...FAST);
    expect(await hasher.verify(encoded, 'password')).toBe(true);
    expect(await hasher.verify(encoded, 'passwore')).toBe(false);
  });

  it('carries the memory and passes it was made with, and a salt of its own', async () => {
    const hasher = createPasswordHasher(47_104, 1);
    const first = await hasher.hash('a long walk to the rack');
    const second = await hasher.hash('a long walk to the rack');
    expect(first).toMatch(/^\$argon2id\$v=19\$m=47104,t=1,p=1\$/);
    expect(second).not.toBe(first);
  });

  it('is of the bytes a second program finds', async () => {
    const encoded = await createPasswordHasher(...FAST).hash('a long walk to the rack');
    const [, , , , salt = '', tag = ''] = encoded.split('$');
    const theirs = secondOpinion('a long walk to the rack', Buffer.from(salt, 'base64'), {
      t: 2,
      m: 256,
      p: 1,
      dkLen: 32,
    });
    expect(Buffer.from(theirs)).toEqual(Buffer.from(tag, 'base64'));
  });

  it('is the same for composed and decomposed letters, but exact otherwise', async () => {
    const hasher = createPasswordHasher(...FAST);
    const encoded = await hasher.hash('kn\u00e4b\u00f6j med st\u00e5ng');
    expect(await hasher.verify(encoded, 'kna\u0308bo\u0308j med sta\u030ang')).toBe(true);
    expect(await hasher.verify(encoded, 'kn\u00e4b\u00f6j med st\u00e5ng ')).toBe(false);
    expect(await hasher.verify(encoded, 'Kn\u00e4b\u00f6j med st\u00e5ng')).toBe(false);
  });

  it('is worked out for an unknown account too, with the same cost, and refused', async () => {
    const hasher = createPasswordHasher(...FAST);
    const verify = vi.spyOn(argon2, 'verify');
    try {
      expect(await hasher.verify(null, 'a long walk to the rack')).toBe(false);
      expect(verify).toHaveBeenCalledTimes(1);
      expect(verify.mock.calls[0]?.[0]).toMatch(/^\$argon2id\$v=19\$m=256,t=2,p=1\$/);
    } finally {
      verify.mockRestore();
    }
  });
});
