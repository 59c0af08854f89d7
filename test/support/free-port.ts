export { freePort } from '../../server/start/ports';
