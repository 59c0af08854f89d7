import { copyFile, rename, rm, stat } from 'node:fs/promises';
import { join } from 'node:path';
import { buildRenditionArguments, MAX_GROUP_OF_PICTURES } from './build-args';
import { type SourceFacts } from './facts';
import { makeJobDirectory, SOURCE_NAME } from './job-directory';
import { DEFAULT_LIMITS, type MediaLimits, renditionCaps } from './limits';
import { planRenditions, type RenditionPlan, type Size, THUMBNAIL_COUNT, type Trim } from './plan';
import { CAP_EXIT_CODES, probeSource, reasonFromComplaints } from './probe';
import { parseHeader } from './probe-output';
import { type Rational, toNumber } from './rational';
import { UnplayableError } from './reasons';
import { runFfmpeg, runFfprobe } from './run';

/**
 * Changes whenever the same source would give other renditions. Keys of published files carry it, so renditions of
 * two recipes never overwrite each other.
 */
export const RECIPE_VERSION = 1;

/** Short side of the proxy unless the gym sets another, in pixels. */
export const DEFAULT_SHORT_SIDE = 720;

/** The share of the source's pictures that must have been decoded; ffmpeg's exit code 0 does not say so. */
const DECODED_SHARE = 0.95;

/** A JPEG among the renditions. */
export interface Still extends Size {
  path: string;
  sizeBytes: number;
}

/** What the worker publishes for a clip. All paths lie in a directory inside the given `workDir`. */
export interface Renditions {
  facts: SourceFacts;
  proxy: Size & {
    path: string;
    /** Exact and constant: picture n is shown from n/fps to (n+1)/fps. */
    fps: Rational;
    frames: number;
    durationMs: number;
    sizeBytes: number;
    hasAudio: boolean;
    /** The source's instant (real time after its first picture) of the proxy's first picture. */
    sourceStartMs: number;
  };
  poster: Still;
  /** Twelve, evenly spread over the proxy. */
  thumbnails: Still[];
  /** The same twelve side by side. */
  filmstrip: Still;
}

/** What {@link makeRenditions} is given. */
export interface RenditionRequest {
  /** The upload, on local disk. It is linked into the job's directory and made world-readable there. */
  inputPath: string;
  /** A private directory on the same disk; the caller removes it when the renditions are published. */
  workDir: string;
  limits?: MediaLimits;
  shortSide?: number;
  /** Real time after the first picture. */
  trim?: Trim;
  /** Per cent, whole, never falling; 100 exactly once, at the end. */
  onProgress?: (percent: number) => void;
  signal?: AbortSignal;
}

/**
 * Turns a phone's file, which may be hostile, into the files that browsers play.
 *
 * @throws UnplayableError if the member must send another file; any other error is ours and worth another try
 */
export async function makeRenditions(request: RenditionRequest): Promise<Renditions> {
  const { signal, trim } = request;
  const limits = request.limits ?? DEFAULT_LIMITS;
  const shortSide = request.shortSide ?? DEFAULT_SHORT_SIDE;
  signal?.throwIfAborted();
  const directory = await makeJobDirectory(request.workDir, request.inputPath);
  try {
    const facts = await probeSource(directory, { limits, signal });
    const plan = planRenditions(facts, shortSide, trim);
    checkTrim(plan, limits);
    await transcode(directory, facts, plan, { ...request, limits, shortSide });
    const proxy = await checkProxy(directory, plan, signal);
    const stills = await collectStills(directory, plan);
    request.onProgress?.(100);
    return { facts, proxy, ...stills };
  } catch (error) {
    await rm(directory, { recursive: true, force: true });
    throw error;
  } finally {
    await rm(join(directory, SOURCE_NAME), { force: true });
  }
}

function checkTrim({ proxy }: RenditionPlan, limits: MediaLimits): void {
  const durationMs = (1000 * proxy.frames) / toNumber(proxy.fps);
  // Written so that a trim that is not a number is refused too. A slow-motion source may have enough pictures while its proxy, at a quarter of the rate, has fewer than the stills.
  if (!(durationMs >= limits.minDurationMs && proxy.frames >= limits.minFrames)) {
    throw new UnplayableError('bad-trim', `${proxy.frames} pictures, ${durationMs} ms left`);
  }
}

async function transcode(
  directory: string,
  facts: SourceFacts,
  plan: RenditionPlan,
  request: RenditionRequest & { limits: MediaLimits; shortSide: number },
): Promise<void> {
  let told = 0;
  const outcome = await runFfmpeg({
    directory,
    command: buildRenditionArguments(facts, request),
    caps: renditionCaps(facts.durationMs),
    signal: request.signal,
    onFrame: (frame) => {
      const percent = Math.min(99, Math.floor((100 * frame) / plan.proxy.frames));
      if (percent > told) request.onProgress?.((told = percent));
    },
  });
  const detail = `ffmpeg exited with ${outcome.exitCode}: ${outcome.stderr.slice(-8).join(' | ')}`;
  if (/No space left on device/i.test(detail)) throw new Error(detail);
  if (CAP_EXIT_CODES.includes(outcome.exitCode)) throw new UnplayableError('too-heavy', detail);
  if (outcome.exitCode > 128) throw new Error(detail);
  if (outcome.exitCode !== 0)
    throw new UnplayableError(reasonFromComplaints(outcome.stderr) ?? 'damaged', detail);

  const needed = DECODED_SHARE * framesUntilEnd(facts, plan);
  if (outcome.decodedFrames === null)
    throw new Error(`ffmpeg did not say how many pictures it decoded: ${detail}`);
  if (outcome.decodedFrames < needed) {
    throw new UnplayableError('damaged', `${outcome.decodedFrames} of ${facts.frames} pictures decoded`);
  }
}

/** How many of the source's pictures are decoded before the last one kept. */
function framesUntilEnd(facts: SourceFacts, { firstFrame, proxy }: RenditionPlan): number {
  const keptMs = (1000 * (firstFrame + proxy.frames)) / toNumber(proxy.fps);
  return facts.frames * Math.min(1, keptMs / facts.durationMs);
}

async function checkProxy(
  directory: string,
  plan: RenditionPlan,
  signal?: AbortSignal,
): Promise<Renditions['proxy']> {
  const { stdout } = await runFfprobe({
    directory,
    signal,
    args: [
      ...['-v', 'error', '-protocol_whitelist', 'file', '-of', 'json', '-show_format', '-show_streams'],
      ...['-show_entries', 'packet=codec_type,pts_time,flags', 'file:proxy.mp4'],
    ],
  });
  const report = parseHeader(stdout);
  const stream = report?.streams.find((s) => s.codec_type === 'video');
  const pictures = report?.packets.filter((packet) => packet.codec_type === 'video') ?? [];
  const { width, height, fps, frames } = plan.proxy;
  if (pictures.length < DECODED_SHARE * frames) {
    throw new UnplayableError('damaged', `${pictures.length} of ${frames} pictures came out`);
  }
  const asAsked =
    stream?.codec_name === 'h264' &&
    stream.pix_fmt === 'yuv420p' &&
    stream.width === width &&
    stream.height === height &&
    pictures[0]?.pts_time === 0 &&
    pictures.every((picture, n) => n % MAX_GROUP_OF_PICTURES !== 0 || picture.flags.startsWith('K'));
  if (!asAsked) {
    const found = `${stream?.codec_name} ${stream?.width}x${stream?.height} ${stream?.pix_fmt}`;
    throw new Error(`the proxy is not what was asked for: ${found}, from ${pictures[0]?.pts_time} s`);
  }
  const path = join(directory, 'proxy.mp4');
  return {
    ...{ path, width, height, fps, frames: pictures.length },
    durationMs: (1000 * pictures.length) / toNumber(fps),
    sizeBytes: (await stat(path)).size,
    hasAudio: report?.streams.some((s) => s.codec_type === 'audio') ?? false,
    sourceStartMs: (1000 * plan.firstFrame) / toNumber(fps),
  };
}

async function collectStills(
  directory: string,
  plan: RenditionPlan,
): Promise<Pick<Renditions, 'poster' | 'thumbnails' | 'filmstrip'>> {
  const still = async (name: string, size: Size): Promise<Still | null> => {
    const path = join(directory, name);
    const sizeBytes = await stat(path).then(
      (found) => found.size,
      (error: NodeJS.ErrnoException) => {
        if (error.code === 'ENOENT') return null;
        throw error;
      },
    );
    return sizeBytes === null ? null : { path, sizeBytes, width: size.width, height: size.height };
  };
  const numbered = (name: string, n: number) => `${name}-${String(n).padStart(2, '0')}.jpg`;

  const candidates = await Promise.all(
    plan.posterFrames.map((_, k) => still(numbered('poster', k + 1), plan.proxy)),
  );
  // At the same quality the sharper picture takes more bytes.
  const sharpest = candidates.reduce(
    (best, next) => ((next?.sizeBytes ?? 0) > (best?.sizeBytes ?? 0) ? next : best),
    null,
  );
  const filmstrip = await still('filmstrip.jpg', {
    width: plan.filmstripCell.width * THUMBNAIL_COUNT,
    height: plan.filmstripCell.height,
  });
  if (!sharpest || !filmstrip) throw new Error('ffmpeg made no poster or no filmstrip');
  const poster = { ...sharpest, path: join(directory, 'poster.jpg') };
  await rename(sharpest.path, poster.path);
  await Promise.all(candidates.map((other) => other && other !== sharpest && rm(other.path)));

  const thumbnails: Still[] = [];
  for (let k = 1; k <= THUMBNAIL_COUNT; k++) {
    const made = await still(numbered('thumbnail', k), plan.thumbnail);
    const previous = thumbnails.at(-1);
    if (made) thumbnails.push(made);
    else if (previous) {
      // A source that lost its last pictures: the last one it has stands in.
      const path = join(directory, numbered('thumbnail', k));
      await copyFile(previous.path, path);
      thumbnails.push({ ...previous, path });
    } else throw new Error('ffmpeg made no thumbnails');
  }
  return { poster, thumbnails, filmstrip };
}
