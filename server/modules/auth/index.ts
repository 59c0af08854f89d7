export { registerAuthRoutes } from './auth-routes';
export { createAuth, type Auth } from './auth-service';
