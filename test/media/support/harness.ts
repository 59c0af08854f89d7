import { mkdtemp, readdir, rm } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import {
  makeRenditions,
  type RenditionRequest,
  type Renditions,
  UnplayableError,
} from '../../../server/media';

/** A private place for one spec's clips and jobs. */
export interface Bench {
  directory: string;
  /** A path in the place; the name plays no part in what becomes of the file. */
  file(name: string): string;
  /** Makes renditions in a fresh directory of their own. */
  render(inputPath: string, request?: Partial<RenditionRequest>): Promise<Renditions>;
  /** What became of a file: its renditions, or the refusal. Errors of ours are thrown. */
  judge(inputPath: string): Promise<Renditions | UnplayableError>;
  tidy(): Promise<void>;
}

/** Opens a place under the system's temporary directory. */
export async function openBench(): Promise<Bench> {
  const directory = await mkdtemp(join(tmpdir(), 'midfoot-media-'));
  const render: Bench['render'] = async (inputPath, request = {}) => {
    const workDir = await mkdtemp(join(directory, 'work-'));
    return makeRenditions({ inputPath, workDir, ...request });
  };
  return {
    directory,
    file: (name) => join(directory, name),
    render,
    judge: async (inputPath) => {
      try {
        return await render(inputPath);
      } catch (error) {
        if (error instanceof UnplayableError) return error;
        throw error;
      }
    },
    tidy: () => rm(directory, { recursive: true, force: true }),
  };
}

/** The names of everything left in the working directories of a place. */
export async function leftInWorkDirectories(bench: Bench): Promise<string[]> {
  const works = (await readdir(bench.directory)).filter((name) => name.startsWith('work-'));
  return (await Promise.all(works.map((work) => readdir(join(bench.directory, work))))).flat();
}
