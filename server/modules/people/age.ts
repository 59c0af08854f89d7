const ADULT_YEARS = 18;

/**
 * Whether someone born on a date is under 18 at an instant, by the calendar in UTC.
 * @param bornOn `YYYY-MM-DD`, or null when not told
 */
export function isUnderage(bornOn: string | null, now: Date): boolean {
  if (!bornOn) return false;
  const [year = 0, month = 1, day = 1] = bornOn.split('-').map(Number);
  return now.getTime() < Date.UTC(year + ADULT_YEARS, month - 1, day);
}
