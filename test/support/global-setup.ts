import { type TestProject } from 'vitest/node';
import { startServices } from './services';

/** Starts the services once for a run; specs read their addresses by `inject('services')`. */
export default async function setup(project: TestProject): Promise<() => Promise<void>> {
  const services = await startServices();
  project.provide('services', services.addresses);
  return () => services.stop();
}
