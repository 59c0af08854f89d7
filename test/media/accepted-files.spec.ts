import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { type Renditions, type SourceFacts } from '../../server/media';
import { patchFile, setOrientation, stretchStatedDuration } from './support/boxes';
import { makeClip, makeWith, QUICK_H264, readNumbers, runTool, tone } from './support/clip-maker';
import { type Bench, openBench } from './support/harness';
import { inspect, meanGrey, soundStartsAtS } from './support/inspect';

let bench: Bench;
beforeAll(async () => {
  bench = await openBench();
});
afterAll(() => bench.tidy());

interface Accepted {
  what: string;
  name: string;
  make(path: string): Promise<void>;
  facts?: Partial<SourceFacts>;
  proxy?: Partial<Renditions['proxy']>;
  /** The number that the proxy's picture n shows; the same number unless said otherwise. */
  shows?(n: number): number;
}

const QUICK_HEVC = [
  '-c:v',
  'libx265',
  '-preset',
  'ultrafast',
  '-x265-params',
  'log-level=error',
  '-tag:v',
  'hvc1',
];
const AAC = ['-c:a', 'aac', '-b:a', '64k'];
const thirty = { num: 30, den: 1 };

const CASES: Accepted[] = [
  {
    what: 'plain H.264 with sound',
    name: 'plain.mp4',
    make: (path) => makeClip(path, { inputs: tone(1), output: [...QUICK_H264, ...AAC] }),
    facts: {
      container: 'iso-bmff',
      codec: 'h264',
      hasAudio: true,
      frames: 30,
      frameRate: thirty,
      variableFrameRate: false,
      hdr: 'none',
    },
    proxy: {
      width: 320,
      height: 180,
      frames: 30,
      fps: thirty,
      durationMs: 1000,
      hasAudio: true,
      sourceStartMs: 0,
    },
  },
  {
    what: 'no sound at all',
    name: 'silent.mp4',
    make: (path) => makeClip(path),
    facts: { hasAudio: false, audioStream: null },
    proxy: { hasAudio: false },
  },
  {
    what: 'a name that lies about the kind',
    name: 'holiday.jpg; rm -rf $(pwd) %03d.html',
    make: (path) => makeClip(path, { output: [...QUICK_H264, '-f', 'mp4'] }),
    proxy: { frames: 30 },
  },
  {
    what: 'bidirectional pictures, long groups and the index at the end',
    name: 'b-frames.mp4',
    make: (path) =>
      makeClip(path, {
        output: ['-c:v', 'libx264', '-preset', 'fast', '-bf', '3', '-g', '250', '-pix_fmt', 'yuv420p'],
      }),
    proxy: { frames: 30 },
  },
  ...[
    ['24000/1001', { num: 24000, den: 1001 }],
    ['25', { num: 25, den: 1 }],
    ['30000/1001', { num: 30000, den: 1001 }],
    ['50', { num: 50, den: 1 }],
    ['60000/1001', { num: 60000, den: 1001 }],
  ].map(([rate, fps]): Accepted => ({
    what: `${String(rate)} pictures a second`,
    name: `rate-${String(rate).replace('/', '-')}.mov`,
    make: (path) => makeClip(path, { rate: String(rate) }),
    facts: { frameRate: fps as { num: number; den: number }, variableFrameRate: false },
    proxy: { fps: fps as { num: number; den: number }, frames: 30 },
  })),
  {
    what: 'slow motion: 240 pictures a second in real time become 60, each of them the source’s own',
    name: 'slow-240.mp4',
    make: (path) => makeClip(path, { rate: '240', frames: 240 }),
    facts: { frameRate: { num: 240, den: 1 }, frames: 240, durationMs: 1000, slowedBy: 1 },
    proxy: { fps: { num: 60, den: 1 }, frames: 60, durationMs: 1000 },
    shows: (n) => 4 * n,
  },
  {
    what: 'slow motion stored eight times slower than life plays in real time',
    name: 'slowed.mp4',
    make: (path) =>
      makeClip(path, {
        frames: 240,
        output: [
          ...QUICK_H264,
          '-metadata',
          'com.android.capture.fps=240.000000',
          '-movflags',
          'use_metadata_tags',
        ],
      }),
    facts: { slowedBy: 8, durationMs: 1000, frameRate: { num: 240, den: 1 } },
    proxy: { fps: { num: 60, den: 1 }, frames: 60, durationMs: 1000 },
    shows: (n) => 4 * n,
  },
  {
    what: 'HEVC in ten bits',
    name: 'hevc.mov',
    make: (path) => makeClip(path, { output: [...QUICK_HEVC, '-pix_fmt', 'yuv420p10le'] }),
    facts: { codec: 'hevc', pixelFormat: 'yuv420p10le' },
    proxy: { frames: 30 },
  },
  {
    what: 'AV1',
    name: 'av1.mp4',
    make: (path) =>
      makeClip(path, {
        output: ['-c:v', 'libaom-av1', '-cpu-used', '8', '-usage', 'realtime', '-pix_fmt', 'yuv420p'],
      }),
    facts: { codec: 'av1' },
    proxy: { frames: 30 },
  },
  {
    what: 'MPEG-4 part 2',
    name: 'mpeg4.mp4',
    make: (path) => makeClip(path, { output: ['-c:v', 'mpeg4', '-q:v', '3', '-pix_fmt', 'yuv420p'] }),
    facts: { codec: 'mpeg4' },
    proxy: { frames: 30 },
  },
  {
    what: 'H.263 in 3GP',
    name: 'old.3gp',
    make: (path) =>
      makeClip(path, {
        width: 352,
        height: 288,
        output: ['-c:v', 'h263', '-q:v', '3', '-pix_fmt', 'yuv420p'],
      }),
    facts: { codec: 'h263' },
    proxy: { frames: 30 },
  },
  {
    what: 'ProRes 4:2:2',
    name: 'prores.mov',
    make: (path) =>
      makeClip(path, { output: ['-c:v', 'prores_ks', '-profile:v', '0', '-pix_fmt', 'yuv422p10le'] }),
    facts: { codec: 'prores' },
    proxy: { frames: 30 },
  },
  {
    what: 'Motion JPEG',
    name: 'mjpeg.mov',
    make: (path) => makeClip(path, { output: ['-c:v', 'mjpeg', '-q:v', '3', '-pix_fmt', 'yuvj420p'] }),
    facts: { codec: 'mjpeg', colour: { matrix: 'smpte170m', range: 'pc' } },
    proxy: { frames: 30 },
  },
  {
    what: 'a browser’s recording: VP8 in WebM without a duration',
    name: 'recorded-vp8.webm',
    make: async (path) => {
      await makeClip(`${path}.piped`, {
        output: ['-c:v', 'libvpx', '-deadline', 'realtime', '-b:v', '1M', '-live', '1', '-f', 'webm'],
      });
      await runTool('cp', [`${path}.piped`, path]);
    },
    facts: { container: 'matroska', codec: 'vp8', frameRate: thirty, frames: 30 },
    proxy: { fps: thirty, frames: 30 },
  },
  {
    what: 'a browser’s recording: VP9 and Opus in WebM without a duration',
    name: 'recorded-vp9.webm',
    make: (path) =>
      makeClip(path, {
        inputs: tone(1),
        output: [
          '-c:v',
          'libvpx-vp9',
          '-deadline',
          'realtime',
          '-cpu-used',
          '8',
          '-c:a',
          'libopus',
          '-live',
          '1',
          '-f',
          'webm',
        ],
      }),
    facts: { codec: 'vp9', hasAudio: true },
    proxy: { frames: 30, hasAudio: true },
  },
  {
    what: 'a fragmented film whose header states no duration',
    name: 'fragmented.mp4',
    make: (path) =>
      makeClip(path, { output: [...QUICK_H264, '-movflags', 'frag_keyframe+empty_moov+default_base_moof'] }),
    facts: { frames: 30, frameRate: thirty },
    proxy: { frames: 30 },
  },
  {
    what: 'odd sides',
    name: 'odd.mp4',
    make: (path) =>
      makeClip(path, {
        width: 321,
        height: 183,
        output: ['-c:v', 'libx264', '-preset', 'ultrafast', '-pix_fmt', 'yuv444p'],
      }),
    facts: { width: 321, height: 183 },
    proxy: { width: 322, height: 184, frames: 30 },
  },
  {
    what: 'a picture smaller than the proxy is not enlarged',
    name: 'small.mp4',
    make: (path) => makeClip(path, { width: 96, height: 64 }),
    proxy: { width: 96, height: 64 },
  },
  {
    what: 'a very wide picture',
    name: 'wide.mp4',
    make: (path) => makeClip(path, { width: 2048, height: 128 }),
    proxy: { width: 2048, height: 128, frames: 30 },
  },
  {
    what: 'samples that are not square',
    name: 'anamorphic.mp4',
    make: (path) => makeClip(path, { output: ['-vf', 'setsar=3/2', ...QUICK_H264] }),
    facts: { width: 480, height: 180, sampleAspect: { num: 3, den: 2 } },
    proxy: { width: 480, height: 180, frames: 30 },
  },
  {
    what: 'full-range samples',
    name: 'full-range.mp4',
    make: (path) =>
      makeClip(path, { output: ['-c:v', 'libx264', '-preset', 'ultrafast', '-pix_fmt', 'yuvj420p'] }),
    facts: { colour: { matrix: 'smpte170m', range: 'pc' } },
    proxy: { frames: 30 },
  },
  {
    what: 'interlaced fields',
    name: 'interlaced.mov',
    make: (path) =>
      makeClip(path, {
        output: [
          '-vf',
          'setfield=tff',
          '-c:v',
          'prores_ks',
          '-profile:v',
          '0',
          '-flags',
          '+ildct',
          '-pix_fmt',
          'yuv422p10le',
        ],
      }),
    facts: { interlaced: true },
    proxy: { frames: 30 },
  },
  {
    what: 'an edit list that hides the first fifteen pictures',
    name: 'edited.mp4',
    make: async (path) => {
      await makeClip(`${path}.whole.mp4`, { frames: 60 });
      await makeWith(['-ss', '0.5', '-i', `${path}.whole.mp4`, '-c', 'copy', path]);
    },
    facts: { frames: 45 },
    proxy: { frames: 45 },
    shows: (n) => n + 15,
  },
  {
    what: 'a clock that starts at five seconds',
    name: 'late-clock.mkv',
    make: (path) => makeClip(path, { output: [...QUICK_H264, '-output_ts_offset', '5'] }),
    facts: { frames: 30 },
    proxy: { frames: 30 },
  },
  {
    what: 'sound in a way that no decoder here reads is left out',
    name: 'foreign-sound.mp4',
    make: (path) => makeClip(path, { inputs: tone(1), output: [...QUICK_H264, '-c:a', 'ac3'] }),
    facts: { hasAudio: false },
    proxy: { hasAudio: false, frames: 30 },
  },
  {
    what: 'a cover picture before the film',
    name: 'cover.mp4',
    make: async (path) => {
      await makeWith(['-f', 'lavfi', '-i', 'color=red:size=600x600', '-frames:v', '1', `${path}.png`]);
      await makeClip(path, {
        inputs: ['-i', `${path}.png`],
        output: [
          '-map',
          '1',
          '-map',
          '0',
          '-c:v:0',
          'png',
          '-disposition:v:0',
          'attached_pic',
          '-c:v:1',
          'libx264',
          '-preset',
          'ultrafast',
          '-pix_fmt:v:1',
          'yuv420p',
        ],
      });
    },
    facts: { codec: 'h264', width: 320, height: 180 },
    proxy: { frames: 30 },
  },
  {
    what: 'subtitles, a chapter and an attached page with a script',
    name: 'luggage.mkv',
    make: async (path) => {
      const { writeFile } = await import('node:fs/promises');
      await writeFile(`${path}.srt`, '1\n00:00:00,000 --> 00:00:00,500\n<script>alert(1)</script>\n');
      await writeFile(`${path}.html`, '<script>alert(1)</script>');
      await writeFile(
        `${path}.meta`,
        ';FFMETADATA1\ntitle=<script>alert(1)</script>\n[CHAPTER]\nTIMEBASE=1/1000\nSTART=0\nEND=500\ntitle=one\n',
      );
      await makeClip(path, {
        inputs: ['-i', `${path}.srt`, '-i', `${path}.meta`],
        output: [
          '-map',
          '0',
          '-map',
          '1',
          '-map_metadata',
          '2',
          '-map_chapters',
          '2',
          ...QUICK_H264,
          '-c:s',
          'srt',
          '-attach',
          `${path}.html`,
          '-metadata:s:t',
          'mimetype=text/html',
        ],
      });
    },
    proxy: { frames: 30 },
  },
  {
    what: 'two films in one file: the first is shown',
    name: 'two-films.mp4',
    make: (path) =>
      makeClip(path, {
        inputs: ['-f', 'lavfi', '-i', 'color=red:size=640x360:duration=1'],
        output: ['-map', '0', '-map', '1', ...QUICK_H264],
      }),
    facts: { width: 320, height: 180 },
    proxy: { frames: 30 },
  },
  {
    what: 'a header that states ten times the length: the pictures are counted instead',
    name: 'boast.mp4',
    make: async (path) => {
      await makeClip(path, { output: [...QUICK_H264, '-use_editlist', '0'] });
      await patchFile(path, (film) => stretchStatedDuration(film, 10));
    },
    facts: { frames: 30, durationMs: 1000 },
    proxy: { frames: 30 },
  },
  {
    what: 'an archive and a page hidden behind the film',
    name: 'two-faced.mp4',
    make: async (path) => {
      await makeClip(path);
      await patchFile(path, (film) =>
        Buffer.concat([film, Buffer.from('PK\x03\x04<html><script>alert(1)</script>')]),
      );
    },
    proxy: { frames: 30 },
  },
];

describe('what phones and browsers send is taken', () => {
  it.each(CASES)('$what', async ({ name, make, facts = {}, proxy = {}, shows = (n) => n }) => {
    const path = bench.file(name);
    await make(path);
    const made = await bench.render(path);
    expect(made.facts).toMatchObject({
      ...facts,
      ...(facts.durationMs ? { durationMs: expect.closeTo(facts.durationMs, 0) as number } : {}),
    });
    expect(made.proxy).toMatchObject(proxy);

    const [seen, frames] = await Promise.all([
      inspect(made.proxy.path),
      readNumbers(made.proxy.path, made.proxy),
    ]);
    const [picture] = seen.streams;
    expect(picture).toMatchObject({
      ...{
        codec_name: 'h264',
        pix_fmt: 'yuv420p',
        width: made.proxy.width,
        height: made.proxy.height,
        start_time: '0.000000',
      },
      ...{
        color_space: 'bt709',
        color_primaries: 'bt709',
        color_transfer: 'bt709',
        color_range: 'tv',
        sample_aspect_ratio: '1:1',
      },
    });
    expect(picture?.r_frame_rate).toBe(`${made.proxy.fps.num}/${made.proxy.fps.den}`);
    expect(seen.timesS).toHaveLength(made.proxy.frames);
    seen.timesS.forEach((time, n) =>
      expect(time).toBeCloseTo((n * made.proxy.fps.den) / made.proxy.fps.num, 4),
    );
    expect(seen.pictureTypes).not.toContain('B');
    expect(seen.longestGroup).toBeLessThanOrEqual(15);
    expect(seen.editListStarts[0] ?? 0).toBe(0);
    expect(seen.streams.map((s) => s.codec_type)).toEqual(
      made.proxy.hasAudio ? ['video', 'audio'] : ['video'],
    );
    expect(seen.chapters).toEqual([]);
    expect(JSON.stringify([seen.tags, seen.streams])).not.toMatch(/<script|alert/);

    expect(frames.map((frame) => frame.number)).toEqual(frames.map((_, n) => shows(n)));
    expect(frames.every((frame) => frame.upright)).toBe(true);
    expect(made.thumbnails).toHaveLength(12);
  });
});

describe('every way of holding the phone ends upright', () => {
  const turns = [0, 90, 180, 270] as const;
  const unturn = { 0: [], 90: ['transpose=cclock'], 180: ['hflip', 'vflip'], 270: ['transpose=clock'] };

  it.each(turns.flatMap((rotation) => [false, true].map((mirrored) => ({ rotation, mirrored }))))(
    'turned $rotation°, mirrored: $mirrored',
    async ({ rotation, mirrored }) => {
      const path = bench.file(`turned-${rotation}-${mirrored}.mp4`);
      const filters = [...unturn[rotation], ...(mirrored ? ['hflip'] : []), 'null'];
      await makeClip(path, { frames: 15, output: ['-vf', filters.join(','), ...QUICK_H264] });
      await patchFile(path, (film) => setOrientation(film, rotation, mirrored));
      const made = await bench.render(path);
      expect(made.facts).toMatchObject({ rotation, mirrored, width: 320, height: 180 });
      const frames = await readNumbers(made.proxy.path, made.proxy);
      expect(frames.map(({ number, upright }) => [number, upright])).toEqual(frames.map((_, n) => [n, true]));
      expect((await inspect(made.proxy.path)).streams[0]?.side_data_list ?? []).toEqual([]);
    },
  );
});

describe('a phone’s own file', () => {
  it('HEVC 1080p60 held upright, with place, device and date: 720p60, and nothing told of them', async () => {
    const path = bench.file('phone.mov');
    await makeClip(path, {
      ...{ width: 1080, height: 1920, rate: '60', frames: 30, inputs: tone(0.5) },
      output: [
        ...[
          '-vf',
          'transpose=cclock',
          ...QUICK_HEVC,
          '-pix_fmt',
          'yuv420p',
          ...AAC,
          '-timecode',
          '10:00:00:00',
          '-movflags',
          'use_metadata_tags',
        ],
        ...[
          '-metadata',
          'com.apple.quicktime.location.ISO6709=+59.3293+018.0686+012.345/',
          '-metadata',
          'location=+59.3293+018.0686/',
        ],
        ...[
          '-metadata',
          'com.apple.quicktime.make=Phonemaker',
          '-metadata',
          'creation_time=2026-01-02T03:04:05Z',
          '-metadata',
          'artist=Someone',
        ],
      ],
    });
    await patchFile(path, (film) => setOrientation(film, 90, false));
    const source = await inspect(path);
    expect(JSON.stringify(source.tags)).toContain('59.3293');

    const made = await bench.render(path);
    expect(made.facts).toMatchObject({
      codec: 'hevc',
      width: 1080,
      height: 1920,
      rotation: 90,
      frameRate: { num: 60, den: 1 },
    });
    expect(made.proxy).toMatchObject({
      width: 720,
      height: 1280,
      fps: { num: 60, den: 1 },
      frames: 30,
      hasAudio: true,
    });
    for (const still of [made.proxy, made.poster, made.filmstrip, ...made.thumbnails.slice(0, 2)]) {
      const { tags, streams } = await inspect(still.path);
      expect(JSON.stringify([tags, streams])).not.toMatch(
        /59\.3|18\.06|Phonemaker|2026|Someone|10:00:00|Lav[cf]\d/,
      );
    }
    const frames = await readNumbers(made.proxy.path, made.proxy);
    expect(frames.map(({ number, upright }) => [number, upright])).toEqual(frames.map((_, n) => [n, true]));
  });

  it.each([
    { hdr: 'hlg', transfer: 'arib-std-b67', signal: 0.75 },
    { hdr: 'pq', transfer: 'smpte2084', signal: 0.58 },
  ] as const)('$hdr: white paper stays white and black stays black', async ({ hdr, transfer, signal }) => {
    // ITU-R BT.2408: a white sheet, 203 cd/m², is a signal of 75 % in HLG and 58 % in PQ.
    const white = Math.round(64 + signal * 876);
    const film = async (name: string, luma: number) => {
      const path = bench.file(`${hdr}-${name}.mov`);
      await makeWith([
        ...[
          '-f',
          'lavfi',
          '-i',
          `color=size=320x180:rate=30:duration=0.6,format=yuv420p10le,geq=lum=${luma}:cb=512:cr=512`,
          ...QUICK_HEVC,
        ],
        ...[
          '-pix_fmt',
          'yuv420p10le',
          '-color_primaries',
          'bt2020',
          '-color_trc',
          transfer,
          '-colorspace',
          'bt2020nc',
          path,
        ],
      ]);
      return bench.render(path);
    };
    const bright = await film('white', white);
    expect(bright.facts).toMatchObject({ hdr, pixelFormat: 'yuv420p10le' });
    expect((await inspect(bright.proxy.path)).streams[0]).toMatchObject({
      pix_fmt: 'yuv420p',
      color_transfer: 'bt709',
    });
    // The bounds are a rule of thumb: common practice, no source.
    expect(await meanGrey(bright.proxy.path)).toBeGreaterThan(185);
    const dark = await film('black', 64);
    expect(await meanGrey(dark.proxy.path)).toBeLessThan(8);
  });
});

describe('picture and sound start together at zero', () => {
  it.each([
    { what: 'sound that starts half a second late', late: 'sound', startsAtS: 0.5 },
    { what: 'a picture that starts half a second late', late: 'picture', startsAtS: 0 },
    { what: 'both at once', late: 'neither', startsAtS: 0 },
  ])('$what', async ({ late, startsAtS }) => {
    const path = bench.file(`late-${late}.mp4`);
    await makeClip(`${path}.picture.mp4`, { frames: 60 });
    await makeWith([
      ...(late === 'picture' ? ['-itsoffset', '0.5'] : []),
      ...['-i', `${path}.picture.mp4`],
      ...(late === 'sound' ? ['-itsoffset', '0.5'] : []),
      ...[...tone(2), '-map', '0', '-map', '1', '-c:v', 'copy', ...AAC, path],
    ]);
    const made = await bench.render(path);
    expect(made.proxy).toMatchObject({ frames: 60, hasAudio: true });
    const frames = await readNumbers(made.proxy.path, made.proxy);
    expect(frames.map((frame) => frame.number)).toEqual(frames.map((_, n) => n));
    const seen = await inspect(made.proxy.path);
    expect(seen.streams.map((s) => Number(s.start_time))).toEqual([0, 0]);
    // Sound codecs blur an onset by a block of 1024 samples, 21 ms at 48 kHz.
    expect(Math.abs(((await soundStartsAtS(made.proxy.path)) ?? Infinity) - startsAtS)).toBeLessThan(0.03);
    expect(Number(seen.streams[1]?.duration)).toBeLessThanOrEqual(2.05);
  });
});

describe('uneven clocks', () => {
  it('shows at n/fps what the source has on screen within half a picture of that instant', async () => {
    // Numbered at 120 a second, of which an uneven choice is kept: thirty a second, then sixty, with stumbles.
    const kept = [
      ...Array.from({ length: 20 }, (_, i) => 4 * i + (i % 5 === 3 ? 1 : 0)),
      ...Array.from({ length: 40 }, (_, i) => 80 + 2 * i),
    ];
    const path = bench.file('uneven.mp4');
    const select = `select='${kept.map((n) => `eq(n,${n})`).join('+')}'`;
    await makeClip(path, {
      rate: '120',
      frames: 160,
      output: ['-vf', select, '-fps_mode', 'vfr', ...QUICK_H264, '-enc_time_base', '1/120000'],
    });
    const made = await bench.render(path);
    expect(made.facts).toMatchObject({ variableFrameRate: true, frames: 60 });
    expect(made.proxy.fps).toEqual({ num: 60, den: 1 });
    const frames = await readNumbers(made.proxy.path, made.proxy);
    const onScreenAt = (ticks: number) => kept.filter((k) => k <= ticks).at(-1) ?? 0;
    for (const [n, { number }] of frames.entries()) {
      // A picture of the proxy lasts two of the 120 ticks a second: half of it is one tick.
      const around = [2 * n - 1, 2 * n, 2 * n + 1].map(onScreenAt);
      expect(around, `picture ${n} shows ${number}`).toContain(number);
    }
    expect(frames.map((frame) => frame.number)).toEqual(
      [...frames].map((frame) => frame.number).sort((a, b) => a - b),
    );
  });
});

describe('trim, stills and progress', () => {
  it('cuts picture and sound at the asked pictures', async () => {
    const path = bench.file('to-trim.mp4');
    await makeClip(path, { frames: 90, inputs: tone(3), output: [...QUICK_H264, ...AAC] });
    const percents: number[] = [];
    const made = await bench.render(path, {
      trim: { startMs: 500, endMs: 1500 },
      onProgress: (percent) => percents.push(percent),
    });
    expect(made.proxy).toMatchObject({ frames: 30, durationMs: 1000, sourceStartMs: 500 });
    const frames = await readNumbers(made.proxy.path, made.proxy);
    expect(frames.map((frame) => frame.number)).toEqual(frames.map((_, n) => n + 15));
    expect(Number((await inspect(made.proxy.path)).streams[1]?.duration)).toBeCloseTo(1, 1);
    expect(percents.at(-1)).toBe(100);
    expect(percents).toEqual([...new Set(percents)].sort((a, b) => a - b));
  });

  it('spreads twelve thumbnails over the clip, and lays the same twelve side by side', async () => {
    const path = bench.file('stills.mp4');
    await makeClip(path, { width: 640, height: 360, frames: 36 });
    const made = await bench.render(path, { shortSide: 180 });
    expect(made.proxy).toMatchObject({ width: 320, height: 180 });
    const numbers = await Promise.all(
      made.thumbnails.map(async (still) => (await readNumbers(still.path, still))[0]?.number),
    );
    expect(numbers).toEqual([1, 4, 7, 10, 13, 16, 19, 22, 25, 28, 31, 34]);
    const strip = await inspect(made.filmstrip.path);
    expect(strip.streams[0]).toMatchObject({
      width: made.filmstrip.width,
      height: made.filmstrip.height,
      codec_name: 'mjpeg',
    });
    const poster = (await readNumbers(made.poster.path, made.poster))[0]?.number ?? -1;
    expect(poster).toBeGreaterThanOrEqual(12);
    expect(poster).toBeLessThan(24);
  });

  it('gives the same bytes for the same file', async () => {
    const path = bench.file('twice.mp4');
    await makeClip(path, { inputs: tone(1), output: [...QUICK_H264, ...AAC] });
    const digests = [];
    for (let i = 0; i < 2; i++) {
      const made = await bench.render(path);
      digests.push((await runTool('sha256sum', [made.proxy.path])).toString().slice(0, 64));
    }
    expect(digests[0]).toBe(digests[1]);
  });
});
