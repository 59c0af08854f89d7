import { describe, expect, it } from 'vitest';
import { NewPassword } from '../../contract';
import { weaknessOf } from './password-rules';

const CONTEXT = ['Slipway Strength', 'Maren Oduya', 'maren@slipway.example'];

describe('a new password', () => {
  it.each([
    ['14 characters', 'a'.repeat(14), false],
    ['15 characters with spaces', 'a boat on a sea', true],
    ['64 characters', 'x'.repeat(64), true],
    ['15 emoji, each one character', '🏋'.repeat(15), true],
    ['14 emoji', '🏋'.repeat(14), false],
  ])('of %s is judged by its code points (NIST SP 800-63B-4)', (_what, password, fits) => {
    expect(NewPassword.safeParse(password).success).toBe(fits);
  });

  it('is not trimmed: a space at the end counts', () => {
    expect(NewPassword.parse('fourteen chars ')).toBe('fourteen chars ');
  });

  it('needs no digit, capital or sign', () => {
    expect(weaknessOf('lanterns over the quiet slip', CONTEXT)).toBeNull();
  });

  it.each([['passwordpassword'], ['Correct Horse Battery Staple'], ['1q2w3e4r5t6y7u8i']])(
    'refuses %s, which guessers try first',
    (password) => {
      expect(weaknessOf(password, CONTEXT)).toContain('guessers try first');
    },
  );

  it.each([['aaaaaaaaaaaaaaaaaa'], ['abcabcabcabcabcabc'], ['qwertyuiopasdfghj']])(
    'refuses the pattern %s',
    (password) => {
      expect(weaknessOf(password, CONTEXT)).toContain('pattern');
    },
  );

  it.each([['slipwaystrength2026'], ['Maren Oduya Maren 1'], ['midfoot midfoot 26']])(
    'refuses %s, mostly known words (ASVS 6.2.11)',
    (password) => {
      expect(weaknessOf(password, CONTEXT)).not.toBeNull();
    },
  );

  it('allows a known word within enough of one’s own', () => {
    expect(weaknessOf('strength comes from herring', CONTEXT)).toBeNull();
  });
});
