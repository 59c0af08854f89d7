import 'vitest';
import { type ServiceAddresses } from './services';

declare module 'vitest' {
  interface ProvidedContext {
    /** What global-setup.ts started. */
    services: ServiceAddresses;
  }
}
