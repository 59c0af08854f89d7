import { expect, it } from 'vitest';
import { isMinor } from './age';

it.each([
  ['2008-12-02', '2026-12-01', true],
  ['2008-12-01', '2026-12-01', false],
  ['1980-05-05', '2026-12-01', false],
  ['2008-02-29', '2026-02-28', true],
  ['2008-02-29', '2026-03-01', false],
])('born on %s, on %s a minor: %s', (bornOn, today, minor) => {
  expect(isMinor(bornOn, today)).toBe(minor);
});
