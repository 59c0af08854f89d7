import { openStage } from '../../support/stage';

/** Opens one stage for the run; tests read where it is from the environment. */
export default async function setup(): Promise<() => Promise<void>> {
  const stage = await openStage();
  process.env['MIDFOOT_URL'] = stage.url;
  process.env['MIDFOOT_SERVICES'] = JSON.stringify(stage.services);
  return () => stage.stop();
}
