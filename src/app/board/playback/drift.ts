/** What to do about a picture that runs ahead of the clock (positive drift) or behind it. */
export type DriftCorrection =
  { readonly kind: 'none' } | { readonly kind: 'rate'; readonly factor: number } | { readonly kind: 'seek' };

/** Beyond this a change of rate would take too long to be worth it, ms of the clip. */
export const SEEK_BEYOND_MS = 150;
/** A change of rate small enough not to be seen. */
export const RATE_CHANGE = 0.05;

/**
 * Keeps a player on the clock: within half a frame nothing, up to 150 ms a slightly other rate, beyond that a seek.
 * @param driftMs instant shown minus instant due, ms of the clip
 * @param frameMs length of a frame, ms
 */
export function correctDrift(driftMs: number, frameMs: number): DriftCorrection {
  const size = Math.abs(driftMs);
  if (size < frameMs / 2) return { kind: 'none' };
  if (size <= SEEK_BEYOND_MS)
    return { kind: 'rate', factor: driftMs > 0 ? 1 - RATE_CHANGE : 1 + RATE_CHANGE };
  return { kind: 'seek' };
}
