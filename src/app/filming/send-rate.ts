/** How many bytes had been sent at a moment (ms of any steady clock). */
export interface Sample {
  atMs: number;
  sentBytes: number;
}

/** Only the last seconds count, so that the figure follows a network that changes. */
const WINDOW_MS = 8_000;
/** Before this much has been watched no figure is better than a guess. */
const PATIENCE_MS = 1_000;

/** Adds a sample and lets go of those that are too old to count, keeping the newest of the old as the window's start. */
export function withSample(samples: readonly Sample[], sample: Sample): Sample[] {
  const all = [...samples, sample];
  const firstInside = all.findIndex(({ atMs }) => sample.atMs - atMs <= WINDOW_MS);
  return all.slice(Math.max(0, firstInside - 1));
}

/** Bytes a second over the samples, or null while too little has been seen. */
export function bytesPerSecond(samples: readonly Sample[]): number | null {
  const first = samples[0];
  const last = samples.at(-1);
  if (!first || !last) return null;
  const elapsedMs = last.atMs - first.atMs;
  if (elapsedMs < PATIENCE_MS || last.sentBytes <= first.sentBytes) return null;
  return ((last.sentBytes - first.sentBytes) * 1000) / elapsedMs;
}

/** The time that the rest will take at the present rate, ms, or null while that cannot be told. */
export function timeLeftMs(samples: readonly Sample[], totalBytes: number): number | null {
  const rate = bytesPerSecond(samples);
  const last = samples.at(-1);
  return rate === null || !last ? null : Math.round((Math.max(0, totalBytes - last.sentBytes) / rate) * 1000);
}

/** The time left as it is said: to ten seconds under a minute and a half, to whole minutes above. */
export function leftWords(leftMs: number): string {
  if (leftMs < 10_000) return 'a few seconds left';
  if (leftMs < 90_000) return `about ${Math.round(leftMs / 10_000) * 10} s left`;
  return `about ${Math.round(leftMs / 60_000)} min left`;
}
