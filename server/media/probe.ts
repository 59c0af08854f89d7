import { open } from 'node:fs/promises';
import { join } from 'node:path';
import { AUDIO_CODECS, probeGuards, VIDEO_CODECS } from './build-args';
import { type SourceFacts } from './facts';
import { measureTiming } from './frame-rate';
import { SOURCE_NAME } from './job-directory';
import { DEFAULT_LIMITS, type MediaLimits } from './limits';
import {
  type Packet,
  parseHeader,
  parseOrientation,
  parsePackets,
  type ProbedHeader,
  type ProbedStream,
} from './probe-output';
import { parseRational, type Rational, reduce, toNumber } from './rational';
import { UnplayableError, type UnplayableReason } from './reasons';
import { runFfprobe } from './run';
import { SNIFF_BYTES, sniffContainer } from './sniff';

/** Slack for what containers round: a clip of the longest duration plus one audio packet is not too long. */
const DURATION_SLACK_MS = 500;
/** A file whose pictures end before this share of its stated duration has lost its end. */
const COMPLETE_SHARE = 0.95;

/**
 * Measures the file named {@link SOURCE_NAME} in a job's directory and refuses what cannot be shown.
 * Cheap checks come first: nothing is demuxed before its first bytes say video, nothing counted before its header
 * is within limits.
 *
 * @throws UnplayableError if the file is the trouble; any other error is ours and worth another try
 */
export async function probeSource(
  directory: string,
  options: { limits?: MediaLimits; signal?: AbortSignal } = {},
): Promise<SourceFacts> {
  const limits = options.limits ?? DEFAULT_LIMITS;
  const { container, sizeBytes } = await checkFirstBytes(join(directory, SOURCE_NAME));
  const header = await readHeader(directory, limits, options.signal);
  const stream = chooseVideo(header, limits);
  const sampleAspect = parseRational(stream.sample_aspect_ratio) ?? { num: 1, den: 1 };
  const orientation = parseOrientation(stream);
  const size = displayedSize(stream, sampleAspect, orientation.rotation, limits);
  const statedMs = 1000 * Math.max(header.format.duration ?? 0, stream.duration ?? 0);
  const captureRate = Number(header.format.tags?.['com.android.capture.fps']);
  refuseIf(
    statedMs > limits.maxDurationMs * Math.max(1, captureRate / 10 || 1) + DURATION_SLACK_MS,
    'too-long',
    `stated duration ${statedMs} ms`,
  );

  const packets = await readPackets(directory, stream.index, limits, options.signal);
  const timing = timingOf(packets, stream, captureRate, limits);
  const startS = timing.startS - (header.format.start_time ?? 0);
  const statedVideoMs = 1000 * (stream.duration ?? 0);
  refuseIf(
    statedVideoMs - timing.shownMs > (1 - COMPLETE_SHARE) * statedVideoMs + DURATION_SLACK_MS / 2,
    'damaged',
    `pictures end after ${timing.shownMs} ms of ${statedVideoMs} ms`,
  );
  const audio = timing.slowedBy === 1 ? chooseAudio(header) : undefined;
  return {
    container,
    sizeBytes,
    videoStream: stream.index,
    audioStream: audio?.index ?? null,
    hasAudio: audio !== undefined,
    codec: stream.codec_name ?? 'unknown',
    pixelFormat: stream.pix_fmt ?? 'unknown',
    ...size,
    ...orientation,
    sampleAspect,
    interlaced: ['tt', 'bb', 'tb', 'bt'].includes(stream.field_order ?? ''),
    hdr: hdrOf(stream),
    colour: colourOf(stream),
    startMs: startS * 1000,
    durationMs: timing.durationMs,
    frameRate: timing.frameRate,
    variableFrameRate: timing.variable,
    frames: timing.frames,
    slowedBy: timing.slowedBy,
  };
}

function refuseIf(wrong: boolean, reason: UnplayableReason, detail: string): void {
  if (wrong) throw new UnplayableError(reason, detail);
}

async function checkFirstBytes(path: string): Promise<Pick<SourceFacts, 'container' | 'sizeBytes'>> {
  const file = await open(path, 'r');
  try {
    const { size } = await file.stat();
    const head = Buffer.alloc(SNIFF_BYTES);
    const { bytesRead } = await file.read(head, 0, SNIFF_BYTES, 0);
    const sniffed = sniffContainer(head.subarray(0, bytesRead));
    if (sniffed.kind === 'video') return { container: sniffed.container, sizeBytes: size };
    const reason = sniffed.kind === 'other-video' ? 'unsupported-container' : 'not-video';
    throw new UnplayableError(
      sniffed.format === 'empty' ? 'empty' : reason,
      `first bytes: ${sniffed.format}`,
    );
  } finally {
    await file.close();
  }
}

/** What ffprobe and ffmpeg say of files that they cannot read; the first match names the reason. */
const COMPLAINTS: readonly (readonly [RegExp, UnplayableReason])[] = [
  [/exceeds max_streams/i, 'too-many-streams'],
  [/exceeds specified max pixel count|Picture size \d+x\d+ is invalid/i, 'too-big-picture'],
  [/not on whitelist/i, 'unsupported-codec'],
  [/Cannot allocate memory/i, 'too-heavy'],
];

/** Names what a tool complained of, if it is one of the known troubles. */
export function reasonFromComplaints(stderr: readonly string[]): UnplayableReason | null {
  const said = stderr.join('\n');
  return COMPLAINTS.find(([pattern]) => pattern.test(said))?.[1] ?? null;
}

/** Exit codes of a program that ran into its cap on processor time or file size (128 + signal number). */
export const CAP_EXIT_CODES: readonly number[] = [128 + 24, 128 + 25];

async function readHeader(
  directory: string,
  limits: MediaLimits,
  signal?: AbortSignal,
): Promise<ProbedHeader> {
  const { exitCode, stdout, stderr } = await runFfprobe({
    directory,
    signal,
    args: [
      '-v',
      'error',
      ...probeGuards(limits),
      '-of',
      'json',
      '-show_format',
      '-show_streams',
      '-show_packets',
      '-read_intervals',
      '%+#16',
      `file:${SOURCE_NAME}`,
    ],
  });
  const detail = stderr.slice(-5).join(' | ');
  refuseIf(CAP_EXIT_CODES.includes(exitCode), 'too-heavy', detail);
  const complaint = reasonFromComplaints(stderr);
  if (complaint && (exitCode !== 0 || complaint === 'too-big-picture'))
    throw new UnplayableError(complaint, detail);
  if (exitCode > 128) throw new Error(`ffprobe was ended from outside (${exitCode}): ${detail}`);
  const header = exitCode === 0 ? parseHeader(stdout) : null;
  if (!header) throw new UnplayableError('damaged', `ffprobe exited with ${exitCode}: ${detail}`);
  return header;
}

function chooseVideo(header: ProbedHeader, limits: MediaLimits): ProbedStream {
  refuseIf(header.streams.length > limits.maxStreams, 'too-many-streams', `${header.streams.length} streams`);
  refuseIf(header.streams.length === 0, 'damaged', 'no streams');
  // A cover picture is stored as a video stream of one picture; it is not what was filmed.
  const pictures = header.streams.filter(
    (s) => s.codec_type === 'video' && s.disposition?.attached_pic !== 1,
  );
  const [first] = pictures;
  if (!first)
    throw new UnplayableError('no-picture', `streams: ${header.streams.map((s) => s.codec_type).join(', ')}`);
  // The demuxer hides that a track's samples are enciphered behind the codec inside; only the packets tell.
  refuseIf(
    header.packets.some((packet) =>
      packet.side_data_list?.some((data) => data.side_data_type === 'Encryption info'),
    ),
    'encrypted',
    'packets carry encryption information',
  );
  const playable = pictures.find((s) => (VIDEO_CODECS as readonly string[]).includes(s.codec_name ?? ''));
  if (!playable)
    throw new UnplayableError('unsupported-codec', `codec ${first.codec_name} (${first.codec_tag_string})`);
  return playable;
}

function chooseAudio(header: ProbedHeader): ProbedStream | undefined {
  // Phones may record a second, spatial track that no decoder here reads; the first plain one is the one to hear.
  return header.streams.find(
    (s) => s.codec_type === 'audio' && (AUDIO_CODECS as readonly string[]).includes(s.codec_name ?? ''),
  );
}

function displayedSize(
  stream: ProbedStream,
  sampleAspect: Rational,
  rotation: number,
  limits: MediaLimits,
): { width: number; height: number } {
  const [storedWidth, height] = [stream.width ?? 0, stream.height ?? 0];
  const detail = `${storedWidth}x${height}, samples ${sampleAspect.num}:${sampleAspect.den}`;
  const width = Math.round(storedWidth * toNumber(sampleAspect));
  refuseIf(storedWidth <= 0 || height <= 0, 'damaged', `no picture size: ${detail}`);
  refuseIf(Math.max(storedWidth, width, height) > limits.maxLongSide, 'too-big-picture', detail);
  refuseIf(Math.min(storedWidth, width, height) < limits.minShortSide, 'too-small-picture', detail);
  return rotation % 180 === 0 ? { width, height } : { width: height, height: width };
}

function hdrOf(stream: ProbedStream): SourceFacts['hdr'] {
  if (stream.color_transfer === 'smpte2084') return 'pq';
  return stream.color_transfer === 'arib-std-b67' ? 'hlg' : 'none';
}

/** Colour matrices in ffprobe's words and in its scaler's. */
const MATRICES: Readonly<Record<string, SourceFacts['colour']['matrix']>> = {
  bt709: 'bt709',
  smpte170m: 'smpte170m',
  bt470bg: 'smpte170m',
  fcc: 'fcc',
  smpte240m: 'smpte240m',
  bt2020nc: 'bt2020',
  bt2020c: 'bt2020',
};

function colourOf(stream: ProbedStream): SourceFacts['colour'] {
  // Untagged pictures of 720 lines and more are taken for BT.709, smaller ones for BT.601: common practice, no source.
  const guess = Math.min(stream.width ?? 0, stream.height ?? 0) >= 720 ? 'bt709' : 'smpte170m';
  const fullRange = stream.color_range === 'pc' || (stream.pix_fmt ?? '').startsWith('yuvj');
  return { matrix: MATRICES[stream.color_space ?? ''] ?? guess, range: fullRange ? 'pc' : 'tv' };
}

async function readPackets(
  directory: string,
  stream: number,
  limits: MediaLimits,
  signal?: AbortSignal,
): Promise<Packet[]> {
  const most = Math.ceil((limits.maxDurationMs / 1000) * limits.maxFrameRate) + 1;
  const { exitCode, stdout, stderr } = await runFfprobe({
    directory,
    signal,
    args: [
      ...['-v', 'error', ...probeGuards(limits), '-select_streams', String(stream)],
      ...['-read_intervals', `%+#${most}`, '-show_entries', 'packet=pts_time,dts_time,duration_time,flags'],
      ...['-of', 'csv=p=0', `file:${SOURCE_NAME}`],
    ],
  });
  if (exitCode !== 0) {
    const detail = `counting pictures: ${exitCode} ${stderr.slice(-5).join(' | ')}`;
    if (exitCode > 128 && !CAP_EXIT_CODES.includes(exitCode)) throw new Error(detail);
    throw new UnplayableError(CAP_EXIT_CODES.includes(exitCode) ? 'too-heavy' : 'damaged', detail);
  }
  const packets = parsePackets(stdout);
  refuseIf(packets.length >= most, 'too-many-frames', `${packets.length} pictures or more`);
  refuseIf(packets.length === 0, 'no-picture', `no packets: ${stderr.slice(-5).join(' | ')}`);
  return packets;
}

interface Timing {
  startS: number;
  /** As the file plays by itself. */
  shownMs: number;
  durationMs: number;
  frameRate: Rational;
  variable: boolean;
  frames: number;
  slowedBy: number;
}

/**
 * Measures, and undoes slowing: some phones store 240 pictures a second to be played at 30 and say so in a tag
 * (`com.android.capture.fps`). What took 2 s then lasts 2 s again.
 */
function timingOf(
  packets: readonly Packet[],
  stream: ProbedStream,
  captureRate: number,
  limits: MediaLimits,
): Timing {
  const last = packets.reduce((latest, packet) => (packet.timeS > latest.timeS ? packet : latest));
  const measured = measureTiming(
    packets.map((packet) => packet.timeS),
    last.durationS,
    parseRational(stream.r_frame_rate),
  );
  if (!measured) throw new UnplayableError('too-short', `${packets.length} pictures`);

  const asPlayed = toNumber(measured.frameRate);
  const slowed = captureRate / asPlayed;
  const slowedBy =
    Number.isFinite(slowed) && slowed >= 1.5 && captureRate <= 1000 ? Math.round(slowed * 100) / 100 : 1;
  const frameRate =
    slowedBy === 1
      ? measured.frameRate
      : reduce({
          num: Math.round(measured.frameRate.num * slowedBy * 100),
          den: measured.frameRate.den * 100,
        });
  const shownMs = measured.durationS * 1000;
  const durationMs = shownMs / slowedBy;
  const rate = toNumber(frameRate);
  const detail = `${measured.frames} pictures in ${Math.round(durationMs)} ms, ${rate.toFixed(3)} a second`;

  refuseIf(durationMs > limits.maxDurationMs + DURATION_SLACK_MS, 'too-long', detail);
  refuseIf(durationMs < limits.minDurationMs || measured.frames < 2, 'too-short', detail);
  refuseIf(measured.frames / (durationMs / 1000) < limits.minFrameRate, 'too-few-frames', detail);
  refuseIf(rate > limits.maxFrameRate * 1.01, 'too-many-frames', detail);
  refuseIf(measured.frames < limits.minFrames, 'too-short', detail);
  return {
    startS: measured.startS,
    shownMs,
    durationMs,
    frameRate,
    variable: measured.variable,
    frames: measured.frames,
    slowedBy,
  };
}
