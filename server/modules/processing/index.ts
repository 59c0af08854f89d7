export { beat, findClip, pruneProgressEvents, type ClipToProcess } from './processing-repository';
export { giveClipUp, publishClip, refuseClip, reportProgress } from './processing-service';
