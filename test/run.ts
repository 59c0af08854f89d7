import { spawnSync } from 'node:child_process';
import { chmodSync, existsSync, mkdtempSync, readFileSync, readdirSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import * as z from 'zod';

/**
 * `npm test` runs every step and ends with `N passed, N failed`; `npm test -- unit client` runs those named.
 * A check without tests of its own (formatting, types, imports) counts as one.
 */
type Counts = readonly [passed: number, failed: number];
interface Step {
  readonly name: string;
  /** Arguments of node. */
  readonly args: (report: string) => readonly string[];
  /** Reads how many passed and failed from what the tool wrote; null for a check that is one test. */
  readonly read: ((report: unknown) => Counts) | null;
}

const Vitest = z.object({ numPassedTests: z.number(), numFailedTests: z.number() });
const Playwright = z.object({
  stats: z.object({ expected: z.number(), unexpected: z.number(), flaky: z.number(), skipped: z.number() }),
});

const readVitest = (report: unknown): Counts => {
  const { numPassedTests, numFailedTests } = Vitest.parse(report);
  return [numPassedTests, numFailedTests];
};
const readPlaywright = (report: unknown): Counts => {
  const { stats } = Playwright.parse(report);
  // A test that was skipped or passed only the second time has not shown that the product works.
  return [stats.expected, stats.unexpected + stats.flaky + stats.skipped];
};

const check = (name: string, ...args: string[]): Step => ({ name, args: () => args, read: null });
const server = (name: string): Step => ({
  name,
  args: (report) => [
    'node_modules/vitest/vitest.mjs',
    'run',
    '--project',
    name,
    '--reporter=default',
    '--reporter=json',
    `--outputFile.json=${report}`,
  ],
  read: readVitest,
});
const tsc = (project: string) =>
  check(`types of ${project}`, 'node_modules/typescript/bin/tsc', '-p', project, '--noEmit');

const STEPS: readonly Step[] = [
  check('lint', 'node_modules/eslint/bin/eslint.js', '.', '--max-warnings', '0'),
  check('format', 'node_modules/prettier/bin/prettier.cjs', '--check', '.', '--log-level', 'warn'),
  tsc('tsconfig.server.json'),
  tsc('tsconfig.app.json'),
  tsc('tsconfig.spec.json'),
  check(
    'imports',
    'node_modules/dependency-cruiser/bin/dependency-cruise.mjs',
    '--config',
    '.dependency-cruiser.cjs',
    'server',
    'src',
    'migrations',
    'seeds',
    'test',
  ),
  server('unit'),
  server('media'),
  server('integration'),
  {
    name: 'client',
    args: (report) => [
      'node_modules/@angular/cli/bin/ng.js',
      'test',
      '--watch=false',
      '--reporters=json',
      '--reporters=default',
      `--output-file=${report}`,
    ],
    read: readVitest,
  },
  {
    name: 'e2e',
    args: () => ['node_modules/@playwright/test/cli.js', 'test', '--reporter=list,json'],
    read: readPlaywright,
  },
];

/** Processes that still carry the run's folder in their arguments or their environment. */
function leftBehind(dir: string): string[] {
  const found: string[] = [];
  for (const pid of readdirSync('/proc').filter(
    (name) => /^\d+$/.test(name) && Number(name) !== process.pid,
  )) {
    try {
      const command = readFileSync(`/proc/${pid}/cmdline`, 'utf8');
      const carries = command.includes(dir) || readFileSync(`/proc/${pid}/environ`, 'utf8').includes(dir);
      if (carries) found.push(`${pid} ${command.replaceAll('\0', ' ')}`);
    } catch (error) {
      const gone =
        error instanceof Error &&
        'code' in error &&
        ['ENOENT', 'ESRCH', 'EACCES'].includes(String(error.code));
      if (!gone) throw error;
    }
  }
  return found;
}

const asked = process.argv.slice(2);
const steps =
  asked.length === 0 ? STEPS : STEPS.filter((step) => asked.some((name) => step.name.startsWith(name)));
if (steps.length === 0) {
  console.error(`There is no such step. Steps: ${STEPS.map((step) => step.name).join(', ')}`);
  process.exit(1);
}

const dir = mkdtempSync(join(tmpdir(), 'midfoot-run-'));
// As /tmp is: the database gives up root's rights, and still writes its temporary files here.
chmodSync(dir, 0o1777);
let passed = 0;
let failed = 0;
const failures: string[] = [];
const count = (name: string, [good, bad]: Counts) => {
  passed += good;
  failed += bad;
  if (bad > 0) failures.push(name);
};

for (const [index, step] of steps.entries()) {
  const report = join(dir, `report-${String(index)}.json`);
  console.log(`\n== ${step.name}`);
  const began = Date.now();
  const run = spawnSync(process.execPath, [...step.args(report)], {
    stdio: 'inherit',
    env: {
      ...process.env,
      TMPDIR: dir,
      NG_CLI_ANALYTICS: 'false',
      PLAYWRIGHT_JSON_OUTPUT_NAME: report,
      AWS_SDK_JS_NODE_VERSION_SUPPORT_WARNING_DISABLED: 'true',
    },
  });
  const ended = run.status === 0;
  const counts: Counts =
    step.read && existsSync(report)
      ? step.read(JSON.parse(readFileSync(report, 'utf8')))
      : [step.read === null && ended ? 1 : 0, ended ? 0 : 1];
  // A file that does not load has no test to fail, and a step without a test shows nothing; both fail the run.
  const silent = (!ended && counts[1] === 0) || counts[0] + counts[1] === 0;
  count(step.name, silent ? [counts[0], 1] : counts);
  console.log(`   ${step.name}: ${String(Math.round((Date.now() - began) / 1000))} s`);
}

const left = leftBehind(dir);
if (left.length > 0) console.error(`Still running:\n${left.join('\n')}`);
count('nothing left running', left.length === 0 ? [1, 0] : [0, 1]);
rmSync(dir, { recursive: true, force: true });
if (failures.length > 0) console.log(`\nFailed: ${failures.join(', ')}`);
console.log(`${String(passed)} passed, ${String(failed)} failed`);
process.exitCode = failed === 0 ? 0 : 1;
