import { createHash, randomBytes } from 'node:crypto';
import { v7 } from 'uuid';

/** A new opaque, sortable identifier (UUID v7, RFC 9562). */
export function newId(): string {
  return v7();
}

/** A new secret of 256 bits, base64url; goes to its owner once and is stored only hashed. */
export function newSecret(): string {
  return randomBytes(32).toString('base64url');
}

/** What is stored of a secret: SHA-256, enough for a secret that cannot be guessed. */
export function hashSecret(secret: string): Buffer {
  return createHash('sha256').update(secret).digest();
}
