/** The door of `media`: what the upload route and the worker may use. */
export { type SourceFacts } from './facts';
export { DEFAULT_LIMITS, type MediaLimits } from './limits';
export {
  DEFAULT_SHORT_SIDE,
  makeRenditions,
  RECIPE_VERSION,
  type RenditionRequest,
  type Renditions,
  type Still,
} from './make-renditions';
export { type Size, THUMBNAIL_COUNT, type Trim } from './plan';
export { type Rational, toNumber } from './rational';
export {
  EXPLANATIONS,
  type Explanation,
  UNPLAYABLE_REASONS,
  UnplayableError,
  type UnplayableReason,
} from './reasons';
export { describeJail } from './run';
export { SNIFF_BYTES, type Sniffed, sniffContainer } from './sniff';
