import { describe, expect, it } from 'vitest';
import { sniffContainer } from './sniff';

const head = (text: string) => Buffer.from(text, 'latin1');

describe('the first bytes of a file', () => {
  it.each([
    ['an MP4', '\0\0\0\x20ftypisom\0\0\x02\0', { kind: 'video', container: 'iso-bmff' }],
    ['a QuickTime movie', '\0\0\0\x14ftypqt  \0\0\0\0', { kind: 'video', container: 'iso-bmff' }],
    ['a 3GP film', '\0\0\0\x18ftyp3gp4\0\0\0\0', { kind: 'video', container: 'iso-bmff' }],
    [
      'an old QuickTime movie without a file type',
      '\0\0\0\x08wide\0\0\0\0mdat',
      { kind: 'video', container: 'iso-bmff' },
    ],
    ['a box with a 64-bit size', '\0\0\0\x01mdat\0\0\0\0', { kind: 'video', container: 'iso-bmff' }],
    ['WebM or Matroska', '\x1a\x45\xdf\xa3\x9f', { kind: 'video', container: 'matroska' }],
    ['AVI', 'RIFF\0\0\0\0AVI LIST', { kind: 'other-video', format: 'avi' }],
    ['Flash video', 'FLV\x01\x05', { kind: 'other-video', format: 'flv' }],
    ['Ogg', 'OggS\0\x02', { kind: 'other-video', format: 'ogg' }],
    ['a HEIC photograph', '\0\0\0\x18ftypheic', { kind: 'not-video', format: 'picture' }],
    ['an M4A recording', '\0\0\0\x18ftypM4A \0', { kind: 'not-video', format: 'sound' }],
    ['a WebP picture', 'RIFF\0\0\0\0WEBPVP8 ', { kind: 'not-video', format: 'picture' }],
    ['a GIF', 'GIF89a', { kind: 'not-video', format: 'picture' }],
    ['a ZIP archive', 'PK\x03\x04', { kind: 'not-video', format: 'archive' }],
    ['a PDF', '%PDF-1.7', { kind: 'not-video', format: 'document' }],
    ['a playlist', '#EXTM3U\nhttp://a.example/\n', { kind: 'not-video', format: 'text' }],
    ['a web page', '<!doctype html>', { kind: 'not-video', format: 'text' }],
    ['accented text', 'h\xe9 there', { kind: 'not-video', format: 'text' }],
    ['a box too short for its own header', '\0\0\0\x07ftypisom', { kind: 'not-video', format: 'unknown' }],
    ['a box’s name without a size', 'ftyp', { kind: 'not-video', format: 'text' }],
    ['nothing', '', { kind: 'not-video', format: 'empty' }],
    ['zeros', '\0\0\0\0\0\0\0\0\0', { kind: 'not-video', format: 'unknown' }],
  ])('tell %s', (_what, text, answer) => {
    expect(sniffContainer(head(text))).toEqual(answer);
  });

  it.each([
    ['plain', 0, 188],
    ['with time codes', 4, 192],
  ])('tell a transport stream, %s', (_what, start, step) => {
    const stream = Buffer.alloc(4096, 1);
    for (let at = start; at < stream.length; at += step) stream[at] = 0x47;
    expect(sniffContainer(stream)).toEqual({ kind: 'other-video', format: 'mpeg' });
  });
});
