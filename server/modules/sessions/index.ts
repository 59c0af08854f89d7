export { deleteSessions } from './sessions-repository';
export {
  createAuthenticate,
  createSessions,
  endAllSessions,
  type PublicSession,
  type Sessions,
} from './sessions-service';
