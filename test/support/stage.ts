import { spawn } from 'node:child_process';
import { join } from 'node:path';
import { buildOutput, clientDir, hashInputs, isBuilt, takeBuild } from '../../server/start/client-build';
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

/** Builds the client for production, unless the one that stands was made from the same sources. */
export async function buildClient(): Promise<void> {
  const hash = await hashInputs(projectDir);
  if (await isBuilt(projectDir, hash)) return;
  const code = await new Promise<number | null>((resolve, reject) => {
    const args = ['node_modules/@angular/cli/bin/ng.js', 'build', '--output-path', buildOutput];
    const build = spawn(process.execPath, [...args, '--progress=false'], {
      cwd: projectDir,
      stdio: ['ignore', 'inherit', 'inherit'],
      env: { ...process.env, NG_CLI_ANALYTICS: 'false' },
    });
    build.once('error', reject);
    build.once('exit', resolve);
  });
  if (code !== 0) throw new Error('The client could not be built; what is wrong stands above.');
  await takeBuild(projectDir, hash);
}

/** @param more settings beside the tests' usual ones */
export async function openStage(more: NodeJS.ProcessEnv = {}): Promise<Stage> {
  await buildClient();
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
