export { registerTurnaroundRoutes } from './turnaround-routes';
export { createTurnaround, type TurnaroundService } from './turnaround-service';
