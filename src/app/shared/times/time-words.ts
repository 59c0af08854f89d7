/** Times as people say them, in English, by `Intl` alone. Instants are epoch milliseconds; zones are IANA names. */

const SECOND_MS = 1_000;
const MINUTE_MS = 60 * SECOND_MS;
const HOUR_MS = 60 * MINUTE_MS;
const DAY_MS = 24 * HOUR_MS;

/** A length of time in at most two units, cut down to whole ones: `40 min`, `1 h 12 min`, `2 days 4 h`. */
export function durationWords(durationMs: number): string {
  const ms = Math.max(0, durationMs);
  if (ms < MINUTE_MS) return 'less than a minute';
  const minutes = Math.floor(ms / MINUTE_MS);
  if (ms < HOUR_MS) return `${minutes} min`;
  const hours = Math.floor(ms / HOUR_MS);
  if (ms < DAY_MS) return minutes % 60 === 0 ? `${hours} h` : `${hours} h ${minutes % 60} min`;
  const days = Math.floor(ms / DAY_MS);
  const dayWords = days === 1 ? '1 day' : `${days} days`;
  return hours % 24 === 0 ? dayWords : `${dayWords} ${hours % 24} h`;
}

/** A length of time under a day for a narrow column, hours and two-digit minutes: `0 h 40`, `3 h 05`. */
export function durationShort(durationMs: number): string {
  const minutes = Math.floor(Math.max(0, durationMs) / MINUTE_MS);
  return `${Math.floor(minutes / 60)} h ${String(minutes % 60).padStart(2, '0')}`;
}

/** How far an instant is from now: `just now`, `4 min ago`, `in 2 h`, `yesterday`, `9 days ago`. */
export function relativeWords(atMs: number, nowMs: number): string {
  const differenceMs = atMs - nowMs;
  const size = Math.abs(differenceMs);
  if (size < MINUTE_MS) return 'just now';
  if (size < DAY_MS) {
    const words = size < HOUR_MS ? durationWords(size) : `${Math.floor(size / HOUR_MS)} h`;
    return differenceMs < 0 ? `${words} ago` : `in ${words}`;
  }
  const format = new Intl.RelativeTimeFormat('en', { numeric: 'auto' });
  return format.format(Math.trunc(differenceMs / DAY_MS), 'day');
}

/** The clock at an instant in a zone, 24 hours: `18:00`. */
export function clockTime(atMs: number, zone: string): string {
  return new Intl.DateTimeFormat('en-GB', { timeZone: zone, hour: '2-digit', minute: '2-digit' }).format(
    atMs,
  );
}

/** The calendar day of an instant in a zone as a count of days, so that two days can be subtracted. */
function dayNumber(atMs: number, zone: string): number {
  const parts = new Intl.DateTimeFormat('en-CA', {
    timeZone: zone,
    year: 'numeric',
    month: '2-digit',
    day: '2-digit',
  }).format(atMs);
  return Date.parse(`${parts}T00:00:00Z`) / DAY_MS;
}

/** The day of an instant as it is said from today, in a zone: `today`, `tomorrow`, `Thursday`, `Thu 3 Dec`. */
export function dayWords(atMs: number, nowMs: number, zone: string): string {
  const away = dayNumber(atMs, zone) - dayNumber(nowMs, zone);
  if (away === 0) return 'today';
  if (away === 1) return 'tomorrow';
  if (away === -1) return 'yesterday';
  if (away > 1 && away < 7) {
    return new Intl.DateTimeFormat('en-GB', { timeZone: zone, weekday: 'long' }).format(atMs);
  }
  const isFar = Math.abs(away) > 180;
  return new Intl.DateTimeFormat('en-GB', {
    timeZone: zone,
    weekday: 'short',
    day: 'numeric',
    month: 'short',
    ...(isFar ? { year: 'numeric' } : {}),
  })
    .format(atMs)
    .replace(',', '');
}

/** Day and clock: `today 18:00`, `Thursday 18:00`, `Thu 3 Dec 18:00`. */
export function dayAndTime(atMs: number, nowMs: number, zone: string): string {
  return `${dayWords(atMs, nowMs, zone)} ${clockTime(atMs, zone)}`;
}

/** An instant in full, with the zone's name: `Thursday 3 December 2026 at 18:00 CET`. */
export function fullTime(atMs: number, zone: string): string {
  return new Intl.DateTimeFormat('en-GB', {
    timeZone: zone,
    weekday: 'long',
    day: 'numeric',
    month: 'long',
    year: 'numeric',
    hour: '2-digit',
    minute: '2-digit',
    timeZoneName: 'short',
  }).format(atMs);
}

/** An offset on a clip: `0:02.9`; with three digits `0:02.917`. Cut, not rounded, so that it never names a later frame. */
export function clipTime(atMs: number, digits: 1 | 3 = 1): string {
  const whole = Math.max(0, Math.floor(atMs));
  const minutes = Math.floor(whole / MINUTE_MS);
  const seconds = String(Math.floor((whole % MINUTE_MS) / SECOND_MS)).padStart(2, '0');
  const fraction = String(whole % SECOND_MS)
    .padStart(3, '0')
    .slice(0, digits);
  return `${minutes}:${seconds}.${fraction}`;
}
