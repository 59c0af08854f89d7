import { type SourceFacts } from './facts';
import { proxyRate } from './frame-rate';
import { type Rational, toNumber } from './rational';

/** The part of the clip to keep, in milliseconds of real time after its first picture. */
export interface Trim {
  startMs: number;
  endMs: number;
}

/** Width and height in whole pixels. */
export interface Size {
  width: number;
  height: number;
}

/** What will be made of a source: sizes, rate, and which pictures go where. */
export interface RenditionPlan {
  proxy: Size & { fps: Rational; frames: number };
  /** The source's instant of the proxy's picture n is (firstFrame + n) / fps. */
  firstFrame: number;
  thumbnail: Size;
  filmstripCell: Size;
  /** The proxy's pictures that become thumbnails and the filmstrip's cells. */
  thumbnailFrames: number[];
  /** The proxy's pictures from which the sharpest becomes the poster. */
  posterFrames: number[];
}

/** Stills in the filmstrip, and thumbnails. */
export const THUMBNAIL_COUNT = 12;
const POSTER_CANDIDATES = 5;
const THUMBNAIL_LONG_SIDE = 320;
const FILMSTRIP_CELL_HEIGHT = 120;

const even = (pixels: number): number => Math.max(2, 2 * Math.round(pixels / 2));

/** The size with its short side brought down to `shortSide` (never up), both sides even as 4:2:0 needs. */
export function fitShortSide({ width, height }: Size, shortSide: number): Size {
  const scale = Math.min(1, shortSide / Math.min(width, height));
  return { width: even(width * scale), height: even(height * scale) };
}

/** Works out the renditions of a source. A trim is rounded to whole proxy pictures and to the clip's ends. */
export function planRenditions(facts: SourceFacts, shortSide: number, trim?: Trim): RenditionPlan {
  const fps = proxyRate(facts.frameRate);
  const rate = toNumber(fps);
  const allFrames = Math.max(1, Math.round((facts.durationMs / 1000) * rate));
  const frameAt = (ms: number) => Math.min(allFrames, Math.max(0, Math.round((ms / 1000) * rate)));
  const firstFrame = trim ? frameAt(trim.startMs) : 0;
  const frames = (trim ? frameAt(trim.endMs) : allFrames) - firstFrame;

  const size = fitShortSide(facts, shortSide);
  const thumbnailScale = Math.min(1, THUMBNAIL_LONG_SIDE / Math.max(size.width, size.height));
  return {
    proxy: { ...size, fps, frames },
    firstFrame,
    thumbnail: { width: even(size.width * thumbnailScale), height: even(size.height * thumbnailScale) },
    filmstripCell: {
      width: even(Math.min(THUMBNAIL_LONG_SIDE, (FILMSTRIP_CELL_HEIGHT * size.width) / size.height)),
      height: FILMSTRIP_CELL_HEIGHT,
    },
    thumbnailFrames: spread(THUMBNAIL_COUNT, 0, frames),
    posterFrames: spread(POSTER_CANDIDATES, frames / 3, (2 * frames) / 3),
  };
}

/** `count` whole numbers in the middles of equal parts of [from, to), without repeats. */
function spread(count: number, from: number, to: number): number[] {
  const numbers = Array.from({ length: count }, (_, k) =>
    Math.floor(from + ((k + 0.5) * (to - from)) / count),
  );
  return [...new Set(numbers)];
}
