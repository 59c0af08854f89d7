export { beat, findClip, pruneProgressEvents, type ClipToProcess } from './processing-repository';
export { publishClip, refuseClip, reportProgress } from './processing-service';
