import { readFile } from 'node:fs/promises';
import { editListStarts } from './boxes';
import { runTool } from './clip-maker';

/** What ffprobe says of a stream, as far as tests look. */
export interface InspectedStream {
  codec_type: string;
  codec_name: string;
  width?: number;
  height?: number;
  pix_fmt?: string;
  sample_aspect_ratio?: string;
  r_frame_rate: string;
  avg_frame_rate: string;
  start_time: string;
  duration?: string;
  color_space?: string;
  color_transfer?: string;
  color_primaries?: string;
  color_range?: string;
  sample_rate?: string;
  tags?: Record<string, string>;
  side_data_list?: unknown[];
}

/** A finished file, looked at from outside with ffprobe. */
export interface Inspected {
  streams: InspectedStream[];
  tags: Record<string, string>;
  chapters: unknown[];
  /** Of each picture: I, P or B. */
  pictureTypes: string[];
  timesS: number[];
  /** The largest distance from one independently decodable picture to the next. */
  longestGroup: number;
  editListStarts: (number | null)[];
}

/** Reads everything that a test of a proxy asks about. */
export async function inspect(path: string): Promise<Inspected> {
  const sections = [
    '-show_format',
    '-show_streams',
    '-show_chapters',
    '-show_entries',
    'frame=media_type,pict_type,key_frame,pts_time',
  ];
  const report = JSON.parse(
    (await runTool('ffprobe', ['-v', 'error', '-of', 'json', ...sections, path])).toString(),
  ) as {
    streams: InspectedStream[];
    format: { tags?: Record<string, string> };
    chapters: unknown[];
    frames: { media_type: string; pict_type: string; key_frame: number; pts_time: string }[];
  };
  const pictures = report.frames.filter((frame) => frame.media_type === 'video');
  let group = 0;
  let longestGroup = 0;
  for (const frame of pictures) {
    group = frame.key_frame === 1 ? 1 : group + 1;
    longestGroup = Math.max(longestGroup, group);
  }
  return {
    streams: report.streams,
    tags: report.format.tags ?? {},
    chapters: report.chapters,
    pictureTypes: pictures.map((frame) => frame.pict_type),
    timesS: pictures.map((frame) => Number(frame.pts_time)),
    longestGroup,
    editListStarts: path.endsWith('.mp4') ? editListStarts(await readFile(path)) : [],
  };
}

/** The mean grey of a picture file or of a film's first picture, 0 to 255. */
export async function meanGrey(path: string): Promise<number> {
  const raw = await runTool('ffmpeg', [
    '-v',
    'error',
    '-i',
    path,
    '-frames:v',
    '1',
    '-f',
    'rawvideo',
    '-pix_fmt',
    'gray',
    'pipe:1',
  ]);
  return raw.reduce((sum, value) => sum + value, 0) / raw.length;
}

/** The instant at which a film's sound rises above silence, in seconds of the film's clock; `null` if never. */
export async function soundStartsAtS(path: string): Promise<number | null> {
  const rate = 8000;
  const raw = await runTool('ffmpeg', [
    '-v',
    'error',
    '-i',
    path,
    '-map',
    '0:a:0',
    '-ac',
    '1',
    '-ar',
    String(rate),
    '-f',
    's16le',
    'pipe:1',
  ]);
  for (let i = 0; i + 1 < raw.length; i += 2) if (Math.abs(raw.readInt16LE(i)) > 500) return i / 2 / rate;
  return null;
}
