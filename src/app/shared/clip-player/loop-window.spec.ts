import type { ClipDto, CommentDto } from '@contract';
import { firstMoment, fragmentMs, loopWindow, momentFragment } from './loop-window';

const clip = (id: string, view: 'front' | 'side', durationMs = 6000): ClipDto => ({
  id,
  takeId: 'take',
  view,
  state: 'ready',
  progress: 100,
  sizeBytes: 1,
  sha256: '',
  durationMs,
  width: 720,
  height: 1280,
  fps: { num: 30, den: 1 },
  frames: 180,
  trim: null,
  problem: null,
  media: { proxy: 'p', poster: 'o', filmstrip: 'f', thumbnails: [] },
});

const comment = (clipId: string, atMs: number): CommentDto => ({
  id: `${clipId}-${atMs}`,
  takeId: 'take',
  clipId,
  view: 'side',
  atMs,
  endMs: null,
  body: 'Hips back first.',
  drawing: null,
  faultId: null,
  author: { id: 'coach', name: 'Maren Oduya' },
  createdAt: '2026-12-01T12:00:00.000Z',
});

const nothing = { comments: [], marks: [], measures: [] };
const clips = [clip('f', 'front'), clip('s', 'side')];

describe('the part that loops', () => {
  it('holds a second on each side of an instant', () => {
    expect(loopWindow(2900, null, 6000)).toEqual({ startMs: 1900, endMs: 3900 });
  });

  it('holds the whole of a span', () => {
    expect(loopWindow(2000, 3500, 6000)).toEqual({ startMs: 1000, endMs: 4500 });
  });

  it('moves inward at the ends of the clip', () => {
    expect(loopWindow(300, null, 6000)).toEqual({ startMs: 0, endMs: 2000 });
    expect(loopWindow(5900, null, 6000)).toEqual({ startMs: 4000, endMs: 6000 });
  });

  it('is the whole clip where the clip is shorter', () => {
    expect(loopWindow(500, null, 1200)).toEqual({ startMs: 0, endMs: 1200 });
  });
});

describe('the instant that an answer opens on', () => {
  it('is its first comment in time', () => {
    const answer = { ...nothing, comments: [comment('s', 3400), comment('f', 2900)] };
    expect(firstMoment(answer, clips)).toMatchObject({ view: 'front', atMs: 2900 });
  });

  it('is else the first fault seen', () => {
    const marks = [
      { faultId: 'a', mark: 'clear' as const, clipId: 'f', atMs: 100 },
      { faultId: 'b', mark: 'seen' as const, clipId: 's', atMs: 1500 },
    ];
    expect(firstMoment({ ...nothing, marks }, clips)).toMatchObject({ view: 'side', atMs: 1500 });
  });

  it('is else the beginning of the first clip, looped whole', () => {
    expect(firstMoment(nothing, clips)).toEqual({ view: 'front', atMs: 0, endMs: 6000, isStill: false });
  });

  it('passes over a comment on a clip that cannot be played', () => {
    const broken: ClipDto = { ...clip('f', 'front'), state: 'unplayable', media: null };
    const answer = { ...nothing, comments: [comment('f', 900), comment('s', 3400)] };
    expect(firstMoment(answer, [broken, clip('s', 'side')])).toMatchObject({ view: 'side', atMs: 3400 });
  });

  it('is nothing without a playable clip', () => {
    expect(firstMoment(nothing, [])).toBeNull();
  });
});

describe('the instant in the address', () => {
  it('is read and written in seconds', () => {
    expect(fragmentMs('t=3.2')).toBe(3200);
    expect(fragmentMs('t=12')).toBe(12_000);
    expect(momentFragment(3200)).toBe('t=3.2');
  });

  it('is ignored when it is no instant', () => {
    expect(fragmentMs(null)).toBeNull();
    expect(fragmentMs('comments')).toBeNull();
    expect(fragmentMs('t=-2')).toBeNull();
  });
});
