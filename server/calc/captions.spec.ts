import { describe, expect, it } from 'vitest';
import { vttTimestamp, webVtt } from './captions';

describe('WebVTT', () => {
  // W3C WebVTT: two digits or more of hours, two of minutes and seconds, three of the fraction.
  it.each([
    [0, '00:00:00.000'],
    [59_999, '00:00:59.999'],
    [60_000, '00:01:00.000'],
    [3_599_999, '00:59:59.999'],
    [216_000_000, '60:00:00.000'],
    [360_000_000, '100:00:00.000'],
  ])('writes %i ms as %s', (ms, written) => {
    expect(vttTimestamp(ms)).toBe(written);
  });

  it('starts with its signature and puts captions in the order of their start', () => {
    expect(
      webVtt([
        { startMs: 4000, endMs: 6500, text: 'Chest up' },
        { startMs: 1250, endMs: 2000, text: 'Knees out' },
      ]),
    ).toBe('WEBVTT\n\n00:00:01.250 --> 00:00:02.000\nKnees out\n\n00:00:04.000 --> 00:00:06.500\nChest up\n');
    expect(webVtt([])).toBe('WEBVTT\n');
  });

  it('lets no words end a caption, open a tag or pass for a timing', () => {
    const file = webVtt([{ startMs: 0, endMs: 1000, text: 'a\r\n\r\n00:00 --> 1 <b>&\u0000' }]);
    expect(file).toBe('WEBVTT\n\n00:00:00.000 --> 00:00:01.000\na\n00:00 --&gt; 1 &lt;b&gt;&amp;\uFFFD\n');
  });

  it('never ends a caption before it starts', () => {
    expect(webVtt([{ startMs: 500, endMs: 500, text: 'Now' }])).toContain('00:00:00.500 --> 00:00:00.501');
  });
});
