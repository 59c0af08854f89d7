import argon2 from 'argon2';
import { createHash } from 'node:crypto';

/** Hashing costs memory, so only this many run at once; the rest wait their turn. */
const PARALLEL = 2;

export interface PasswordHasher {
  hash(password: string): Promise<string>;
  /** Takes the same time when `encoded` is null (an unknown account) as for a wrong password. */
  verify(encoded: string | null, password: string): Promise<boolean>;
}

/** NFC first, so that the same password typed on two keyboards is one (NIST SP 800-63B). */
const normalise = (password: string) => password.normalize('NFC');

/**
 * argon2id at or above OWASP's floor (ASVS 5.0 appendix C: one lane, t = 1 needs m ≥ 47104 KiB).
 * @param memoryKiB memory per hash, KiB
 * @param passes number of passes
 */
export function createPasswordHasher(memoryKiB: number, passes: number): PasswordHasher {
  let running = 0;
  const waiting: (() => void)[] = [];
  const inTurn = async <T>(work: () => Promise<T>): Promise<T> => {
    if (running >= PARALLEL) await new Promise<void>((resolve) => waiting.push(resolve));
    else running += 1;
    try {
      return await work();
    } finally {
      const next = waiting.shift();
      if (next) next();
      else running -= 1;
    }
  };
  const options = { type: argon2.argon2id, memoryCost: memoryKiB, timeCost: passes, parallelism: 1 } as const;
  const hash = (password: string) => inTurn(() => argon2.hash(normalise(password), options));
  let decoy: Promise<string> | null = null;
  return {
    hash,
    async verify(encoded, password) {
      decoy ??= hash(createHash('sha256').update('nobody').digest('hex'));
      const against = encoded ?? (await decoy);
      const matches = await inTurn(() => argon2.verify(against, normalise(password)));
      return encoded !== null && matches;
    },
  };
}
