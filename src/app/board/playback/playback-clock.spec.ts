import { beforeEach, describe, expect, it } from 'vitest';
import { PlaybackClock } from './playback-clock';

const FPS_60 = { num: 60, den: 1 };
const NTSC = { num: 30000, den: 1001 };

describe('the clock of the board', () => {
  let wallMs: number;
  let clock: PlaybackClock;
  const pass = (ms: number): void => {
    wallMs += ms;
    clock.tick();
  };

  beforeEach(() => {
    wallMs = 5_000;
    clock = new PlaybackClock(() => wallMs);
    clock.durationMs.set(6_000);
  });

  it('runs with the wall clock at its speed, and stands still when paused', () => {
    clock.play();
    pass(1_000);
    expect(clock.positionMs()).toBe(1_000);
    clock.setSpeed(0.25);
    pass(1_000);
    expect(clock.positionMs()).toBe(1_250);
    clock.pause();
    pass(1_000);
    expect(clock.positionMs()).toBe(1_250);
  });

  it('tells where it will stand at a later wall time', () => {
    clock.setSpeed(0.5);
    clock.play();
    expect(clock.at(wallMs + 16)).toBe(8);
  });

  it('stops at the end, and starts over from there', () => {
    clock.seek(5_900);
    clock.play();
    pass(500);
    expect(clock.positionMs()).toBe(6_000);
    expect(clock.isPlaying()).toBe(false);
    clock.play();
    expect(clock.positionMs()).toBe(0);
    expect(clock.isPlaying()).toBe(true);
  });

  it('waits for every player that is held', () => {
    clock.play();
    clock.hold('front');
    clock.hold('side');
    pass(400);
    clock.release('front');
    pass(400);
    expect(clock.positionMs()).toBe(0);
    clock.release('side');
    pass(400);
    expect(clock.positionMs()).toBe(400);
  });

  it('repeats a span, as a jump that players follow', () => {
    clock.setLoop({ startMs: 1_000, endMs: 2_000 });
    clock.seek(1_900);
    const before = clock.jump().serial;
    clock.play();
    pass(150);
    expect(clock.positionMs()).toBe(1_000);
    expect(clock.jump()).toEqual({ serial: before + 1, toMs: 1_000 });
    pass(100);
    expect(clock.positionMs()).toBe(1_100);
  });

  it('goes to a span that lies ahead', () => {
    clock.setLoop({ startMs: 3_000, endMs: 4_000 });
    clock.play();
    pass(16);
    expect(clock.positionMs()).toBe(3_000);
  });

  it('refuses a span too short to be seen', () => {
    clock.setLoop({ startMs: 1_000, endMs: 1_050 });
    expect(clock.loop()).toBeNull();
  });

  it('steps from frame to frame without losing one, also at 30000/1001', () => {
    for (let frame = 1; frame <= 90; frame += 1) {
      clock.step(1, NTSC);
      expect(clock.positionMs()).toBe(Math.round((frame * 1001) / 30));
    }
    clock.step(-90, NTSC);
    expect(clock.positionMs()).toBe(0);
  });

  it('steps in the frames of a view that is shifted against the clock', () => {
    clock.seek(1_000);
    clock.step(10, FPS_60, 250);
    expect(clock.positionMs() + 250).toBe(Math.round((85 * 1000) / 60));
  });

  it('pauses when stepped and never leaves the clip', () => {
    clock.play();
    clock.step(-10, FPS_60);
    expect(clock.isPlaying()).toBe(false);
    expect(clock.positionMs()).toBe(0);
    clock.seek(99_999);
    expect(clock.positionMs()).toBe(6_000);
  });

  it('goes through its speeds one by one and stays at the ends', () => {
    clock.shiftSpeed(1);
    expect(clock.speed()).toBe(1);
    clock.shiftSpeed(-1);
    clock.shiftSpeed(-1);
    clock.shiftSpeed(-1);
    clock.shiftSpeed(-1);
    expect(clock.speed()).toBe(0.1);
  });
});
