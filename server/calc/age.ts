/** Under this age a guardian must agree before anyone at the gym sees a member's clips. */
export const ADULT_YEARS = 18;

/**
 * Whether someone is under 18 on a calendar day. Both dates are `YYYY-MM-DD`; a birthday on 29 February is kept on
 * 1 March in other years.
 */
export function isMinor(bornOn: string, today: string): boolean {
  const comesOfAge = `${String(Number(bornOn.slice(0, 4)) + ADULT_YEARS).padStart(4, '0')}${bornOn.slice(4, 10)}`;
  return today < comesOfAge;
}
