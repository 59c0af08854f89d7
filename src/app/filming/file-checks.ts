import { byteWords } from '../shared/upload-progress/byte-words';

/** What a file says of itself before anything of it is read. */
export interface FileFacts {
  name: string;
  /** The browser's guess of the kind; often empty for videos from a phone. */
  type: string;
  size: number;
}

/** What the browser could read of a video; null where it could not. */
export interface VideoFacts {
  durationMs: number | null;
  width: number | null;
}

/** Why a file is not sent, and what to do. */
export interface Refusal {
  message: string;
  remedy: string;
}

/** The API's own limits as they stand unless its operator set others; it decides in the end. */
export const CLIP_MAX_BYTES = 524_288_000;
export const CLIP_MAX_MS = 120_000;
export const CLIP_MIN_MS = 400;

const VIDEO_ENDINGS = /\.(mp4|m4v|mov|qt|3gp|3g2|webm|mkv|avi|mpe?g|m2ts|mts|ts)$/i;

/** Checks kind and size. A kind that nobody can tell is let through: the API looks into the file itself. */
export function checkFile({ name, type, size }: FileFacts): Refusal | null {
  if (size === 0) {
    return {
      message: 'The file is empty.',
      remedy: 'Choose the clip again. If it stays empty, film the lift once more.',
    };
  }
  const isKnownOther = type !== '' && !type.startsWith('video/') && type !== 'application/octet-stream';
  if (isKnownOther && !VIDEO_ENDINGS.test(name)) {
    return { message: 'This file is not a video.', remedy: 'Choose a video, not a photo or a document.' };
  }
  if (size > CLIP_MAX_BYTES) {
    return {
      message: `The clip has ${byteWords(size)}; at most ${byteWords(CLIP_MAX_BYTES)} can be sent.`,
      remedy: 'Trim it to the reps that were asked for, or film at 1080p.',
    };
  }
  return null;
}

/** Seconds and minutes as people say them: `45 s`, `2 min`, `3 min 10 s`. */
export function lengthWords(durationMs: number): string {
  const seconds = Math.round(durationMs / 1000);
  if (seconds < 60) return `${seconds} s`;
  const rest = seconds % 60;
  return rest === 0 ? `${seconds / 60} min` : `${Math.floor(seconds / 60)} min ${rest} s`;
}

/** Checks the length, where it could be read. */
export function checkVideo({ durationMs }: VideoFacts): Refusal | null {
  if (durationMs === null) return null;
  if (durationMs > CLIP_MAX_MS) {
    return {
      message: `The clip is ${lengthWords(durationMs)} long; at most ${lengthWords(CLIP_MAX_MS)} can be sent.`,
      remedy: 'Trim it on your phone to the reps that were asked for.',
    };
  }
  if (durationMs < CLIP_MIN_MS) {
    return {
      message: 'The clip is too short to see a rep.',
      remedy: 'Film the whole lift, from before the first rep to after the last.',
    };
  }
  return null;
}

const READ_PATIENCE_MS = 5_000;

/**
 * Reads length and width by a hidden video element. A browser that cannot decode the file, or takes too long, tells
 * nothing, and that is no fault of the file: the API can read kinds that a browser cannot.
 */
export function readVideo(file: Blob, document: Document): Promise<VideoFacts> {
  const video = document.createElement('video');
  const url = URL.createObjectURL(file);
  return new Promise<VideoFacts>((resolve) => {
    const finish = (): void => {
      clearTimeout(timer);
      const { duration, videoWidth } = video;
      // A clip recorded in a browser has no length written into it: the element says Infinity.
      resolve({
        durationMs: Number.isFinite(duration) ? Math.round(duration * 1000) : null,
        width: videoWidth > 0 ? videoWidth : null,
      });
      video.removeAttribute('src');
      video.load();
      URL.revokeObjectURL(url);
    };
    const timer = setTimeout(finish, READ_PATIENCE_MS);
    video.addEventListener('loadedmetadata', finish, { once: true });
    video.addEventListener('error', finish, { once: true });
    video.muted = true;
    video.preload = 'metadata';
    video.src = url;
  });
}
