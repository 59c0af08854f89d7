/** The IANA time zones that this browser knows, in order, with UTC; the browser's own zone is always among them. */
export function timeZoneNames(): readonly string[] {
  const own = Intl.DateTimeFormat().resolvedOptions().timeZone;
  return [...new Set([...Intl.supportedValuesOf('timeZone'), 'UTC', own])].sort();
}
