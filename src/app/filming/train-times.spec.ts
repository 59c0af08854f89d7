import { instantOfWall, wallTime } from '../shared/times/wall-time';
import { trainChoices } from './train-times';

const zone = 'Europe/Stockholm';
// Tuesday 1 December 2026, 13:00 in Stockholm (UTC+1 in winter).
const now = { nowMs: Date.parse('2026-12-01T12:00:00.000Z'), zone };

describe('when the lift is trained', () => {
  it('is offered as this evening, tomorrow, the day of the assignment and no rush', () => {
    expect(trainChoices('2026-12-03T17:00:00.000Z', now).map(({ label, at }) => [label, at])).toEqual([
      ['today 18:00', '2026-12-01T17:00:00.000Z'],
      ['tomorrow', '2026-12-02T17:00:00.000Z'],
      ['Thursday 18:00', '2026-12-03T17:00:00.000Z'],
      ['no rush', null],
    ]);
  });

  it('leaves this evening out once it is near', () => {
    const late = { nowMs: Date.parse('2026-12-01T16:30:00.000Z'), zone };
    expect(trainChoices(null, late).map(({ label }) => label)).toEqual(['tomorrow', 'no rush']);
  });

  it('does not offer one time twice, nor one that has passed', () => {
    expect(trainChoices('2026-12-02T17:00:00.000Z', now)).toHaveLength(3);
    expect(trainChoices('2026-11-30T17:00:00.000Z', now)).toHaveLength(3);
  });
});

describe('a time on the gym’s wall clock', () => {
  it('goes there and back', () => {
    expect(wallTime(Date.parse('2026-12-03T17:00:00.000Z'), zone)).toBe('2026-12-03T18:00');
    expect(instantOfWall('2026-12-03T18:00', zone)).toBe(Date.parse('2026-12-03T17:00:00.000Z'));
    expect(instantOfWall('2026-07-03T18:00', zone)).toBe(Date.parse('2026-07-03T16:00:00.000Z'));
  });

  // The European Union's clocks go forward at 01:00 UTC on the last Sunday of March (Directive 2000/84/EC).
  it('holds on the day when the clocks change', () => {
    expect(instantOfWall('2026-03-29T01:30', zone)).toBe(Date.parse('2026-03-29T00:30:00.000Z'));
    expect(instantOfWall('2026-03-29T03:30', zone)).toBe(Date.parse('2026-03-29T01:30:00.000Z'));
  });

  it('is no instant when it is no time', () => {
    expect(instantOfWall('', zone)).toBeNaN();
  });
});
