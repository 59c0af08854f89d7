import type { Clock } from './clock';
import type { Config } from './config';
import type { Database } from './database';
import type { EventStream } from './events';
import type { Logger } from './logging';
import type { ObjectStore } from './object-store';
import type { PasswordHasher } from './passwords';

/** What every domain is built on; made once in a composition root. */
export interface Platform {
  readonly config: Config;
  readonly database: Database;
  readonly store: ObjectStore;
  readonly clock: Clock;
  readonly logger: Logger;
  readonly passwords: PasswordHasher;
  readonly events: EventStream;
}
