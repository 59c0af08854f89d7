import { createHash } from 'node:crypto';
import type { ClipDto, ClipProblem } from '../../contract/takes';
import { EXPLANATIONS, type Explanation } from '../../media/reasons';
import type { ClipRow } from './take-clips-repository';

const THUMBNAILS = 12;

/** Said when every try to process a clip failed on our side. */
const GAVE_UP: Explanation = {
  message: 'We could not make this clip playable. That was our fault, not yours.',
  remedy: 'Press Try again. If it fails once more, send the clip again or tell your coach.',
};

const isKnown = (reason: string): reason is keyof typeof EXPLANATIONS => Object.hasOwn(EXPLANATIONS, reason);

/** Why a clip or its take cannot be used, in the member's words. */
export function problemOf(reason: string): ClipProblem {
  return { reason, ...(isKnown(reason) ? EXPLANATIONS[reason] : GAVE_UP) };
}

/** Changes whenever the renditions do, so that an address with it may be kept by a browser. */
const versionOf = (outputPrefix: string) =>
  createHash('sha256').update(outputPrefix).digest('base64url').slice(0, 8);

function mediaOf(clipId: string, outputPrefix: string): NonNullable<ClipDto['media']> {
  const version = versionOf(outputPrefix);
  const address = (kind: string) => `/api/clips/${clipId}/${kind}?v=${version}`;
  return {
    proxy: address('proxy'),
    poster: address('poster'),
    filmstrip: address('filmstrip'),
    thumbnails: Array.from({ length: THUMBNAILS }, (_, n) => address(`thumbnail/${n}`)),
  };
}

export function clipDto(row: ClipRow): ClipDto {
  return {
    id: row.id,
    takeId: row.takeId,
    view: row.view,
    state: row.state,
    progress: row.state === 'ready' ? 100 : row.progress,
    sizeBytes: row.sizeBytes,
    sha256: row.sha256,
    durationMs: row.durationMs,
    width: row.width,
    height: row.height,
    fps: row.fps,
    frames: row.frames,
    trim: row.trim,
    problem: row.state === 'unplayable' ? problemOf(row.problemReason ?? 'gave-up') : null,
    media: row.state === 'ready' && row.outputPrefix !== null ? mediaOf(row.id, row.outputPrefix) : null,
  };
}
