import { describe, expect, it } from 'vitest';
import { parseHeader, parseOrientation, parsePackets } from './probe-output';

/** The way in which ffprobe 5.1 prints a display matrix; 65536 is one. */
const withMatrix = (a: number, b: number, c: number, d: number) => ({
  index: 0,
  side_data_list: [
    {
      side_data_type: 'Display Matrix',
      displaymatrix: `\n00000000: ${a * 65536} ${b * 65536} 0\n00000001: ${c * 65536} ${d * 65536} 0\n00000002: 0 0 1073741824\n`,
    },
  ],
});

describe('the display matrix', () => {
  it.each([
    ['upright', withMatrix(1, 0, 0, 1), { rotation: 0, mirrored: false }],
    ['a phone held upright', withMatrix(0, 1, -1, 0), { rotation: 90, mirrored: false }],
    ['a phone held upside down', withMatrix(-1, 0, 0, -1), { rotation: 180, mirrored: false }],
    ['a phone held the other way', withMatrix(0, -1, 1, 0), { rotation: 270, mirrored: false }],
    ['mirrored', withMatrix(-1, 0, 0, 1), { rotation: 0, mirrored: true }],
    ['mirrored and upside down', withMatrix(1, 0, 0, -1), { rotation: 180, mirrored: true }],
    ['two degrees off', withMatrix(0.9994, 0.0349, -0.0349, 0.9994), { rotation: 0, mirrored: false }],
    ['all zeros', withMatrix(0, 0, 0, 0), { rotation: 0, mirrored: false }],
    ['missing', { index: 0 }, { rotation: 0, mirrored: false }],
  ])('%s', (_what, stream, orientation) => {
    expect(parseOrientation(stream)).toEqual(orientation);
  });
});

describe('lines of packets', () => {
  it('leave out what the edit list hides and what has no time, and fall back on the decoding time', () => {
    const csv =
      '-0.033333,-0.033333,0.033333,KD\n0.000000,0.000000,0.033333,K_\nN/A,0.033333,N/A,__\nN/A,N/A,N/A,__\n\n';
    expect(parsePackets(csv)).toEqual([
      { timeS: 0, durationS: 0.033333 },
      { timeS: 0.033333, durationS: null },
    ]);
  });
});

describe('the header', () => {
  it.each(['', 'null', '{"streams":"many"}', '{"streams":[{"index":-1}]}', '{'])(
    'is not taken from %j',
    (text) => {
      expect(parseHeader(text)).toBeNull();
    },
  );

  it('may say next to nothing', () => {
    expect(parseHeader('{}')).toEqual({ streams: [], format: {}, packets: [] });
  });
});
