import { describe, expect, it } from 'vitest';
import { isUnderage } from './age';

describe('isUnderage', () => {
  it('ends at the eighteenth birthday', () => {
    expect(isUnderage('2008-12-02', new Date('2026-12-01T23:59:59Z'))).toBe(true);
    expect(isUnderage('2008-12-02', new Date('2026-12-02T00:00:00Z'))).toBe(false);
  });

  it('takes the first of March for someone born on a leap day, in a year without one', () => {
    expect(isUnderage('2008-02-29', new Date('2026-02-28T23:59:59Z'))).toBe(true);
    expect(isUnderage('2008-02-29', new Date('2026-03-01T00:00:00Z'))).toBe(false);
  });

  it('asks nothing of someone who gave no date', () => {
    expect(isUnderage(null, new Date('2026-12-01T00:00:00Z'))).toBe(false);
  });
});
