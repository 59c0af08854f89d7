const PARTS: Intl.DateTimeFormatOptions = {
  year: 'numeric',
  month: '2-digit',
  day: '2-digit',
  hour: '2-digit',
  minute: '2-digit',
  hourCycle: 'h23',
};

/** An instant on a zone's wall clock as a date-and-time field holds it: `2026-12-03T18:00`. */
export function wallTime(atMs: number, zone: string): string {
  const parts = new Intl.DateTimeFormat('en-CA', { ...PARTS, timeZone: zone }).formatToParts(atMs);
  const part = (type: Intl.DateTimeFormatPartTypes): string =>
    parts.find((each) => each.type === type)?.value ?? '';
  return `${part('year')}-${part('month')}-${part('day')}T${part('hour')}:${part('minute')}`;
}

/**
 * The instant at which a zone's wall clock shows `wall`, epoch ms; NaN when `wall` is no date and time. A time that
 * the clock skips becomes the one an hour later; of a time that comes twice, one of the two.
 */
export function instantOfWall(wall: string, zone: string): number {
  // Browsers read more than was meant as a date, so the form is checked first.
  if (!/^\d{4}-\d\d-\d\dT\d\d:\d\d$/.test(wall)) return Number.NaN;
  const asUtcMs = Date.parse(`${wall}:00Z`);
  if (Number.isNaN(asUtcMs)) return Number.NaN;
  const offsetAt = (atMs: number): number => Date.parse(`${wallTime(atMs, zone)}:00Z`) - atMs;
  const guessMs = asUtcMs - offsetAt(asUtcMs);
  return asUtcMs - offsetAt(guessMs);
}
