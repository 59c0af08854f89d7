import { promisedBy } from './promise';

const span = [{ from: '06:00', to: '20:00' }];
const gym = {
  promiseHours: 8,
  timeZone: 'Europe/Stockholm',
  coachingHours: { mon: span, tue: span, wed: span, thu: span, fri: span, sat: [], sun: [] },
};
// Tuesday 1 December 2026, 17:00 in Stockholm: three coaching hours are left that day, five fall on Wednesday.
const nowMs = Date.parse('2026-12-01T16:00:00.000Z');

describe('the promise', () => {
  it('runs in coaching hours', () => {
    expect(promisedBy(gym, null, nowMs)).toBe('2026-12-02T10:00:00.000Z');
  });

  it('is earlier when the member trains earlier', () => {
    expect(promisedBy(gym, '2026-12-01T19:00:00.000Z', nowMs)).toBe('2026-12-01T19:00:00.000Z');
    expect(promisedBy(gym, '2026-12-04T19:00:00.000Z', nowMs)).toBe('2026-12-02T10:00:00.000Z');
  });
});
