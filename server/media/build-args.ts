import { type SourceFacts } from './facts';
import { SOURCE_NAME } from './job-directory';
import { DEFAULT_LIMITS, maxPixels, type MediaLimits } from './limits';
import { planRenditions, type RenditionPlan, type Trim } from './plan';
import { toNumber } from './rational';

/** The parts of one ffmpeg command, in the order in which they stand. */
export interface FfmpegArguments {
  /** Before `-i`. */
  inputOptions: string[];
  source: string;
  /** The value of `-filter_complex`. */
  filter: string;
  outputs: { options: string[]; target: string }[];
}

/** The demuxers that may open an upload: ISO base media and QuickTime; Matroska and WebM. */
export const ALLOWED_FORMATS = ['mov', 'matroska', 'webm'] as const;
/** Codecs that phones and browsers record pictures with; both the codec's name and its decoders'. */
export const VIDEO_CODECS = [
  'h264',
  'hevc',
  'vp8',
  'vp9',
  'av1',
  'mpeg4',
  'h263',
  'prores',
  'mjpeg',
] as const;
/** The same for sound. */
export const AUDIO_CODECS = [
  'aac',
  'mp3',
  'opus',
  'vorbis',
  'amr_nb',
  'amr_wb',
  'alac',
  'pcm_s16le',
  'pcm_s16be',
  'pcm_s24le',
  'pcm_f32le',
] as const;

const DECODERS = [
  ...VIDEO_CODECS,
  'libvpx',
  'libvpx-vp9',
  'libdav1d',
  ...AUDIO_CODECS,
  'mp3float',
  'libopus',
  'libvorbis',
  'amrnb',
  'amrwb',
  'libopencore_amrnb',
  'libopencore_amrwb',
];

/**
 * Decoders of streams that are never shown but that ffprobe opens all the same: subtitles, cover pictures and
 * soundtracks that the proxy does without.
 */
const LUGGAGE_DECODERS = [
  'mov_text',
  'srt',
  'subrip',
  'ssa',
  'ass',
  'webvtt',
  'text',
  'png',
  'ac3',
  'eac3',
  'flac',
];

/** What ffprobe is told before every upload; ffmpeg's list of decoders is narrower, for it opens only what it shows. */
export function probeGuards(limits: MediaLimits): string[] {
  return inputGuards(limits, [...DECODERS, ...LUGGAGE_DECODERS]);
}

/** What ffmpeg is told before every upload: one local file, known kinds, bounded size. */
export function inputGuards(limits: MediaLimits, decoders: readonly string[] = DECODERS): string[] {
  return [
    ...['-protocol_whitelist', 'file'],
    ...['-format_whitelist', ALLOWED_FORMATS.join(',')],
    ...['-codec_whitelist', decoders.join(',')],
    ...['-max_streams', String(limits.maxStreams)],
    ...['-max_pixels', String(maxPixels(limits))],
    ...['-probesize', '20M', '-analyzeduration', '10M'],
  ];
}

/** What the caller may choose about the renditions. */
export interface RenditionOptions {
  /** Pixels on the proxy's shorter side; never enlarged. */
  shortSide: number;
  trim?: Trim;
  limits?: MediaLimits;
  /** Decoding and encoding threads; each holds pictures in memory. */
  threads?: number;
}

const KEEP_NO_METADATA = ['-map_metadata', '-1', '-map_chapters', '-1', '-dn', '-sn'];
/** Output depends on the input and the recipe alone: no program versions, no times. */
const REPRODUCIBLE = ['-fflags', '+bitexact', '-flags:v', '+bitexact', '-flags:a', '+bitexact'];
const BT709_TAGS = [
  '-color_primaries',
  'bt709',
  '-color_trc',
  'bt709',
  '-colorspace',
  'bt709',
  '-color_range',
  'tv',
];
/** The longest run of pictures that must be decoded to show one. 15 is where seeking stops getting faster. */
export const MAX_GROUP_OF_PICTURES = 15;

/**
 * One ffmpeg command that decodes the source once and makes the proxy, the poster's candidates, the thumbnails and
 * the filmstrip. Pure: the same facts and options give the same words.
 */
export function buildRenditionArguments(facts: SourceFacts, options: RenditionOptions): FfmpegArguments {
  const plan = planRenditions(facts, options.shortSide, options.trim);
  const threads = String(options.threads ?? 2);
  return {
    inputOptions: [
      ...[
        '-nostdin',
        '-hide_banner',
        '-v',
        'verbose',
        '-nostats',
        '-progress',
        'pipe:2',
        '-stats_period',
        '0.25',
      ],
      ...['-threads', threads],
      ...inputGuards(options.limits ?? DEFAULT_LIMITS),
    ],
    source: `file:${SOURCE_NAME}`,
    filter: [...videoFilters(facts, plan), ...audioFilters(facts, plan)].join(';'),
    outputs: [proxyOutput(facts, threads), ...stillOutputs()],
  };
}

/** The command as one list of words, as a shell would be given it. */
export function flattenArguments(command: FfmpegArguments): string[] {
  return [
    ...command.inputOptions,
    ...['-i', command.source, '-y', '-filter_complex', command.filter],
    ...command.outputs.flatMap(({ options, target }) => [...options, target]),
  ];
}

function videoFilters(facts: SourceFacts, plan: RenditionPlan): string[] {
  const { proxy, thumbnail, filmstripCell } = plan;
  const rate = `${proxy.fps.num}/${proxy.fps.den}`;
  // Half a source picture, in microseconds: with it, rounding up chooses the source picture nearest to each instant.
  const halfPicture = Math.round(500_000 / toNumber(facts.frameRate));
  const steady = [
    ...(facts.interlaced ? ['bwdif=mode=send_frame:deint=interlaced'] : []),
    'settb=1/1000000',
    `setpts=(PTS-STARTPTS)/${facts.slowedBy}-${halfPicture}`,
    `fps=fps=${rate}:round=up:start_time=0`,
    `trim=start_frame=${plan.firstFrame}:end_frame=${plan.firstFrame + proxy.frames}`,
    'setpts=PTS-STARTPTS',
  ];
  const still = 'in_color_matrix=bt709:in_range=tv:out_color_matrix=smpte170m:out_range=pc,format=yuvj420p';
  return [
    `[0:${facts.videoStream}]${[...steady, ...pictureFilters(facts, plan)].join(',')},split=3[proxy][cells][middle]`,
    `[cells]${selectFrames(plan.thumbnailFrames)},split=2[thumbs][cell]`,
    `[thumbs]scale=${thumbnail.width}:${thumbnail.height}:${still}[thumbnails]`,
    `[cell]scale=${filmstripCell.width}:${filmstripCell.height}:${still},tile=${plan.thumbnailFrames.length}x1[filmstrip]`,
    `[middle]${selectFrames(plan.posterFrames)},scale=${still}[posters]`,
  ];
}

function selectFrames(frames: readonly number[]): string {
  return `select='${frames.map((n) => `eq(n,${n})`).join('+')}'`;
}

/** From the source's picture to the proxy's: size, square pixels, 8-bit BT.709 in the ranges that players expect. */
function pictureFilters(facts: SourceFacts, { proxy }: RenditionPlan): string[] {
  const size = `scale=${proxy.width}:${proxy.height}`;
  if (facts.hdr === 'none') {
    const { matrix, range } = facts.colour;
    return [
      `${size}:in_color_matrix=${matrix}:in_range=${range}:out_color_matrix=bt709:out_range=tv`,
      'format=yuv420p',
      'setsar=1',
    ];
  }
  const transfer = facts.hdr === 'pq' ? 'smpte2084' : 'arib-std-b67';
  return [
    size,
    'setsar=1',
    // 203 cd/m² is the level of a white sheet of paper in HDR (ITU-R BT.2408): it becomes SDR's white, not its grey.
    `zscale=matrixin=2020_ncl:transferin=${transfer}:primariesin=2020:rangein=${facts.colour.range === 'pc' ? 'full' : 'limited'}:transfer=linear:npl=203`,
    'format=gbrpf32le',
    'zscale=primaries=709',
    'tonemap=tonemap=mobius:desat=0',
    'zscale=transfer=709:matrix=709:range=limited',
    'format=yuv420p',
  ];
}

function audioFilters(facts: SourceFacts, plan: RenditionPlan): string[] {
  if (facts.audioStream === null) return [];
  const { fps, frames } = plan.proxy;
  const startS = (plan.firstFrame * fps.den) / fps.num;
  const endS = ((plan.firstFrame + frames) * fps.den) / fps.num;
  return [
    `[0:${facts.audioStream}]${[
      // The sound's clock is set to zero at the first picture; a late start is filled with silence, an early one cut.
      `asetpts=PTS-${(facts.startMs / 1000).toFixed(6)}/TB`,
      'aresample=48000:async=1:first_pts=0',
      `atrim=start=${startS.toFixed(6)}:end=${endS.toFixed(6)}`,
      'asetpts=PTS-STARTPTS',
    ].join(',')}[sound]`,
  ];
}

function proxyOutput(facts: SourceFacts, threads: string): FfmpegArguments['outputs'][number] {
  const group = String(MAX_GROUP_OF_PICTURES);
  const sound =
    facts.audioStream === null ? ['-an'] : ['-map', '[sound]', '-c:a', 'aac', '-b:a', '96k', '-ac', '2'];
  return {
    target: 'proxy.mp4',
    options: [
      ...['-map', '[proxy]', ...sound, ...KEEP_NO_METADATA, ...REPRODUCIBLE],
      ...[
        '-fps_mode',
        'passthrough',
        '-c:v',
        'libx264',
        '-preset',
        'veryfast',
        '-crf',
        '21',
        '-threads',
        threads,
      ],
      ...['-g', group, '-keyint_min', group, '-sc_threshold', '0', '-bf', '0', '-x264-params', 'open-gop=0'],
      ...['-maxrate', '12M', '-bufsize', '24M', '-pix_fmt', 'yuv420p', ...BT709_TAGS],
      ...['-movflags', '+faststart', '-f', 'mp4'],
    ],
  };
}

function stillOutputs(): FfmpegArguments['outputs'] {
  const jpeg = (label: string, quality: string) => [
    ...['-map', `[${label}]`, ...KEEP_NO_METADATA, ...REPRODUCIBLE],
    ...['-fps_mode', 'passthrough', '-c:v', 'mjpeg', '-q:v', quality, '-threads', '1', '-f', 'image2'],
  ];
  return [
    { target: 'thumbnail-%02d.jpg', options: jpeg('thumbnails', '4') },
    { target: 'filmstrip.jpg', options: [...jpeg('filmstrip', '4'), '-update', '1'] },
    { target: 'poster-%02d.jpg', options: jpeg('posters', '3') },
  ];
}
