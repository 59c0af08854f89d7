import type { Problem } from '@contract';
import { IDLE, isDrop, isUnderWay, nextUpload, retryWaitMs, type Upload, type UploadEvent } from './upload';

const file = new File(['0123456789'], 'swing.mov', { type: 'video/quicktime' });
const chosen = { file, key: 'key-1' };
const problem = (status: number): Problem => ({ type: 'about:blank', title: 'No', status, detail: 'No.' });

const run = (...events: UploadEvent[]): Upload => events.reduce(nextUpload, IDLE);
const begin: UploadEvent[] = [{ type: 'chosen', chosen }, { type: 'started' }];

describe('sending a clip', () => {
  it('goes from the choice through the checks to sending', () => {
    expect(run({ type: 'chosen', chosen })).toEqual({ kind: 'checking', chosen });
    expect(run(...begin)).toEqual({
      kind: 'sending',
      chosen,
      sentBytes: 0,
      totalBytes: 10,
      samples: [],
      tries: 1,
    });
  });

  it('stops before sending when a check refuses the file', () => {
    const refusal = { message: 'This file is not a video.', remedy: 'Choose a video.' };
    expect(run({ type: 'chosen', chosen }, { type: 'refused', refusal })).toEqual({
      kind: 'refused',
      name: 'swing.mov',
      refusal,
    });
  });

  it('tells how far it is', () => {
    const state = run(...begin, { type: 'progressed', sentBytes: 4, totalBytes: 10, atMs: 500 });
    expect(state).toMatchObject({ sentBytes: 4, totalBytes: 10, samples: [{ atMs: 500, sentBytes: 4 }] });
  });

  it('keeps file and key when the network drops, and begins again from the start', () => {
    const stopped = run(
      ...begin,
      { type: 'progressed', sentBytes: 4, totalBytes: 10, atMs: 0 },
      { type: 'dropped' },
    );
    expect(stopped).toEqual({ kind: 'stopped', chosen, tries: 1 });
    expect(nextUpload(stopped, { type: 'started' })).toMatchObject({
      kind: 'sending',
      chosen,
      sentBytes: 0,
      samples: [],
      tries: 2,
    });
  });

  it('can be tried again after the API failed', () => {
    const failed = run(...begin, { type: 'failed', problem: problem(500) });
    expect(failed).toEqual({ kind: 'failed', chosen, problem: problem(500) });
    expect(nextUpload(failed, { type: 'started' })).toMatchObject({ kind: 'sending', chosen, tries: 1 });
  });

  it('ends with nothing left here once it has arrived or was cancelled', () => {
    expect(run(...begin, { type: 'arrived' })).toBe(IDLE);
    expect(run(...begin, { type: 'dropped' }, { type: 'cancelled' })).toBe(IDLE);
  });

  it('is not moved by events that come too late', () => {
    const progressed: UploadEvent = { type: 'progressed', sentBytes: 9, totalBytes: 10, atMs: 1 };
    for (const late of [
      progressed,
      { type: 'dropped' },
      { type: 'failed', problem: problem(0) },
    ] as UploadEvent[]) {
      expect(nextUpload(IDLE, late)).toBe(IDLE);
    }
  });

  it('holds the page only while something is on its way', () => {
    expect([IDLE, run(...begin), run(...begin, { type: 'dropped' })].map(isUnderWay)).toEqual([
      false,
      true,
      true,
    ]);
    expect(isUnderWay(run(...begin, { type: 'failed', problem: problem(415) }))).toBe(false);
  });
});

describe('a failed try', () => {
  it('is repeated when the way broke, not when the API refused', () => {
    expect([0, 408, 502, 503, 504].map((status) => isDrop(problem(status)))).toEqual([
      true,
      true,
      true,
      true,
      true,
    ]);
    expect([409, 413, 415, 422, 429, 500].some((status) => isDrop(problem(status)))).toBe(false);
  });

  it('waits longer each time, up to half a minute', () => {
    expect([1, 2, 3, 5, 9].map(retryWaitMs)).toEqual([2_000, 4_000, 8_000, 30_000, 30_000]);
  });
});
