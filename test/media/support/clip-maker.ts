import { spawn } from 'node:child_process';

/**
 * Makes small clips whose every picture carries its own number, so that a test can tell which picture it is looking
 * at after any amount of transcoding.
 */

/** Bits in a picture's number. */
const BITS = 10;
const LIGHT = 220;
const DARK = 30;

/** Runs a program to its end; rejects with what it said if it fails. Resolves to its standard output. */
export function runTool(program: string, args: readonly string[], stdin?: Buffer): Promise<Buffer> {
  return new Promise((resolve, reject) => {
    const child = spawn(program, args, { stdio: ['pipe', 'pipe', 'pipe'] });
    const out: Buffer[] = [];
    const said: Buffer[] = [];
    child.stdout.on('data', (chunk: Buffer) => out.push(chunk));
    child.stderr.on('data', (chunk: Buffer) => said.push(chunk));
    child.stdin.on('error', (error: NodeJS.ErrnoException) => {
      // The program may have all it needs before it has read everything.
      if (error.code !== 'EPIPE') reject(error);
    });
    child.on('error', reject);
    child.on('close', (code) => {
      if (code === 0) resolve(Buffer.concat(out));
      else
        reject(
          new Error(`${program} ${args.join(' ')}\nexited with ${code}: ${Buffer.concat(said).toString()}`),
        );
    });
    child.stdin.end(stdin);
  });
}

/**
 * Draws grey pictures: the upper half holds the number as ten upright bars (most significant first, light is 1);
 * the lower half is light on the left and dark on the right, so that turning and mirroring show.
 */
export function drawNumberedFrames(width: number, height: number, numbers: readonly number[]): Buffer {
  const frame = Buffer.alloc(width * height);
  const frames = Buffer.alloc(frame.length * numbers.length);
  for (const [index, number] of numbers.entries()) {
    for (let y = 0; y < height; y++) {
      for (let x = 0; x < width; x++) {
        const bit = (number >> (BITS - 1 - Math.floor((x * BITS) / width))) & 1;
        const upper = bit === 1 ? LIGHT : DARK;
        frame[y * width + x] = y < height / 2 ? upper : x < width / 2 ? LIGHT : DARK;
      }
    }
    frame.copy(frames, index * frame.length);
  }
  return frames;
}

/** What a numbered clip is made of; the defaults give one second of 320×180 at 30, H.264 without sound. */
export interface ClipRecipe {
  width?: number;
  height?: number;
  /** Pictures a second, as ffmpeg reads it (`30000/1001`). */
  rate?: string;
  frames?: number;
  /** Further inputs, for instance sound. */
  inputs?: string[];
  /** Everything between the inputs and the file's name: codecs, filters, metadata, muxer options. */
  output?: string[];
}

/** H.264 as quickly as can be. */
export const QUICK_H264 = ['-c:v', 'libx264', '-preset', 'ultrafast', '-pix_fmt', 'yuv420p'];
/** A quiet tone as long as the given seconds, as a second input. */
export const tone = (seconds: number): string[] => [
  '-f',
  'lavfi',
  '-i',
  `sine=frequency=440:duration=${seconds}`,
];
const SAFE_START = ['-v', 'error', '-nostdin', '-y'];

/** Makes a numbered clip at `path`; picture n carries the number n. */
export async function makeClip(path: string, recipe: ClipRecipe = {}): Promise<void> {
  const { width = 320, height = 180, rate = '30', frames = 30, inputs = [], output = QUICK_H264 } = recipe;
  const numbers = Array.from({ length: frames }, (_, n) => n);
  await runTool(
    'ffmpeg',
    [
      ...[
        '-v',
        'error',
        '-y',
        '-f',
        'rawvideo',
        '-pix_fmt',
        'gray',
        '-s',
        `${width}x${height}`,
        '-r',
        rate,
        '-i',
        'pipe:0',
      ],
      ...inputs,
      ...output,
      path,
    ],
    drawNumberedFrames(width, height, numbers),
  );
}

/** Runs ffmpeg with these words; the last is usually a path. */
export async function makeWith(args: readonly string[]): Promise<void> {
  await runTool('ffmpeg', [...SAFE_START, ...args]);
}

/** What one picture of a clip shows. */
export interface ShownFrame {
  number: number;
  /** The lower left is light and the lower right is dark, as drawn. */
  upright: boolean;
}

/** Decodes a clip and reads the number in each of its pictures. The size is the clip's own. */
export async function readNumbers(
  path: string,
  size: { width: number; height: number },
): Promise<ShownFrame[]> {
  const { width, height } = size;
  const raw = await runTool('ffmpeg', [
    ...['-v', 'error', '-nostdin', '-noautorotate', '-i', path, '-map', '0:v:0', '-fps_mode', 'passthrough'],
    ...['-f', 'rawvideo', '-pix_fmt', 'gray', 'pipe:1'],
  ]);
  const frameBytes = width * height;
  const shown: ShownFrame[] = [];
  for (let start = 0; start + frameBytes <= raw.length; start += frameBytes) {
    const light = (x: number, y: number) =>
      (raw[start + Math.floor(y * height) * width + Math.floor(x * width)] ?? 0) > (LIGHT + DARK) / 2;
    let number = 0;
    for (let bit = 0; bit < BITS; bit++) number = number * 2 + (light((bit + 0.5) / BITS, 0.25) ? 1 : 0);
    shown.push({ number, upright: light(0.25, 0.75) && !light(0.75, 0.75) });
  }
  return shown;
}
