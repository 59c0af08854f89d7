import { type Rational } from './rational';

/** What a member's file holds, measured rather than believed. */
export interface SourceFacts {
  container: 'iso-bmff' | 'matroska';
  sizeBytes: number;
  /** Which of the file's streams is the picture, and which the sound (`null`: none that can be played). */
  videoStream: number;
  audioStream: number | null;
  hasAudio: boolean;
  codec: string;
  pixelFormat: string;
  /** As shown: turned upright, with square pixels. */
  width: number;
  height: number;
  /** Degrees clockwise by which the stored picture is turned to stand upright, and whether it is mirrored as well. */
  rotation: 0 | 90 | 180 | 270;
  mirrored: boolean;
  sampleAspect: Rational;
  interlaced: boolean;
  hdr: 'none' | 'pq' | 'hlg';
  /** In ffmpeg's words for its scaler; guessed from the size where the file says nothing. */
  colour: { matrix: 'bt709' | 'smpte170m' | 'bt2020' | 'fcc' | 'smpte240m'; range: 'tv' | 'pc' };
  /** The first picture's instant, after the file's own zero. */
  startMs: number;
  /** Real time: slow motion that the file plays slowed counts as long as it took. */
  durationMs: number;
  /** Pictures in a real second. */
  frameRate: Rational;
  variableFrameRate: boolean;
  frames: number;
  /** How many times slower than life the file plays by itself; 1 for nearly all. */
  slowedBy: number;
}
