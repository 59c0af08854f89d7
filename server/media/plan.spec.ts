import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { sampleFacts } from './facts.fixture';
import { fitShortSide, planRenditions } from './plan';

describe('sizes', () => {
  it.each([
    [{ width: 1920, height: 1080 }, 720, { width: 1280, height: 720 }],
    [{ width: 1080, height: 1920 }, 720, { width: 720, height: 1280 }],
    [{ width: 3840, height: 2160 }, 720, { width: 1280, height: 720 }],
    [{ width: 640, height: 360 }, 720, { width: 640, height: 360 }],
    [{ width: 641, height: 363 }, 720, { width: 642, height: 364 }],
    [{ width: 1440, height: 1080 }, 480, { width: 640, height: 480 }],
  ])('%j to %i is %j', (size, shortSide, fitted) => {
    expect(fitShortSide(size, shortSide)).toEqual(fitted);
  });

  it('are always even and never larger than the source by more than one pixel', () => {
    const side = fc.integer({ min: 64, max: 4096 });
    fc.assert(
      fc.property(side, side, fc.integer({ min: 240, max: 1080 }), (width, height, shortSide) => {
        const fitted = fitShortSide({ width, height }, shortSide);
        return (
          fitted.width % 2 === 0 &&
          fitted.height % 2 === 0 &&
          fitted.width <= width + 1 &&
          fitted.height <= height + 1
        );
      }),
    );
  });
});

describe('pictures', () => {
  it('all of them without a trim', () => {
    const plan = planRenditions(sampleFacts({ durationMs: 2000, frameRate: { num: 240, den: 1 } }), 720);
    expect(plan).toMatchObject({ firstFrame: 0, proxy: { fps: { num: 60, den: 1 }, frames: 120 } });
  });

  it('from the nearest picture to the trim’s start up to the nearest to its end, within the clip', () => {
    const facts = sampleFacts({ durationMs: 3000, frameRate: { num: 30, den: 1 } });
    expect(planRenditions(facts, 720, { startMs: 510, endMs: 1490 })).toMatchObject({
      firstFrame: 15,
      proxy: { frames: 30 },
    });
    expect(planRenditions(facts, 720, { startMs: -500, endMs: 9000 })).toMatchObject({
      firstFrame: 0,
      proxy: { frames: 90 },
    });
  });

  it('twelve distinct ones for the thumbnails, and the poster’s from the middle third', () => {
    fc.assert(
      fc.property(fc.integer({ min: 12, max: 7200 }), (frames) => {
        const plan = planRenditions(sampleFacts({ durationMs: (1000 * frames) / 30 }), 720);
        return (
          plan.proxy.frames === frames &&
          plan.thumbnailFrames.length === 12 &&
          plan.thumbnailFrames.every((n) => n >= 0 && n < frames) &&
          plan.posterFrames.every((n) => n >= Math.floor(frames / 3) && n < (2 * frames) / 3)
        );
      }),
    );
  });
});
