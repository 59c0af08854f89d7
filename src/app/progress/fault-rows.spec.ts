import { trendOf } from './fault-rows';

describe('what became of a fault', () => {
  it('is gone once it was seen and then clear', () => {
    expect(trendOf(['seen', 'clear'])).toBe('gone');
    expect(trendOf(['seen', null, 'clear', 'hidden'])).toBe('gone');
    expect(trendOf(['seen', 'clear', 'seen', 'clear'])).toBe('gone');
  });

  it('is still seen while no take was clear of it', () => {
    expect(trendOf(['seen'])).toBe('still-seen');
    expect(trendOf(['clear', 'seen'])).toBe('still-seen');
    expect(trendOf(['seen', 'hidden'])).toBe('still-seen');
  });

  it('came back when it was seen after it had cleared', () => {
    expect(trendOf(['seen', 'clear', 'seen'])).toBe('came-back');
  });

  it('was never seen where every mark that tells is clear', () => {
    expect(trendOf(['clear', 'hidden', 'clear'])).toBe('never-seen');
  });

  it('cannot be told from hidden marks', () => {
    expect(trendOf(['hidden', null])).toBe('cannot-tell');
    expect(trendOf([])).toBe('cannot-tell');
  });
});
