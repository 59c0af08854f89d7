import { Caller } from '../../support/caller';

/** Where the stage of this run is. @throws Error outside a run */
export function stageUrl(): string {
  const url = process.env['MIDFOOT_URL'];
  if (!url) throw new Error('There is no stage; run "npm test -- e2e".');
  return url;
}

/** Somebody with a browser of their own, for what a test needs but does not try. */
export const caller = () => new Caller(stageUrl());
