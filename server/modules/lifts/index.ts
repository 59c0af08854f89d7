export { registerLiftsRoutes } from './lifts-routes';
export { createLifts, liftsByIds, liftToJudgeBy, listedLift, type Lifts } from './lifts-service';
