import { describe, expect, it } from 'vitest';
import { buildRenditionArguments, flattenArguments, inputGuards, probeGuards } from './build-args';
import { sampleFacts } from './facts.fixture';
import { DEFAULT_LIMITS } from './limits';

const words = (changes = {}, options = {}) =>
  flattenArguments(buildRenditionArguments(sampleFacts(changes), { shortSide: 720, ...options }));
const after = (list: readonly string[], word: string) => list[list.indexOf(word) + 1];
const filterOf = (changes = {}, options = {}) => after(words(changes, options), '-filter_complex') ?? '';

describe('the guards before an input', () => {
  it('allow local files, phones’ containers and codecs, and bounded sizes; ffmpeg fewer codecs than ffprobe', () => {
    const guards = inputGuards(DEFAULT_LIMITS);
    expect(after(guards, '-protocol_whitelist')).toBe('file');
    expect(after(guards, '-format_whitelist')).toBe('mov,matroska,webm');
    expect(after(guards, '-max_streams')).toBe('16');
    expect(Number(after(guards, '-max_pixels'))).toBeLessThan(18_000_000);
    expect(after(guards, '-codec_whitelist')?.split(',')).not.toContain('png');
    expect(after(probeGuards(DEFAULT_LIMITS), '-codec_whitelist')?.split(',')).toContain('png');
  });

  it('stand before the input, which is named by us with its protocol', () => {
    const command = words();
    const input = command.indexOf('-i');
    expect(command[input + 1]).toBe('file:source');
    for (const guard of [
      '-protocol_whitelist',
      '-format_whitelist',
      '-codec_whitelist',
      '-max_streams',
      '-max_pixels',
    ]) {
      expect(command.indexOf(guard)).toBeLessThan(input);
      expect(command.filter((word) => word === guard)).toHaveLength(1);
    }
  });
});

describe('one command', () => {
  it('decodes once and makes the proxy, thumbnails, filmstrip and poster', () => {
    const command = buildRenditionArguments(sampleFacts(), { shortSide: 720 });
    expect(flattenArguments(command).filter((word) => word === '-i')).toHaveLength(1);
    expect(command.outputs.map((output) => output.target)).toEqual([
      'proxy.mp4',
      'thumbnail-%02d.jpg',
      'filmstrip.jpg',
      'poster-%02d.jpg',
    ]);
    for (const { options } of command.outputs) {
      expect(after(options, '-map_metadata')).toBe('-1');
      expect(after(options, '-map_chapters')).toBe('-1');
      expect(options).toEqual(expect.arrayContaining(['-dn', '-sn']));
    }
  });

  it('makes a proxy that can be stepped: short closed groups, no picture that waits for a later one', () => {
    const options = buildRenditionArguments(sampleFacts(), { shortSide: 720 }).outputs[0]?.options ?? [];
    expect(after(options, '-g')).toBe('15');
    expect(after(options, '-bf')).toBe('0');
    expect(after(options, '-x264-params')).toBe('open-gop=0');
    expect(after(options, '-movflags')).toBe('+faststart');
  });

  it('keeps the exact rate, and brings slow motion to 60', () => {
    expect(filterOf({ frameRate: { num: 30000, den: 1001 } })).toContain('fps=fps=30000/1001:');
    expect(filterOf({ frameRate: { num: 240, den: 1 } })).toContain('fps=fps=60/1:');
    expect(filterOf({ slowedBy: 8 })).toContain('setpts=(PTS-STARTPTS)/8-');
  });

  it('cuts on the proxy’s pictures, and the sound at the same instants', () => {
    const filter = filterOf({ durationMs: 3000, frames: 90 }, { trim: { startMs: 500, endMs: 1500 } });
    expect(filter).toContain('trim=start_frame=15:end_frame=45,');
    expect(filter).toContain('atrim=start=0.500000:end=1.500000');
  });

  it('takes exactly the streams that the probe chose', () => {
    expect(filterOf({ videoStream: 3, audioStream: 5 })).toMatch(/^\[0:3\].*;\[0:5\]/);
    const silent = words({ audioStream: null });
    expect(silent).toContain('-an');
    expect(silent).not.toContain('[sound]');
  });

  it('tone-maps HDR, and only HDR', () => {
    expect(filterOf({ hdr: 'hlg' })).toContain('transferin=arib-std-b67');
    expect(filterOf({ hdr: 'pq' })).toContain('transferin=smpte2084');
    expect(filterOf({ hdr: 'hlg' })).toContain('tonemap=');
    expect(filterOf()).not.toContain('tonemap=');
  });

  it('converts colour by what the source is, and weaves fields only where there are any', () => {
    expect(filterOf({ colour: { matrix: 'smpte170m', range: 'pc' } })).toContain(
      'in_color_matrix=smpte170m:in_range=pc',
    );
    expect(filterOf({ interlaced: true })).toContain('bwdif');
    expect(filterOf()).not.toContain('bwdif');
  });

  it('is the same words for the same facts', () => {
    expect(words()).toEqual(words());
  });
});
