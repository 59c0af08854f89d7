import { describe, expect, it } from 'vitest';
import { FAULTS, LIFT_IDS, type ClipOptions, clipTruth } from './index';

const small: Pick<ClipOptions, 'view' | 'size' | 'look' | 'fps'> = {
  view: 'side',
  size: { shortPx: 180, longPx: 320 },
  look: { build: 'even' },
  fps: 30,
};

describe('the truth of a clip', () => {
  it.each(LIFT_IDS)('is the same to the byte for the same seed, and another for another (%s)', (lift) => {
    const one = JSON.stringify(clipTruth({ ...small, lift, seed: 5 }));
    expect(JSON.stringify(clipTruth({ ...small, lift, seed: 5 }))).toBe(one);
    expect(JSON.stringify(clipTruth({ ...small, lift, seed: 6 }))).not.toBe(one);
  });

  it.each(FAULTS.map((fault) => [fault.lift, fault.id, fault] as const))(
    'shows %s, %s: 10° or more at full dose, nothing at none',
    (lift, id, fault) => {
      const without = clipTruth({ ...small, lift });
      const none = clipTruth({ ...small, lift, faults: { [id]: 0 } });
      const full = clipTruth({ ...small, lift, faults: { [id]: 1 } });
      const moved = full.frames.map(
        (frame, i) => frame.angles[fault.angle] - (without.frames[i]?.angles[fault.angle] ?? 0),
      );
      const way = fault.change === 'increases' ? 1 : -1;
      expect(Math.max(...moved.map((degrees) => degrees * way))).toBeGreaterThanOrEqual(10);
      expect(none.frames.map((frame) => frame.angles)).toEqual(without.frames.map((frame) => frame.angles));
    },
  );

  it.each([
    'swing',
    'goblet-squat',
    'split-squat-hold',
    'bent-over-row',
    'hang-clean',
    'push-press',
  ] as const)(
    'keeps the ball of each foot where it stands (%s): it slips less than 1 % of height',
    (lift) => {
      const truth = clipTruth({ ...small, lift });
      const wanders = (['ballLeft', 'ballRight'] as const).map((name) => {
        const xs = truth.frames.map((frame) => frame.joints[name].x * truth.width);
        const ys = truth.frames.map((frame) => frame.joints[name].y * truth.height);
        return Math.hypot(Math.max(...xs) - Math.min(...xs), Math.max(...ys) - Math.min(...ys));
      });
      const first = truth.frames[0];
      const heightPx = first ? (first.joints.heelRight.y - first.joints.head.y) * truth.height : 0;
      expect(heightPx).toBeGreaterThan(50);
      expect(Math.max(...wanders)).toBeLessThan(0.01 * heightPx);
    },
  );

  it('follows the tempo asked for: the deepest knee lies in the pause at the bottom', () => {
    const tempo = { downS: 2, pauseBottomS: 0.5, upS: 1, pauseTopS: 0.4 };
    const truth = clipTruth({ ...small, lift: 'goblet-squat', reps: 2, tempo });
    expect(truth.durationMs).toBe(450 + 2 * 3900 + 450);
    const bottoms = truth.instants.filter((instant) => instant.kind === 'bottom');
    expect(bottoms.map((instant) => instant.atMs)).toEqual([450 + 2250, 450 + 3900 + 2250]);
    for (const { atMs } of bottoms) {
      const near = truth.frames.filter((frame) => Math.abs(frame.atMs - atMs) < 1900);
      const deepest = Math.min(...near.map((frame) => frame.angles.kneeRight));
      const there = truth.frames[Math.round((atMs * truth.fps) / 1000)]?.angles.kneeRight ?? 180;
      expect(there - deepest).toBeLessThan(0.5);
    }
  });

  it.each([0.5, 0.8, 1])('follows the depth asked for: %s of the range of the knee', (depth) => {
    const truth = clipTruth({ ...small, lift: 'goblet-squat', depth });
    const knees = truth.frames.map((frame) => frame.angles.kneeRight);
    // A straight stand keeps 4° of knee flexion; the full range ends at 114° of it.
    expect(180 - Math.min(...knees)).toBeCloseTo(4 + 110 * depth, 0);
    expect(180 - Math.max(...knees)).toBeCloseTo(4, 0);
  });

  it('refuses what it cannot draw, and says why', () => {
    expect(() => clipTruth({ ...small, lift: 'swing', faults: { 'knees-fall-in': 1 } })).toThrow(
      /no fault "knees-fall-in"/,
    );
    expect(() => clipTruth({ ...small, lift: 'swing', depth: 4 })).toThrow(/Depth is 4/);
  });
});
