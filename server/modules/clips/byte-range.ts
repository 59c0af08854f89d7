/** What part of a representation a request asks for: bytes `start` to `end` inclusive. */
export type RequestedRange = { readonly start: number; readonly end: number } | 'whole' | 'unsatisfiable';

const SINGLE = /^bytes=[ \t]*(?:(\d+)-(\d*)|-(\d+))[ \t]*$/i;

/**
 * Reads a Range header (RFC 9110 §14.2) for a representation of `size` bytes. Other units, malformed sets and sets
 * of several ranges are answered with the whole, as the RFC allows.
 */
export function requestedRange(header: string | undefined, size: number): RequestedRange {
  const match = header === undefined ? null : SINGLE.exec(header);
  if (!match) return 'whole';
  const [, first, last, suffix] = match;
  if (first === undefined) {
    const length = Number(suffix);
    if (length === 0) return 'unsatisfiable';
    // A suffix longer than the representation is all of it; of nothing there is no part to name.
    return size === 0 ? 'whole' : { start: Math.max(0, size - length), end: size - 1 };
  }
  const start = Number(first);
  const end = last === undefined || last === '' ? Infinity : Number(last);
  if (end < start) return 'whole';
  if (start >= size) return 'unsatisfiable';
  return { start, end: Math.min(end, size - 1) };
}

/** Whether an If-None-Match header (RFC 9110 §13.1.2) names the representation; weak comparison. */
export function noneMatchNames(header: string | undefined, etag: string): boolean {
  if (header === undefined) return false;
  if (header.trim() === '*') return true;
  return header.split(',').some((tag) => tag.trim().replace(/^W\//, '') === etag);
}

/** Whether a Range may be honoured under an If-Range header (RFC 9110 §13.1.5); strong comparison, and no dates. */
export function ifRangeHolds(header: string | undefined, etag: string): boolean {
  return header === undefined || header.trim() === etag;
}
