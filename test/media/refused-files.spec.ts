import { writeFile } from 'node:fs/promises';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { EXPLANATIONS, UnplayableError, type UnplayableReason } from '../../server/media';
import { patchFile, setStatedSize, spoilMedia } from './support/boxes';
import { type Canary, setUpCanary, touchCanary } from './support/canary';
import { makeClip, makeWith, QUICK_H264, tone } from './support/clip-maker';
import { type Bench, leftInWorkDirectories, openBench } from './support/harness';

let bench: Bench;
let canary: Canary;
beforeAll(async () => {
  bench = await openBench();
  canary = await setUpCanary(bench.directory);
});
afterAll(async () => {
  await canary.close();
  await bench.tidy();
});

interface Refused {
  what: string;
  name: string;
  because: UnplayableReason;
  make(path: string): Promise<void>;
}

/** A file of given bytes; `http`, `file` and `sibling` in the text point at the canaries. */
const bytes = (
  what: string,
  name: string,
  because: UnplayableReason,
  content: (at: { http: string; file: string }) => string | Buffer,
): Refused => ({
  what,
  name,
  because,
  make: (path) =>
    writeFile(
      path,
      content({ http: `http://127.0.0.1:${canary.port}/seen.ts`, file: canary.path }),
      'latin1',
    ),
});

const box = (type: string, payload: string | Buffer = ''): Buffer => {
  const body = Buffer.from(payload as string, 'latin1');
  const head = Buffer.alloc(8, type, 'latin1');
  head.writeUInt32BE(8 + body.length, 0);
  head.write(type, 4, 'latin1');
  return Buffer.concat([head, body]);
};
const FILE_TYPE = box('ftyp', 'isom\0\0\x02\0isomiso2avc1mp41');

const NOT_VIDEO: Refused[] = [
  bytes('nothing', 'empty.mp4', 'empty', () => ''),
  bytes('one byte', 'byte.mp4', 'not-video', () => '\0'),
  bytes('text', 'notes.mp4', 'not-video', () => 'three sets of five\n'),
  bytes('a web page', 'page.mp4', 'not-video', () => '<!doctype html><script>fetch("/")</script>'),
  bytes(
    'a drawing with a script',
    'drawing.mp4',
    'not-video',
    ({ http }) => `<svg xmlns="http://www.w3.org/2000/svg"><image href="${http}"/></svg>`,
  ),
  bytes('an archive', 'archive.mp4', 'not-video', () => 'PK\x03\x04\x14\0\0\0\0\0'),
  bytes('a compressed archive', 'archive.mov', 'not-video', () => '\x1f\x8b\x08\0\0\0\0\0'),
  bytes('an animation', 'animation.mp4', 'not-video', () => 'GIF89a\x01\0\x01\0\0\0\0;'),
  bytes('a photograph', 'photo.mp4', 'not-video', () => '\xff\xd8\xff\xe0\0\x10JFIF\0'),
  bytes('a phone’s photograph in the films’ container', 'photo.mov', 'not-video', () =>
    box('ftyp', 'heic\0\0\0\0mif1heic'),
  ),
  bytes('a document', 'form.mp4', 'not-video', () => '%PDF-1.7\n'),
  bytes('a program', 'setup.mp4', 'not-video', () => '\x7fELF\x02\x01\x01\0'),
  bytes('noise', 'noise.mp4', 'not-video', () =>
    Buffer.from(Array.from({ length: 5000 }, (_, i) => (i * 197 + 83) % 256)),
  ),
  bytes(
    'a playlist naming a network address',
    'list.mp4',
    'not-video',
    ({ http }) => `#EXTM3U\n#EXTINF:1,\n${http}\n#EXT-X-ENDLIST\n`,
  ),
  bytes(
    'a playlist naming a local file',
    'local-list.mp4',
    'not-video',
    ({ file }) => `#EXTM3U\n#EXTINF:1,\nfile://${file}\n#EXT-X-ENDLIST\n`,
  ),
  bytes(
    'a playlist joining a file to an address',
    'join-list.mp4',
    'not-video',
    ({ http, file }) => `#EXTM3U\n#EXTINF:1,\nconcat:${http}|file:${file}\n#EXT-X-ENDLIST\n`,
  ),
  bytes(
    'a script joining a neighbour’s file',
    'join.mp4',
    'not-video',
    () => 'ffconcat version 1.0\nfile canary.txt\n',
  ),
  bytes(
    'a script joining an absolute path',
    'join-absolute.mp4',
    'not-video',
    ({ file }) => `ffconcat version 1.0\nfile ${file}\n`,
  ),
  bytes(
    'a session description',
    'session.mp4',
    'not-video',
    () => `v=0\no=- 0 0 IN IP4 127.0.0.1\nc=IN IP4 127.0.0.1\nm=video ${canary.port} RTP/AVP 96\n`,
  ),
  bytes(
    'an adaptive streaming manifest',
    'manifest.mp4',
    'not-video',
    ({ http }) => `<?xml version="1.0"?><MPD><Period><BaseURL>${http}</BaseURL></Period></MPD>`,
  ),
  bytes('a film’s first box, then a playlist', 'two-faced-list.mp4', 'damaged', ({ http }) =>
    Buffer.concat([FILE_TYPE, Buffer.from(`\n#EXTM3U\n#EXTINF:1,\n${http}\n`)]),
  ),
  bytes('a film’s first box and nothing more', 'head-only.mp4', 'damaged', () => FILE_TYPE),
  bytes('an index that claims to be larger than the file', 'huge-index.mp4', 'damaged', () =>
    Buffer.concat([FILE_TYPE, Buffer.from('\x7f\xff\xff\xffmoov\0\0\0\x08mvhd', 'latin1')]),
  ),
  bytes('a WebM header followed by noise', 'noise.webm', 'damaged', () =>
    Buffer.concat([Buffer.from('1a45dfa3', 'hex'), Buffer.alloc(3000, 0xa7)]),
  ),
];

const OTHER_KINDS: Refused[] = [
  {
    what: 'AVI',
    name: 'film.avi',
    because: 'unsupported-container',
    make: (path) => makeClip(path, { output: ['-c:v', 'mpeg4'] }),
  },
  {
    what: 'a transport stream',
    name: 'film.ts',
    because: 'unsupported-container',
    make: (path) => makeClip(path),
  },
  { what: 'Flash video', name: 'film.flv', because: 'unsupported-container', make: (path) => makeClip(path) },
  {
    what: 'Ogg',
    name: 'film.ogv',
    because: 'unsupported-container',
    make: (path) => makeClip(path, { output: ['-c:v', 'libtheora'] }),
  },
  {
    what: 'a codec that is not on the list',
    name: 'mpeg2.mp4',
    because: 'unsupported-codec',
    make: (path) => makeClip(path, { output: ['-c:v', 'mpeg2video', '-f', 'mp4'] }),
  },
  {
    what: 'a lossless codec in Matroska',
    name: 'ffv1.mkv',
    because: 'unsupported-codec',
    make: (path) => makeClip(path, { output: ['-c:v', 'ffv1'] }),
  },
  {
    what: 'sound alone, named a film',
    name: 'sound.mp4',
    because: 'no-picture',
    make: (path) => makeWith([...tone(1), '-c:a', 'aac', path]),
  },
  {
    what: 'sound alone',
    name: 'sound.m4a',
    because: 'not-video',
    make: (path) => makeWith([...tone(1), '-c:a', 'aac', path]),
  },
  {
    what: 'sound with a cover picture',
    name: 'album.mp4',
    because: 'no-picture',
    make: async (path) => {
      await makeWith(['-f', 'lavfi', '-i', 'color=red:size=600x600', '-frames:v', '1', `${path}.png`]);
      await makeWith([
        ...tone(1),
        '-i',
        `${path}.png`,
        '-map',
        '0',
        '-map',
        '1',
        '-c:a',
        'aac',
        '-c:v',
        'png',
        '-disposition:v',
        'attached_pic',
        path,
      ]);
    },
  },
  {
    what: 'an encrypted film',
    name: 'locked.mp4',
    because: 'encrypted',
    make: (path) =>
      makeClip(path, {
        output: [
          ...QUICK_H264,
          '-encryption_scheme',
          'cenc-aes-ctr',
          '-encryption_key',
          '00112233445566778899aabbccddeeff',
          '-encryption_kid',
          'ffeeddccbbaa99887766554433221100',
        ],
      }),
  },
];

const DAMAGED: Refused[] = [
  {
    what: 'a film cut in half, its index at the front',
    name: 'half.mp4',
    because: 'damaged',
    make: async (path) => {
      await makeClip(path, { frames: 60, output: [...QUICK_H264, '-movflags', '+faststart'] });
      await patchFile(path, (film) => film.subarray(0, film.length / 2));
    },
  },
  {
    what: 'a film cut in half, its index lost',
    name: 'indexless.mp4',
    because: 'damaged',
    make: async (path) => {
      await makeClip(path, { frames: 60 });
      await patchFile(path, (film) => film.subarray(0, film.length / 2));
    },
  },
  {
    what: 'noise over most of the coded pictures',
    name: 'spoilt.mp4',
    because: 'damaged',
    make: async (path) => {
      await makeClip(path, { frames: 60, output: [...QUICK_H264, '-g', '5'] });
      await patchFile(path, (film) => spoilMedia(film, 0.1, 0.95));
    },
  },
];

const BOMBS: Refused[] = [
  {
    what: 'one picture',
    name: 'one.mp4',
    because: 'too-short',
    make: (path) => makeClip(path, { frames: 1 }),
  },
  {
    what: 'two pictures',
    name: 'two.mp4',
    because: 'too-short',
    make: (path) => makeClip(path, { frames: 2 }),
  },
  {
    what: 'a third of a second',
    name: 'blink.mp4',
    because: 'too-short',
    make: (path) => makeClip(path, { rate: '60', frames: 20 }),
  },
  {
    what: 'no picture in the picture track',
    name: 'none.mkv',
    because: 'no-picture',
    make: (path) =>
      makeClip(path, {
        inputs: tone(1),
        output: ['-map', '0', '-map', '1', '-vf', 'select=0', ...QUICK_H264, '-c:a', 'aac'],
      }),
  },
  {
    what: 'one picture a second for an hour',
    name: 'hour.mp4',
    because: 'too-long',
    make: (path) =>
      makeWith(['-f', 'lavfi', '-i', 'color=size=64x64:rate=1:duration=3600', ...QUICK_H264, path]),
  },
  {
    what: 'an hour that the header hides',
    name: 'hidden-hour.mkv',
    because: 'too-long',
    make: (path) =>
      makeWith([
        '-f',
        'lavfi',
        '-i',
        'color=size=64x64:rate=1:duration=3600',
        ...QUICK_H264,
        '-live',
        '1',
        path,
      ]),
  },
  {
    what: 'two minutes and five seconds',
    name: 'long.mp4',
    because: 'too-long',
    make: (path) =>
      makeWith(['-f', 'lavfi', '-i', 'color=size=64x64:rate=10:duration=125', ...QUICK_H264, path]),
  },
  {
    what: 'a gap of a day between two pictures',
    name: 'gap.mkv',
    because: 'too-long',
    make: (path) =>
      makeClip(path, {
        output: [
          '-vf',
          "setpts='if(gte(N,15),PTS+86400/TB,PTS)'",
          '-fps_mode',
          'passthrough',
          ...QUICK_H264,
          '-live',
          '1',
        ],
      }),
  },
  {
    what: 'a time-lapse of two pictures a second',
    name: 'lapse.mp4',
    because: 'too-few-frames',
    make: (path) => makeClip(path, { rate: '2', frames: 20 }),
  },
  {
    what: 'a thousand pictures a second',
    name: 'thousand.mp4',
    because: 'too-many-frames',
    make: (path) => makeClip(path, { rate: '1000', frames: 1000, width: 64, height: 64 }),
  },
  {
    what: 'a picture wider than 4K',
    name: 'wide.mp4',
    because: 'too-big-picture',
    make: (path) => makeClip(path, { width: 5120, height: 100, frames: 13 }),
  },
  {
    what: 'a tiny picture',
    name: 'tiny.mp4',
    because: 'too-small-picture',
    make: (path) => makeClip(path, { width: 32, height: 32 }),
  },
  {
    what: 'samples a thousand times as wide as high',
    name: 'stretched.mp4',
    because: 'too-big-picture',
    make: (path) => makeClip(path, { output: ['-vf', 'setsar=1000/1', ...QUICK_H264] }),
  },
  {
    what: 'a header that states 16000 by 16000',
    name: 'pixels.mp4',
    because: 'too-big-picture',
    make: async (path) => {
      await makeClip(path, { output: ['-c:v', 'mjpeg', '-q:v', '5', '-pix_fmt', 'yuvj420p', '-f', 'mov'] });
      await patchFile(path, (film) => setStatedSize(film, 'jpeg', 16000, 16000));
    },
  },
  {
    what: 'pictures of 16000 by 16000 behind a modest header',
    name: 'pixels.webm',
    because: 'too-big-picture',
    make: async (path) => {
      await makeClip(path, { output: ['-c:v', 'libvpx', '-deadline', 'realtime', '-g', '1'] });
      // A VP8 key picture starts 9d 01 2a, then width and height in 14 bits each (RFC 6386 §9.1).
      await patchFile(path, (film) => {
        for (let at = film.indexOf('9d012a', 0, 'hex'); at >= 0; at = film.indexOf('9d012a', at + 1, 'hex')) {
          film.writeUInt16LE(16000, at + 3);
          film.writeUInt16LE(16000, at + 5);
        }
        return film;
      });
    },
  },
  {
    what: 'twenty sound tracks',
    name: 'orchestra.mp4',
    because: 'too-many-streams',
    make: (path) =>
      makeClip(path, {
        inputs: tone(1),
        output: [
          '-map',
          '0',
          ...Array.from({ length: 20 }, () => ['-map', '1']).flat(),
          ...QUICK_H264,
          '-c:a',
          'aac',
        ],
      }),
  },
];

describe('what cannot be shown is refused, with a reason and a remedy', () => {
  it.each([...NOT_VIDEO, ...OTHER_KINDS, ...DAMAGED, ...BOMBS])(
    '$what: $because',
    async ({ name, because, make }) => {
      const path = bench.file(name);
      await make(path);
      const before = await leftInWorkDirectories(bench);
      const answer = await bench.judge(path);
      expect(answer, 'it was accepted').toBeInstanceOf(UnplayableError);
      expect(answer).toMatchObject({
        reason: because,
        message: EXPLANATIONS[because].message,
        remedy: EXPLANATIONS[because].remedy,
      });
      expect(await canary.touches()).toEqual({ connections: 0, fileReads: 0 });
      expect(await leftInWorkDirectories(bench)).toEqual(before);
    },
  );

  it('refuses a trim that leaves nothing', async () => {
    const path = bench.file('trimmed-away.mp4');
    await makeClip(path, { frames: 60 });
    await expect(bench.render(path, { trim: { startMs: 1000, endMs: 1100 } })).rejects.toMatchObject({
      reason: 'bad-trim',
    });
    await expect(bench.render(path, { trim: { startMs: 1500, endMs: 500 } })).rejects.toMatchObject({
      reason: 'bad-trim',
    });
    await expect(bench.render(path, { trim: { startMs: Number.NaN, endMs: 500 } })).rejects.toMatchObject({
      reason: 'bad-trim',
    });
  });

  it('keeps to the limits that it is given', async () => {
    const path = bench.file('within.mp4');
    await makeClip(path, { frames: 60 });
    const { DEFAULT_LIMITS } = await import('../../server/media');
    await expect(
      bench.render(path, { limits: { ...DEFAULT_LIMITS, maxDurationMs: 1000 } }),
    ).rejects.toMatchObject({ reason: 'too-long' });
  });

  it('has canaries that do sing', async () => {
    const other = await setUpCanary(bench.directory);
    await touchCanary(other);
    expect(await other.touches()).toEqual({ connections: 1, fileReads: 1 });
    await other.close();
  });
});
