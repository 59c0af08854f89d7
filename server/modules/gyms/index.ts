export { addGym, createGyms, gymOf, type GymsService } from './gyms-service';
export { registerGymsRoutes } from './gyms-routes';
