import { readFileSync } from 'node:fs';
import { describe, expect, it } from 'vitest';
import { ALLOWED_FORMATS, AUDIO_CODECS, MAX_GROUP_OF_PICTURES, VIDEO_CODECS } from './build-args';
import { MAX_PROXY_RATE } from './frame-rate';
import { DEFAULT_LIMITS } from './limits';
import { DEFAULT_SHORT_SIDE } from './make-renditions';
import { THUMBNAIL_COUNT } from './plan';
import { EXPLANATIONS, UNPLAYABLE_REASONS, UnplayableError } from './reasons';

const page = readFileSync(new URL('../../docs/media.md', import.meta.url), 'utf8');
const cellsOf = (first: string): string[] =>
  page
    .split('\n')
    .find((line) => line.startsWith(`| ${first}`))
    ?.split('|')
    .slice(1, -1)
    .map((cell) => cell.trim()) ?? [];
const codeWords = (text = '') => [...text.matchAll(/`([^`]+)`/g)].map((match) => match[1]);

describe('docs/media.md', () => {
  it('lists what is accepted', () => {
    expect(codeWords(cellsOf('containers')[1])).toEqual([...ALLOWED_FORMATS]);
    expect(codeWords(cellsOf('picture codecs')[1])).toEqual([...VIDEO_CODECS]);
    expect(codeWords(cellsOf('sound codecs')[1])).toEqual([...AUDIO_CODECS]);
  });

  it('states the limits', () => {
    const limits = DEFAULT_LIMITS;
    expect(cellsOf('duration')[1]).toBe(`${limits.minDurationMs} to ${limits.maxDurationMs} ms, measured`);
    expect(cellsOf('pictures in all')[1]).toBe(
      `at least ${limits.minFrames}, on average ${limits.minFrameRate} a second or more`,
    );
    expect(cellsOf('pictures a second')[1]).toBe(`up to ${limits.maxFrameRate}, measured`);
    expect(cellsOf('shorter displayed side')[1]).toBe(`${limits.minShortSide} pixels or more`);
    expect(cellsOf('longer side')[1]).toBe(`up to ${limits.maxLongSide} pixels`);
    expect(cellsOf('streams')[1]).toBe(`up to ${limits.maxStreams}`);
  });

  it('describes what is made', () => {
    const proxy = cellsOf('proxy')[1];
    expect(proxy).toContain(`${DEFAULT_SHORT_SIDE} on the shorter one`);
    expect(proxy).toContain(`at most ${MAX_GROUP_OF_PICTURES} pictures`);
    expect(proxy).toContain(`up to ${MAX_PROXY_RATE} pictures a second`);
    expect(cellsOf('thumbnails')[1]).toContain(`${THUMBNAIL_COUNT} JPEGs`);
  });

  it('says every refusal in the words that members read', () => {
    for (const reason of UNPLAYABLE_REASONS) {
      const { message, remedy } = EXPLANATIONS[reason];
      expect(cellsOf(`\`${reason}\``)).toEqual([`\`${reason}\``, message, remedy]);
    }
  });
});

describe('a refusal', () => {
  it('carries its words, and keeps the tools’ words for the log', () => {
    const error = new UnplayableError('too-long', '130000 ms');
    expect(error).toMatchObject({
      ...EXPLANATIONS['too-long'],
      reason: 'too-long',
      detail: '130000 ms',
      name: 'UnplayableError',
    });
    expect(error.message + error.remedy).not.toContain('130000');
  });
});
