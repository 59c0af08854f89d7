/** Where an instant stands on the rail, per cent of its length. */
export function railPercent(atMs: number, durationMs: number): number {
  return durationMs <= 0 ? 0 : Math.min(100, Math.max(0, (100 * atMs) / durationMs));
}

/** Lines of the scale, ms: a round step that leaves at most ten of them. */
export function railTicks(durationMs: number): number[] {
  const step = [500, 1000, 2000, 5000, 10_000, 15_000, 30_000, 60_000].find((ms) => durationMs / ms <= 10);
  if (step === undefined || durationMs <= 0) return [];
  return Array.from({ length: Math.floor(durationMs / step) + 1 }, (_, i) => i * step);
}
