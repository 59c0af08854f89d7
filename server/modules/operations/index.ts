export { registerEventStreamRoutes } from './event-stream-routes';
export { registerOperationsRoutes } from './operations-routes';
export { createMetrics, type Metrics } from './metrics';
