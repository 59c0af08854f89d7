import type { TurnaroundDto } from '@contract';

/** Which takes the figures are about. Days are `YYYY-MM-DD` on the gym's calendar, both inclusive. */
export interface TurnaroundFilter {
  from: string | null;
  to: string | null;
  coachId: string | null;
  liftId: string | null;
  clock: TurnaroundDto['clock'];
}

/** The page's part of the address. */
export interface TurnaroundAddress {
  period: string | undefined;
  from: string | undefined;
  to: string | undefined;
  coach: string | undefined;
  lift: string | undefined;
  clock: string | undefined;
}

/** Lengths that can be chosen, in days; any other period is given by its days. */
export const PERIODS = ['7', '30', '90', '365'] as const;
export type Period = (typeof PERIODS)[number] | 'days';
const USUAL_PERIOD = '90';

const DAY_MS = 86_400_000;
const DAY = /^\d{4}-\d{2}-\d{2}$/;

function isDay(value: string | undefined): value is string {
  return value !== undefined && DAY.test(value) && !Number.isNaN(Date.parse(value));
}

/** The calendar day of an instant in a zone. */
export function dayIn(atMs: number, zone: string): string {
  return new Intl.DateTimeFormat('en-CA', {
    timeZone: zone,
    year: 'numeric',
    month: '2-digit',
    day: '2-digit',
  }).format(atMs);
}

/** The day so many days before another. */
export function daysBefore(day: string, days: number): string {
  return new Date(Date.parse(`${day}T00:00:00Z`) - days * DAY_MS).toISOString().slice(0, 10);
}

/** The period chosen in an address; the last ninety days unless it says otherwise. */
export function periodOf({ period, from, to }: TurnaroundAddress): Period {
  if (isDay(from) || isDay(to)) return 'days';
  return PERIODS.find((one) => one === period) ?? USUAL_PERIOD;
}

/** What an address asks for; what is no day or no clock of ours is passed over. */
export function filterOf(address: TurnaroundAddress, today: string): TurnaroundFilter {
  const { from, to, coach, lift, clock } = address;
  const period = periodOf(address);
  return {
    from: period === 'days' ? (isDay(from) ? from : null) : daysBefore(today, Number(period) - 1),
    to: period === 'days' ? (isDay(to) ? to : null) : today,
    coachId: coach || null,
    liftId: lift || null,
    clock: clock === 'coaching' ? 'coaching' : 'wall',
  };
}

/** What stands in the address for a period; the usual one leaves it bare. */
export function addressOf(period: Period, filter: TurnaroundFilter): Record<string, string | null> {
  if (period === 'days') return { period: null, from: filter.from, to: filter.to };
  return { period: period === USUAL_PERIOD ? null : period, from: null, to: null };
}
