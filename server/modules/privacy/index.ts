import type { Platform } from '../../platform/platform';
import { createErasure } from './erasure-service';
import { createExports } from './export-service';
import type { PrivacyDeps } from './privacy-deps';
import type { Privacy } from './privacy-routes';

export { registerPrivacyRoutes, type Privacy } from './privacy-routes';

export function createPrivacy(platform: Platform, deps: PrivacyDeps): Privacy {
  return { exports: createExports(platform, deps), erasure: createErasure(platform, deps) };
}
