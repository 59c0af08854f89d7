import { describe, expect, it } from 'vitest';
import { DOT_RGB, Painter } from './draw/painter';
import { JOINT_NAMES, LIFT_IDS, VIEWS, clipTruth } from './index';
import { planOf } from './set';

/** The middle of the pixels near a place that have a colour exactly; undefined when too few to be a whole dot. */
function dotNear(
  picture: Uint8ClampedArray,
  width: number,
  x: number,
  y: number,
  rgb: readonly number[],
): { x: number; y: number } | undefined {
  const found: [number, number][] = [];
  for (let py = Math.floor(y) - 5; py <= y + 5; py++) {
    for (let px = Math.floor(x) - 5; px <= x + 5; px++) {
      const o = (py * width + px) * 4;
      if (rgb.every((level, c) => picture[o + c] === level)) found.push([px + 0.5, py + 0.5]);
    }
  }
  if (found.length < 24) return undefined;
  return {
    x: found.reduce((sum, [px]) => sum + px, 0) / found.length,
    y: found.reduce((sum, [, py]) => sum + py, 0) / found.length,
  };
}

describe('the pixels of a clip', () => {
  it.each(LIFT_IDS.flatMap((lift) => VIEWS.map((view) => [lift, view] as const)))(
    'have the joints where the truth says (%s, %s)',
    (lift, view) => {
      const options = {
        lift,
        view,
        size: { shortPx: 270, longPx: 480 },
        jointDots: true,
        sway: 0.5,
        fps: 10,
        seed: 4,
      } as const;
      const truth = clipTruth(options);
      const painter = new Painter(planOf(options));
      let whole = 0;
      for (const index of [0, Math.floor(truth.frameCount / 2)]) {
        const picture = painter.frame(index);
        const joints = truth.frames[index]?.joints;
        JOINT_NAMES.forEach((name, i) => {
          const said = {
            x: (joints?.[name].x ?? 0) * truth.width,
            y: (joints?.[name].y ?? 0) * truth.height,
          };
          const clear = JOINT_NAMES.every((other) => {
            const there = joints?.[other];
            return (
              other === name ||
              !there ||
              Math.hypot(there.x * truth.width - said.x, there.y * truth.height - said.y) > 10
            );
          });
          if (!clear) return;
          const seen = dotNear(picture, truth.width, said.x, said.y, DOT_RGB[i % 2] ?? DOT_RGB[0]);
          expect(seen, `${name} in frame ${index}`).toBeDefined();
          expect(Math.hypot((seen?.x ?? 0) - said.x, (seen?.y ?? 0) - said.y)).toBeLessThan(1.5);
          whole++;
        });
      }
      expect(whole).toBeGreaterThan(4);
    },
  );
});
