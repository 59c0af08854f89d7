import { join } from 'node:path';
import { buildClient } from '../../server/start/build-client';
import { clientDir } from '../../server/start/client-build';
import { freePort } from '../../server/start/ports';
import { answersHttp, startProcess, waitUntilReady, type RunningProcess } from '../../server/start/processes';
import { projectDir } from '../../server/start/project';
import { createDatabase } from './database';
import { serviceEnvironment } from './environment';
import { startServices, type ServiceAddresses } from './services';

/** The whole product as it is served: built client, api and one worker, on services of its own. */
export interface Stage {
  readonly url: string;
  readonly services: ServiceAddresses;
  /** The environment its programs run with. */
  readonly env: NodeJS.ProcessEnv;
  readonly api: RunningProcess;
  stop(): Promise<void>;
}

/** @param more settings beside the tests' usual ones */
export async function openStage(more: NodeJS.ProcessEnv = {}): Promise<Stage> {
  await buildClient((line) => process.stdout.write(`${line}\n`));
  const services = await startServices();
  const started: RunningProcess[] = [];
  const stop = async () => {
    for (const program of started.reverse()) await program.stop();
    await services.stop();
  };
  try {
    const database = await createDatabase(services.addresses);
    const port = await freePort();
    const url = `http://127.0.0.1:${String(port)}`;
    const env = {
      ...serviceEnvironment(services.addresses, database.url),
      PORT: String(port),
      PUBLIC_URL: url,
      CLIENT_DIR: join(projectDir, clientDir),
      ...more,
    };
    const program = async (name: string, file: string) => {
      const running = await startProcess({
        name,
        command: process.execPath,
        args: ['--import', 'tsx', file],
        env,
        cwd: projectDir,
        logFile: join(services.addresses.dir, `${name}.log`),
      });
      started.push(running);
      return running;
    };
    const api = await program('api', 'server/main.ts');
    await waitUntilReady(api, () => answersHttp(`${url}/api/health`), 60_000);
    await program('worker', 'server/worker/main.ts');
    return { url, services: services.addresses, env, api, stop };
  } catch (error) {
    await stop();
    throw error;
  }
}
