export { registerAssignmentsRoutes } from './assignments-routes';
export { createAssignments, type Assignments, type AssignmentsDeps } from './assignments-service';
export { assignmentsByIds } from './assignment-dtos';
