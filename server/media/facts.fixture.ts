import { type SourceFacts } from './facts';

/** A plain phone clip's facts, for specs; give what matters to the test. */
export function sampleFacts(changes: Partial<SourceFacts> = {}): SourceFacts {
  return {
    container: 'iso-bmff',
    sizeBytes: 1_000_000,
    videoStream: 0,
    audioStream: 1,
    hasAudio: true,
    codec: 'h264',
    pixelFormat: 'yuv420p',
    width: 1080,
    height: 1920,
    rotation: 90,
    mirrored: false,
    sampleAspect: { num: 1, den: 1 },
    interlaced: false,
    hdr: 'none',
    colour: { matrix: 'bt709', range: 'tv' },
    startMs: 0,
    durationMs: 2000,
    frameRate: { num: 30, den: 1 },
    variableFrameRate: false,
    frames: 60,
    slowedBy: 1,
    ...changes,
  };
}
