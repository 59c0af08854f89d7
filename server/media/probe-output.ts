import { z } from 'zod';

/**
 * What is read of ffprobe's JSON (`-show_format -show_streams`, perhaps `-show_packets`; ffmpeg 5.1). Everything in it may come from a
 * hostile file, so it is parsed like a request's body.
 */
const streamSchema = z.object({
  index: z.number().int().min(0),
  codec_type: z.string().optional(),
  codec_name: z.string().optional(),
  codec_tag_string: z.string().optional(),
  width: z.number().int().optional(),
  height: z.number().int().optional(),
  pix_fmt: z.string().optional(),
  sample_aspect_ratio: z.string().optional(),
  field_order: z.string().optional(),
  color_range: z.string().optional(),
  color_space: z.string().optional(),
  color_transfer: z.string().optional(),
  r_frame_rate: z.string().optional(),
  duration: z.coerce.number().optional(),
  disposition: z.object({ attached_pic: z.number().optional() }).optional(),
  side_data_list: z
    .array(z.object({ side_data_type: z.string().optional(), displaymatrix: z.string().optional() }))
    .optional(),
});

const headerSchema = z.object({
  streams: z.array(streamSchema).default([]),
  format: z
    .object({
      format_name: z.string().optional(),
      start_time: z.coerce.number().optional(),
      duration: z.coerce.number().optional(),
      tags: z.record(z.string(), z.string()).optional(),
    })
    .default({}),
  packets: z
    .array(
      z.object({
        codec_type: z.string().optional(),
        pts_time: z.coerce.number().optional(),
        flags: z.string(),
        side_data_list: z.array(z.object({ side_data_type: z.string().optional() })).optional(),
      }),
    )
    .default([]),
});

/** One stream of a file as ffprobe describes it. */
export type ProbedStream = z.infer<typeof streamSchema>;
/** A file's header as ffprobe describes it. */
export type ProbedHeader = z.infer<typeof headerSchema>;

/** Reads ffprobe's JSON; `null` if it is not what ffprobe writes. */
export function parseHeader(json: string): ProbedHeader | null {
  try {
    const parsed = headerSchema.safeParse(JSON.parse(json));
    return parsed.success ? parsed.data : null;
  } catch (error) {
    if (error instanceof SyntaxError) return null;
    throw error;
  }
}

/** One coded picture's place in time, in seconds of the container's clock. */
export interface Packet {
  timeS: number;
  durationS: number | null;
}

/**
 * Reads ffprobe's `packet=pts_time,dts_time,duration_time,flags` lines (`-of csv=p=0`).
 * Packets that the file's edit list hides (flag D) and those without a time are left out.
 */
export function parsePackets(csv: string): Packet[] {
  return csv.split('\n').flatMap((line) => {
    const [pts = '', dts = '', duration = '', flags = ''] = line.split(',');
    const timeS = Number.parseFloat(pts === 'N/A' ? dts : pts);
    if (!Number.isFinite(timeS) || flags.includes('D')) return [];
    const durationS = Number.parseFloat(duration);
    return [{ timeS, durationS: Number.isFinite(durationS) ? durationS : null }];
  });
}

/** How a display matrix stands the stored picture upright: turned clockwise, after being mirrored left to right or not. */
export interface Orientation {
  rotation: 0 | 90 | 180 | 270;
  mirrored: boolean;
}

/**
 * Reads ffprobe's print of a display matrix (ISO/IEC 14496-12 §8.3.2, `tkhd`), rounded to quarter turns.
 * No matrix, or one that cannot be read, means upright.
 */
export function parseOrientation(stream: ProbedStream): Orientation {
  const text =
    stream.side_data_list?.find((data) => data.side_data_type === 'Display Matrix')?.displaymatrix ?? '';
  const rows = [...text.matchAll(/^\d{8}:\s+(-?\d+)\s+(-?\d+)\s+(-?\d+)/gm)];
  const [a, b] = [Number(rows[0]?.[1]), Number(rows[0]?.[2])];
  const [c, d] = [Number(rows[1]?.[1]), Number(rows[1]?.[2])];
  const determinant = a * d - b * c;
  if (!Number.isFinite(determinant) || determinant === 0) return { rotation: 0, mirrored: false };
  const mirrored = determinant < 0;
  const quarters = Math.round(Math.atan2(mirrored ? -b : b, mirrored ? -a : a) / (Math.PI / 2));
  return { rotation: ((((quarters % 4) + 4) % 4) * 90) as Orientation['rotation'], mirrored };
}
