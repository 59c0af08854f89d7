export { createAuthenticate, createSessions, endAllSessions, type PublicSession, type Sessions } from './sessions-service';
