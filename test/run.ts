import { spawnSync } from 'node:child_process';
import { mkdtempSync, readFileSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import * as z from 'zod';

/** Server-side projects of vitest.config.ts, in order; `npm test -- unit` runs only those named. */
const STEPS = ['unit', 'media'];

const Report = z.object({ numPassedTests: z.number(), numFailedTests: z.number(), success: z.boolean() });

const dir = mkdtempSync(join(tmpdir(), 'midfoot-run-'));
let passed = 0;
let failed = 0;
try {
  const asked = process.argv.slice(2);
  for (const step of asked.length > 0 ? asked : STEPS) {
    const file = join(dir, `${step}.json`);
    console.log(`\n== ${step}`);
    const run = spawnSync(
      process.execPath,
      ['node_modules/vitest/vitest.mjs', 'run', '--project', step, '--reporter=default', '--reporter=json', `--outputFile.json=${file}`],
      { stdio: 'inherit' },
    );
    const report = Report.parse(JSON.parse(readFileSync(file, 'utf8')));
    passed += report.numPassedTests;
    failed += report.numFailedTests;
    // A file that does not load has no test to fail, and still fails the run.
    if (run.status !== 0 && report.numFailedTests === 0) failed += 1;
  }
} finally {
  rmSync(dir, { recursive: true, force: true });
}
console.log(`${String(passed)} passed, ${String(failed)} failed`);
process.exitCode = failed === 0 && passed > 0 ? 0 : 1;
