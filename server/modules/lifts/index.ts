export { registerLiftsRoutes } from './lifts-routes';
export { createLifts, liftsByIds, listedLift, type Lifts } from './lifts-service';
