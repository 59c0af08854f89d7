import { describe, expect, it } from 'vitest';
import { queryOf } from './turnaround-api';
import {
  addressOf,
  dayIn,
  daysBefore,
  filterOf,
  periodOf,
  type TurnaroundAddress,
} from './turnaround-filter';

const BARE: TurnaroundAddress = {
  period: undefined,
  from: undefined,
  to: undefined,
  coach: undefined,
  lift: undefined,
  clock: undefined,
};
const TODAY = '2026-12-01';

describe('the filter of turnaround', () => {
  it('takes the last ninety days when the address is bare', () => {
    expect(filterOf(BARE, TODAY)).toEqual({
      from: '2026-09-03',
      to: '2026-12-01',
      coachId: null,
      liftId: null,
      clock: 'wall',
    });
  });

  it('reads a period, days, a coach, a lift and the clock', () => {
    expect(filterOf({ ...BARE, period: '7', coach: 'c', lift: 'l', clock: 'coaching' }, TODAY)).toEqual({
      from: '2026-11-25',
      to: '2026-12-01',
      coachId: 'c',
      liftId: 'l',
      clock: 'coaching',
    });
    expect(filterOf({ ...BARE, from: '2026-01-05' }, TODAY)).toMatchObject({ from: '2026-01-05', to: null });
  });

  it('passes over what is no day, no period and no clock', () => {
    const odd = { ...BARE, period: '8', from: 'soon', to: '2026-13-40', clock: 'moon' };
    expect(periodOf(odd)).toBe('90');
    expect(filterOf(odd, TODAY)).toEqual(filterOf(BARE, TODAY));
  });

  it('comes back from the address it makes', () => {
    const filter = filterOf({ ...BARE, period: '30' }, TODAY);
    expect(addressOf('30', filter)).toEqual({ period: '30', from: null, to: null });
    expect(addressOf('90', filter)).toEqual({ period: null, from: null, to: null });
    const days = addressOf('days', filter);
    expect(
      filterOf({ ...BARE, from: days['from'] ?? undefined, to: days['to'] ?? undefined }, TODAY),
    ).toEqual(filter);
  });

  it('asks the server for what is chosen and nothing else', () => {
    const query = queryOf(filterOf({ ...BARE, from: '2026-01-05', lift: 'l' }, TODAY)).toString();
    expect(query).toBe('clock=wall&from=2026-01-05&liftId=l');
  });

  it('counts days on the gym’s calendar', () => {
    expect(dayIn(Date.parse('2026-12-01T23:30:00Z'), 'Europe/Stockholm')).toBe('2026-12-02');
    expect(daysBefore('2026-03-01', 1)).toBe('2026-02-28');
  });
});
