/** What a file is, told by its first bytes alone; its name and declared type are never asked. */
export type Sniffed =
  | { kind: 'video'; container: 'iso-bmff' | 'matroska' }
  | { kind: 'other-video'; format: 'avi' | 'mpeg' | 'asf' | 'flv' | 'ogg' }
  | {
      kind: 'not-video';
      format: 'empty' | 'picture' | 'sound' | 'archive' | 'document' | 'program' | 'text' | 'unknown';
    };

/** How many leading bytes {@link sniffContainer} can use. */
export const SNIFF_BYTES = 4096;

/** Top-level boxes that may stand first in an ISO base media file (ISO/IEC 14496-12) or a QuickTime movie. */
const FIRST_BOXES = new Set([
  'ftyp',
  'moov',
  'mdat',
  'free',
  'skip',
  'wide',
  'pnot',
  'styp',
  'moof',
  'sidx',
  'uuid',
]);
/** Brands of still pictures (HEIF, AVIF) and of sound (M4A), which share the container with films. */
const PICTURE_BRANDS = new Set(['heic', 'heix', 'heim', 'heis', 'mif1', 'avif']);
const SOUND_BRANDS = new Set(['M4A ', 'M4B ', 'M4P ', 'F4A ']);

type Signature = readonly [offset: number, bytes: string, answer: Sniffed];

const notVideo = (format: (Sniffed & { kind: 'not-video' })['format']): Sniffed => ({
  kind: 'not-video',
  format,
});
const otherVideo = (format: (Sniffed & { kind: 'other-video' })['format']): Sniffed => ({
  kind: 'other-video',
  format,
});

/** File signatures as published by their formats; written from memory. */
const SIGNATURES: readonly Signature[] = [
  [0, '\xff\xd8\xff', notVideo('picture')],
  [0, '\x89PNG\r\n\x1a\n', notVideo('picture')],
  [0, 'GIF87a', notVideo('picture')],
  [0, 'GIF89a', notVideo('picture')],
  [0, 'BM', notVideo('picture')],
  [0, 'II*\0', notVideo('picture')],
  [0, 'MM\0*', notVideo('picture')],
  [8, 'WEBP', notVideo('picture')],
  [8, 'WAVE', notVideo('sound')],
  [8, 'AVI ', otherVideo('avi')],
  [0, 'ID3', notVideo('sound')],
  [0, 'fLaC', notVideo('sound')],
  [0, '#!AMR', notVideo('sound')],
  [0, 'OggS', otherVideo('ogg')],
  [0, 'FLV\x01', otherVideo('flv')],
  [0, '\x30\x26\xb2\x75\x8e\x66\xcf\x11', otherVideo('asf')],
  [0, '\0\0\x01\xba', otherVideo('mpeg')],
  [0, '\0\0\x01\xb3', otherVideo('mpeg')],
  [0, 'PK\x03\x04', notVideo('archive')],
  [0, 'PK\x05\x06', notVideo('archive')],
  [0, '\x1f\x8b', notVideo('archive')],
  [0, 'Rar!', notVideo('archive')],
  [0, '7z\xbc\xaf\x27\x1c', notVideo('archive')],
  [0, '%PDF', notVideo('document')],
  [0, '\x7fELF', notVideo('program')],
  [0, 'MZ', notVideo('program')],
];

function sniffIsoBox(head: Buffer): Sniffed | null {
  if (head.length < 8 || !FIRST_BOXES.has(head.toString('latin1', 4, 8))) return null;
  const boxBytes = head.readUInt32BE(0);
  // 0 runs to the end of the file, 1 says that a 64-bit size follows; anything else holds at least its own header.
  if (boxBytes > 1 && boxBytes < 8) return null;
  if (head.toString('latin1', 4, 8) === 'ftyp') {
    const brand = head.toString('latin1', 8, 12);
    if (PICTURE_BRANDS.has(brand)) return notVideo('picture');
    if (SOUND_BRANDS.has(brand)) return notVideo('sound');
  }
  return { kind: 'video', container: 'iso-bmff' };
}

function isTransportStream(head: Buffer): boolean {
  // MPEG-2 transport packets begin with 0x47 and are 188 bytes long, or 192 with a time code before each.
  const repeats = (start: number, step: number) =>
    head.length > start + 2 * step && [0, 1, 2].every((n) => head[start + n * step] === 0x47);
  return repeats(0, 188) || repeats(4, 192);
}

function isText(head: Buffer): boolean {
  return head.every((byte) => byte === 9 || byte === 10 || byte === 13 || (byte >= 32 && byte !== 127));
}

/**
 * Says what a file is from its first {@link SNIFF_BYTES} bytes (fewer if the file is shorter).
 * Pure: reads nothing. A `video` answer is a first sieve only; the probe has the last word.
 */
export function sniffContainer(head: Buffer): Sniffed {
  if (head.length === 0) return notVideo('empty');
  const iso = sniffIsoBox(head);
  if (iso) return iso;
  if (head.length >= 4 && head.readUInt32BE(0) === 0x1a45dfa3)
    return { kind: 'video', container: 'matroska' };
  for (const [offset, bytes, answer] of SIGNATURES) {
    if (head.toString('latin1', offset, offset + bytes.length) === bytes) return answer;
  }
  if (isTransportStream(head)) return otherVideo('mpeg');
  return notVideo(isText(head) ? 'text' : 'unknown');
}
