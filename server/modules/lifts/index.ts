export { registerLiftsRoutes } from './lifts-routes';
export { createLifts, liftsByIds, type Lifts } from './lifts-service';
