import type { Role } from '../../contract/common';

/** Who makes a call, checked against the database for each one, so that a change of role applies at once. */
export interface Actor {
  readonly userId: string;
  readonly gymId: string;
  readonly sessionId: string;
  readonly role: Role;
  readonly name: string;
}

/** Finds the actor behind an access token, or null when the session has ended or the account is not active. */
export type Authenticate = (accessToken: string) => Promise<Actor | null>;
