import { malformed } from '../../platform/errors';
import { COMMON_PASSWORDS } from './common-passwords';

/** Letters and digits alone, lower case: what a guesser tries first survives spaces and capitals. */
const bare = (value: string) =>
  value
    .normalize('NFKC')
    .toLowerCase()
    .replace(/[^\p{L}\p{N}]/gu, '');

/** How much of a password a word of the context may make up before the rest is too little to guess at. */
const OWN_CHARACTERS = 8;

const COMMON = new Set(COMMON_PASSWORDS.map(bare));

function isOnePatternRepeated(value: string): boolean {
  for (let length = 1; length <= Math.min(5, value.length / 3); length += 1) {
    const unit = value.slice(0, length);
    if (unit.repeat(Math.ceil(value.length / length)).startsWith(value)) return true;
  }
  return false;
}

const SEQUENCES = [
  '01234567890123456789',
  'abcdefghijklmnopqrstuvwxyz',
  'qwertyuiopasdfghjklzxcvbnm',
  '1qaz2wsx3edc4rfv5tgb6yhn',
];
const isSequence = (value: string) =>
  SEQUENCES.some((sequence) => sequence.includes(value) || [...sequence].reverse().join('').includes(value));

/**
 * Why a password is easily guessed, or null. Length is the contract's matter; there are no rules of composition
 * (NIST SP 800-63B-4; OWASP ASVS 5.0 6.2.4, 6.2.5, 6.2.11).
 * @param context words that a guesser knows: the gym's name, the person's name and address
 */
export function weaknessOf(password: string, context: readonly string[]): string | null {
  const value = bare(password);
  if (COMMON.has(value))
    return 'This password is on the lists that guessers try first. Use a few words of your own.';
  if (value.length > 0 && (isOnePatternRepeated(value) || isSequence(value))) {
    return 'This password repeats one pattern. Use a few words of your own.';
  }
  const words = [...context, 'midfoot', 'password']
    .flatMap((words_) => [words_, ...words_.split(/[\s@._-]+/)])
    .map(bare)
    .filter((word) => word.length >= 4);
  const rest = words
    .sort((a, b) => b.length - a.length)
    .reduce((left, word) => left.replaceAll(word, ''), value);
  if (rest !== value && rest.length < OWN_CHARACTERS) {
    return 'This password is mostly your name, your gym or your address. Use a few words of your own.';
  }
  return null;
}

/** @throws AppError 400, told at the field `password` */
export function mustBeGoodPassword(password: string, context: readonly string[]): void {
  const weakness = weaknessOf(password, context);
  if (weakness) throw malformed([{ path: 'password', message: weakness }]);
}
