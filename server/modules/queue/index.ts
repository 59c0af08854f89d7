export { PICK_UP_MS, endLease, heldTake, releaseAll, sweepLapsed, takeLease } from './leases';
export { registerQueueRoutes } from './queue-routes';
export { createQueue, type QueueService } from './queue-service';
