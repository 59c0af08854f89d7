import { readFile, writeFile } from 'node:fs/promises';

/** Small repairs in reverse: changes to finished files that make their headers lie. Offsets as in ISO/IEC 14496-12. */

/** Where the payload of the first box of a type begins; throws if the file has none. */
function payloadOf(file: Buffer, type: string, from = 0): number {
  const at = file.indexOf(type, from, 'latin1');
  if (at < 4) throw new Error(`no ${type} box`);
  return at + 4;
}

/** Applies a change to a file's bytes in place. */
export async function patchFile(path: string, change: (file: Buffer) => Buffer): Promise<void> {
  await writeFile(path, change(await readFile(path)));
}

/** Writes the display matrix of the first track: turned clockwise by whole quarters, after being mirrored or not. */
export function setOrientation(file: Buffer, rotation: number, mirrored: boolean): Buffer {
  const angle = (rotation * Math.PI) / 180;
  const [cos, sin] = [Math.round(Math.cos(angle)), Math.round(Math.sin(angle))];
  const flip = mirrored ? -1 : 1;
  const matrix = [flip * cos, flip * sin, 0, -sin, cos, 0, 0, 0, 1];
  // tkhd, version 0: flags 4, times and ids 20, reserved 8, layer to volume 8.
  const start = payloadOf(file, 'tkhd') + 40;
  matrix.forEach((value, i) => file.writeInt32BE(value * (i % 3 === 2 ? 2 ** 30 : 2 ** 16), start + 4 * i));
  return file;
}

/** Makes the whole film, its first track and its first media claim to last this many times as long. */
export function stretchStatedDuration(file: Buffer, factor: number): Buffer {
  for (const [type, offset] of [
    ['mvhd', 16],
    ['tkhd', 20],
    ['mdhd', 16],
  ] as const) {
    const at = payloadOf(file, type) + offset;
    file.writeUInt32BE(Math.min(2 ** 32 - 1, Math.round(file.readUInt32BE(at) * factor)), at);
  }
  return file;
}

/** Makes the first picture track's sample entry claim a size. */
export function setStatedSize(file: Buffer, entry: string, width: number, height: number): Buffer {
  // VisualSampleEntry: 8 of the general entry, 16 reserved or predefined, then width and height.
  const at = payloadOf(file, entry, file.indexOf('stsd')) + 24;
  file.writeUInt16BE(width, at);
  file.writeUInt16BE(height, at + 2);
  return file;
}

/** Overwrites the middle of the coded pictures with noise that is the same on every run. */
export function spoilMedia(file: Buffer, from: number, to: number): Buffer {
  const start = payloadOf(file, 'mdat');
  const length = file.readUInt32BE(start - 8) - 8;
  let state = 12345;
  for (let i = Math.floor(start + from * length); i < start + to * length; i++) {
    state = (state * 1103515245 + 12345) % 2147483648;
    file[i] = state >> 16;
  }
  return file;
}

/** The media time of the first entry of each track's edit list, in the order of the tracks; none is `null`. */
export function editListStarts(file: Buffer): (number | null)[] {
  const starts: (number | null)[] = [];
  for (let at = file.indexOf('trak'); at >= 0;) {
    const next = file.indexOf('trak', at + 4);
    const track = file.subarray(at, next < 0 ? undefined : next);
    const list = track.indexOf('elst');
    starts.push(list < 0 ? null : track.readInt32BE(list + 4 + 8 + 4));
    at = next;
  }
  return starts;
}
