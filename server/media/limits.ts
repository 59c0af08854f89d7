/** What one clip may ask of the machine and of a coach's patience. */
export interface MediaLimits {
  /** Shortest clip that can show a rep. */
  minDurationMs: number;
  maxDurationMs: number;
  /** Pixels on the shorter displayed side. */
  minShortSide: number;
  /** Pixels on the longer stored side. */
  maxLongSide: number;
  /** Fewest pictures in the whole clip: one for each thumbnail. */
  minFrames: number;
  /** Fewest pictures a second, on average; below that no instant of a rep can be told. */
  minFrameRate: number;
  /** Most pictures a second: phones' slow motion. */
  maxFrameRate: number;
  /** Streams of any kind in one file. */
  maxStreams: number;
}

/** The limits that hold unless the gym's operator sets others. Common practice, no source, but for the pixels: 4K is the most a phone films. */
export const DEFAULT_LIMITS: Readonly<MediaLimits> = {
  minDurationMs: 400,
  maxDurationMs: 120_000,
  minShortSide: 64,
  maxLongSide: 4096,
  minFrames: 12,
  minFrameRate: 8,
  maxFrameRate: 240,
  maxStreams: 16,
};

/** The most decoded pixels a single picture may have; codecs round the stored size up to whole blocks. */
export function maxPixels(limits: MediaLimits): number {
  return (limits.maxLongSide + 64) ** 2;
}

/** What one started program may use; the jail enforces it. */
export interface ProcessCaps {
  memoryBytes: number;
  cpuSeconds: number;
  /** Largest single file it may write. */
  fileBytes: number;
  wallMs: number;
}

/** For reading facts. A 4K HEVC file's facts took 0.3 GB of memory at most when measured. */
export const PROBE_CAPS: Readonly<ProcessCaps> = {
  memoryBytes: 1_500_000_000,
  cpuSeconds: 30,
  fileBytes: 1_000_000,
  wallMs: 60_000,
};

/**
 * For making the renditions of a clip.
 * A second of 1080p60 took 3 s of processor time when measured; 4K at 60 or slow motion at 240 takes some 10.
 */
export function renditionCaps(durationMs: number): ProcessCaps {
  const seconds = Math.ceil(durationMs / 1000);
  return {
    memoryBytes: 2_500_000_000,
    cpuSeconds: 30 + 15 * seconds,
    fileBytes: 400_000_000,
    wallMs: 60_000 + 30_000 * seconds,
  };
}
