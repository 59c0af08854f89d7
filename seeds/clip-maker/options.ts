import type { BuildId } from './anthropometry';
import type { ImplementKind } from './implements';
import type { LiftId } from './lift-ids';
import type { Tempo } from './timeline';

export const VIEWS = ['front', 'side'] as const;
export type View = (typeof VIEWS)[number];

export const SKIN_TONES = ['porcelain', 'sand', 'amber', 'chestnut', 'umber', 'ebony'] as const;
export type SkinTone = (typeof SKIN_TONES)[number];
export const HAIR_STYLES = ['short', 'crop', 'bun', 'tail', 'shaved', 'curls'] as const;
export type HairStyle = (typeof HAIR_STYLES)[number];
export const OUTFITS = ['spruce', 'slate', 'brick', 'navy', 'ochre', 'plum'] as const;
export type Outfit = (typeof OUTFITS)[number];
export const SCENES = ['slipway', 'garage', 'loft'] as const;
export type Scene = (typeof SCENES)[number];

/** Who is filmed. Whatever is left out is drawn from the seed. */
export interface Look {
  build: BuildId;
  skin: SkinTone;
  hair: HairStyle;
  hairColour: string;
  outfit: Outfit;
  legwear: 'shorts' | 'leggings';
  beard: boolean;
}

/** What the encoder adds beside the picture; all off unless asked for. */
export interface FileOptions {
  /** H.264 in .mp4, or HEVC in .mov as phones write it. */
  codec: 'h264' | 'hevc';
  /** Stores a portrait picture lying down, with a display matrix that stands it up. */
  storedRotated: boolean;
  audio: 'none' | 'silence' | 'tone';
  /** Place and device written into the container, for tests of their removal. */
  location?: { latitude: number; longitude: number };
  device?: { make: string; model: string };
}

export interface ClipOptions {
  lift: LiftId;
  view: View;
  seed?: number;
  reps?: number;
  /** Replaces the lift's own tempo, wholly or in part. */
  tempo?: Partial<Tempo>;
  /** Share of the lift's full range, 0.3 to 1.1. */
  depth?: number;
  fps?: number;
  /** Short and long side of the picture in pixels, even. */
  size?: { shortPx: number; longPx: number };
  orientation?: 'portrait' | 'landscape';
  /** Turns the camera away from its nominal place, about the vertical, degrees. */
  offAxisDeg?: number;
  look?: Partial<Look>;
  scene?: Scene;
  implement?: ImplementKind;
  loadKg?: number;
  /** Doses 0 to 1 by fault id. */
  faults?: Record<string, number>;
  /** Hand-held sway, 0 none to 1 plain. */
  sway?: number;
  /** Strength of camera noise, 0 to 1. */
  noise?: number;
  frameCounter?: boolean;
  /** Draws a small dot of known colour on every joint, for tests. */
  jointDots?: boolean;
  file?: Partial<FileOptions>;
}
