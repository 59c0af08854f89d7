import { createHash } from 'node:crypto';
import { createWriteStream } from 'node:fs';
import { mkdir, mkdtemp, rm } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { Transform } from 'node:stream';
import { pipeline } from 'node:stream/promises';
import { DEFAULT_LIMITS, RECIPE_VERSION, UnplayableError, makeRenditions, type Renditions } from '../media';
import {
  findClip,
  giveClipUp,
  publishClip,
  refuseClip,
  reportProgress,
  type ClipToProcess,
} from '../modules/processing';
import { enqueueJob } from '../platform/jobs';
import type { ObjectStore } from '../platform/object-store';
import type { DeadEnd, Handler } from './handler';

/** Progress is told when it grew by this much; more often helps nobody. */
const PROGRESS_STEP = 4;

async function fetchOriginal(
  store: ObjectStore,
  clip: ClipToProcess,
  path: string,
  signal: AbortSignal,
): Promise<void> {
  const body = await store.get(clip.originalKey, undefined, signal);
  if (!body) throw new Error(`the original ${clip.originalKey} is not in the store`);
  const hash = createHash('sha256');
  const hashing = new Transform({
    transform(chunk: Buffer, _encoding, done) {
      hash.update(chunk);
      done(null, chunk);
    },
  });
  await pipeline(body, hashing, createWriteStream(path), { signal });
  if (hash.digest('hex') !== clip.sha256)
    throw new Error(`the original ${clip.originalKey} came back with other bytes than were sent`);
}

async function storeRenditions(
  store: ObjectStore,
  prefix: string,
  made: Renditions,
  signal: AbortSignal,
): Promise<void> {
  const stills = made.thumbnails.map(
    (thumbnail, n) => [`thumb-${String(n).padStart(2, '0')}.jpg`, thumbnail.path] as const,
  );
  await store.putFile(`${prefix}/proxy.mp4`, made.proxy.path, 'video/mp4', signal);
  await Promise.all(
    [
      ['poster.jpg', made.poster.path] as const,
      ['filmstrip.jpg', made.filmstrip.path] as const,
      ...stills,
    ].map(([name, path]) => store.putFile(`${prefix}/${name}`, path, 'image/jpeg', signal)),
  );
}

/** Where everything of a clip lies. */
const homeOf = (clip: ClipToProcess) => clip.originalKey.slice(0, clip.originalKey.lastIndexOf('/'));

/** Where an attempt of a job puts what it makes. */
const attemptPrefix = (home: string, jobId: number, attempt: number) =>
  `${home}/r${RECIPE_VERSION}-${jobId}-${attempt}`;

/**
 * Deletes renditions that earlier attempts of this job left without publishing them. Another job's are never touched:
 * it may be about to publish them.
 */
async function sweepAttempts(
  store: ObjectStore,
  home: string,
  jobId: number,
  attempt: number,
): Promise<void> {
  for (let earlier = 1; earlier < attempt; earlier += 1)
    await store.deletePrefix(`${attemptPrefix(home, jobId, earlier)}/`);
}

/**
 * Turns an uploaded clip into what a browser plays. Doing it twice changes nothing: each attempt writes under a
 * prefix of its own, and only the one that completes the job is published.
 */
export const processClip: Handler<'clip.process'> = async (
  { gymId, clipId },
  { platform, attempt, jobId, signal },
) => {
  const { database, store, config, clock } = platform;
  const clip = await findClip(database, gymId, clipId);
  if (!clip) return null;
  const home = homeOf(clip);
  const prefix = attemptPrefix(home, jobId, attempt);
  const workRoot = config.workDir ?? join(tmpdir(), 'midfoot-work');
  await mkdir(workRoot, { recursive: true });
  const workDir = await mkdtemp(join(workRoot, 'clip-'));
  let told = -PROGRESS_STEP;
  let telling = Promise.resolve();
  const onProgress = (percent: number) => {
    if (percent - told < PROGRESS_STEP || percent >= 100) return;
    told = percent;
    telling = telling
      .then(() => reportProgress(database, clip, percent, clock.now()))
      .catch((error: unknown) => {
        platform.logger.warn({ err: error, clipId }, 'progress could not be told');
      });
  };
  try {
    await sweepAttempts(store, home, jobId, attempt);
    onProgress(0);
    const inputPath = join(workDir, 'original');
    await fetchOriginal(store, clip, inputPath, signal);
    const made = await makeRenditions({
      inputPath,
      workDir,
      limits: { ...DEFAULT_LIMITS, maxDurationMs: config.clipMaxMs },
      shortSide: config.proxyShortSide,
      trim: clip.trim ?? undefined,
      onProgress,
      signal,
    });
    await storeRenditions(store, prefix, made, signal);
    await telling;
    const { proxy, facts } = made;
    return async (trx) => {
      const published = await publishClip(
        trx,
        clip,
        {
          outputPrefix: prefix,
          durationMs: proxy.durationMs,
          width: proxy.width,
          height: proxy.height,
          fps: proxy.fps,
          frames: proxy.frames,
          sourceFacts: facts,
        },
        clock.now(),
      );
      if (!published) await enqueueJob(trx, 'objects.delete', { prefixes: [prefix] }, clock.now());
    };
  } catch (error) {
    await telling;
    if (!(error instanceof UnplayableError)) throw error;
    platform.logger.info({ clipId, reason: error.reason }, 'a clip cannot be used');
    return (trx) => refuseClip(trx, clip, error.reason, config.publicUrl, clock.now());
  } finally {
    await rm(workDir, { recursive: true, force: true });
  }
};

/**
 * After the last attempt the clip is given up, with words for the member that say it was not their doing; what the
 * attempts left is deleted.
 */
export const giveUpClip: DeadEnd<'clip.process'> = async (
  { gymId, clipId },
  { trx, platform, now, jobId, attempt },
) => {
  const clip = await findClip(trx, gymId, clipId, true);
  if (!clip) return;
  const prefixes = Array.from({ length: attempt }, (_, n) => attemptPrefix(homeOf(clip), jobId, n + 1));
  await enqueueJob(trx, 'objects.delete', { prefixes }, now);
  await giveClipUp(trx, clip, jobId, platform.config.publicUrl, now);
};
