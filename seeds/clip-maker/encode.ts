import { spawn } from 'node:child_process';
import { once } from 'node:events';
import { rename, rm } from 'node:fs/promises';
import type { FileOptions } from './options';

/** What the encoder must know of the pictures it is given. */
export interface Pictures {
  width: number;
  height: number;
  fps: number;
  frameCount: number;
  /** Gives a frame's RGBA bytes; may reuse its buffer after the returned promise of the previous write has settled. */
  frame: (index: number) => Uint8ClampedArray;
}

const FFMPEG = '/usr/bin/ffmpeg';

/** ffmpeg's arguments for a clip. */
export function encodeArgs(
  { width, height, fps, frameCount }: Omit<Pictures, 'frame'>,
  file: FileOptions,
  outPath: string,
): string[] {
  const seconds = frameCount / fps;
  const sound =
    file.audio === 'none'
      ? []
      : [
          '-f',
          'lavfi',
          '-t',
          seconds.toFixed(3),
          '-i',
          file.audio === 'tone' ? 'sine=frequency=440:sample_rate=48000' : 'anullsrc=r=48000:cl=stereo',
        ];
  const video =
    file.codec === 'hevc'
      ? [
          '-c:v',
          'libx265',
          '-preset',
          'ultrafast',
          '-crf',
          '27',
          '-tag:v',
          'hvc1',
          '-x265-params',
          'log-level=error',
        ]
      : ['-c:v', 'libx264', '-preset', 'veryfast', '-crf', '22'];
  const rotated = file.storedRotated ? ['-vf', 'transpose=clock'] : [];
  const place = file.location ? iso6709(file.location) : undefined;
  const tags = [
    ...(place ? ['-metadata', `location=${place}`] : []),
    ...(place && file.codec === 'hevc' ? ['-metadata', `com.apple.quicktime.location.ISO6709=${place}`] : []),
    ...(file.device
      ? [
          '-metadata',
          `com.apple.quicktime.make=${file.device.make}`,
          '-metadata',
          `com.apple.quicktime.model=${file.device.model}`,
          '-metadata',
          `make=${file.device.make}`,
          '-metadata',
          `model=${file.device.model}`,
        ]
      : []),
  ];
  const keepTags = file.device || place ? '+faststart+use_metadata_tags' : '+faststart';
  return [
    '-hide_banner', '-loglevel', 'error', '-nostdin', '-y',
    '-f', 'rawvideo', '-pix_fmt', 'rgba', '-s', `${width}x${height}`, '-r', String(fps), '-i', 'pipe:0',
    ...sound,
    '-map', '0:v:0', ...(sound.length > 0 ? ['-map', '1:a:0', '-c:a', 'aac', '-b:a', '96k'] : []),
    ...rotated, ...video, '-pix_fmt', 'yuv420p', '-colorspace', 'bt709', '-color_primaries', 'bt709', '-color_trc', 'bt709',
    ...tags, '-movflags', keepTags, '-f', file.codec === 'hevc' ? 'mov' : 'mp4', outPath,
  ]; // prettier-ignore
}

const iso6709 = ({ latitude, longitude }: { latitude: number; longitude: number }): string => {
  const part = (value: number, digits: number): string =>
    `${value < 0 ? '-' : '+'}${Math.abs(value)
      .toFixed(4)
      .padStart(digits + 5, '0')}`;
  return `${part(latitude, 2)}${part(longitude, 3)}/`;
};

/** Adds the display matrix that stands the picture up; ffmpeg 5 writes one only while copying. */
async function standUp(path: string, file: FileOptions): Promise<void> {
  const turned = `${path}.turned`;
  const keep = file.device || file.location ? '+faststart+use_metadata_tags' : '+faststart';
  const format = file.codec === 'hevc' ? ['-tag:v', 'hvc1', '-f', 'mov'] : ['-f', 'mp4'];
  const args = [
    '-hide_banner',
    '-loglevel',
    'error',
    '-nostdin',
    '-y',
    '-i',
    path,
    '-map',
    '0',
    '-c',
    'copy',
  ];
  const child = spawn(
    FFMPEG,
    [...args, '-metadata:s:v:0', 'rotate=90', '-movflags', keep, ...format, turned],
    {
      stdio: 'ignore',
    },
  );
  const [code] = (await once(child, 'close')) as [number | null];
  if (code !== 0) {
    await rm(turned, { force: true });
    throw new Error(`ffmpeg could not turn ${path}: exit code ${code ?? 'none'}`);
  }
  await rename(turned, path);
}

/** Pipes the pictures into ffmpeg; the file appears under its name only when whole. Throws with ffmpeg's own words. */
export async function encode(pictures: Pictures, file: FileOptions, outPath: string): Promise<void> {
  const unfinished = `${outPath}.part`;
  const child = spawn(FFMPEG, encodeArgs(pictures, file, unfinished), { stdio: ['pipe', 'ignore', 'pipe'] });
  let said = '';
  child.stderr.setEncoding('utf8');
  child.stderr.on('data', (text: string) => {
    said += text;
  });
  let broken: Error | undefined;
  child.stdin.on('error', (error) => {
    broken = error;
  });
  const closed = once(child, 'close') as Promise<[number | null]>;
  try {
    for (let index = 0; index < pictures.frameCount && !broken; index++) {
      // The painter draws the next picture into the same buffer, so the pipe gets its own copy.
      const bytes = Buffer.from(pictures.frame(index));
      if (!child.stdin.write(bytes)) await Promise.race([once(child.stdin, 'drain'), closed]);
    }
    child.stdin.end();
    const [code] = await closed;
    if (code !== 0 || broken)
      throw new Error(`ffmpeg could not write ${outPath}: ${said.trim() || String(broken ?? code)}`);
    if (file.storedRotated) await standUp(unfinished, file);
    await rename(unfinished, outPath);
  } catch (error) {
    child.kill('SIGKILL');
    await rm(unfinished, { force: true });
    throw error;
  }
}
