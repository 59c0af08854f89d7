export { createClips, type ClipsService } from './clips-service';
export { registerClipsRoutes } from './clips-routes';
