import { libraryRoutes } from '../../contract';
import type { Routes } from '../../platform/http/routes';
import type { Assignments } from './assignments-service';

export function registerAssignmentsRoutes(routes: Routes, assignments: Assignments): void {
  routes.guarded(libraryRoutes.listAssignments, ({ actor, query }) => assignments.list(actor, query));
  routes.guarded(libraryRoutes.createAssignment, ({ actor, body }) => assignments.create(actor, body));
  routes.guarded(libraryRoutes.getAssignment, ({ actor, params }) => assignments.get(actor, params.id));
  routes.guarded(libraryRoutes.closeAssignment, ({ actor, params }) => assignments.close(actor, params.id));
  routes.guarded(libraryRoutes.reopenAssignment, ({ actor, params }) => assignments.reopen(actor, params.id));
}
