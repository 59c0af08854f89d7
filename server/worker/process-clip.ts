import { createHash } from 'node:crypto';
import { createWriteStream } from 'node:fs';
import { mkdir, mkdtemp, rm } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { Transform } from 'node:stream';
import { pipeline } from 'node:stream/promises';
import { DEFAULT_LIMITS, RECIPE_VERSION, UnplayableError, makeRenditions, type Renditions } from '../media';
import { findClip, publishClip, refuseClip, reportProgress, type ClipToProcess } from '../modules/processing';
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

/** Deletes renditions that an earlier attempt left without publishing them. */
async function sweepAttempts(store: ObjectStore, clip: ClipToProcess, home: string): Promise<void> {
  const left = new Set<string>();
  for await (const key of store.list(`${home}/r`)) {
    const prefix = key.slice(0, key.lastIndexOf('/'));
    if (prefix !== clip.outputPrefix) left.add(prefix);
  }
  for (const prefix of left) await store.deletePrefix(`${prefix}/`);
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
  const home = clip.originalKey.slice(0, clip.originalKey.lastIndexOf('/'));
  const prefix = `${home}/r${RECIPE_VERSION}-${jobId}-${attempt}`;
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
    await sweepAttempts(store, clip, home);
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
      if (!published) await store.deletePrefix(`${prefix}/`);
    };
  } catch (error) {
    await telling;
    if (!(error instanceof UnplayableError)) throw error;
    platform.logger.info({ clipId, reason: error.reason }, 'a clip cannot be used');
    return (trx) => refuseClip(trx, gymId, clipId, error.reason, clock.now());
  } finally {
    await rm(workDir, { recursive: true, force: true });
  }
};

/** After the last attempt the clip is given up, with words for the member that say it was not their doing. */
export const giveUpClip: DeadEnd<'clip.process'> = ({ gymId, clipId }, trx, now) =>
  refuseClip(trx, gymId, clipId, 'gave-up', now);
