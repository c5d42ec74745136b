import { spawnSync } from 'node:child_process';
import { readFileSync, rmSync } from 'node:fs';

import { buildWeb } from './buildWeb';
import { findChromium } from './findChromium';

const report = '.jest/report.json';

/** `npm test`: build what the browser tests drive, run every test, end with the counts on a line of their own. */
function main(): number {
  const chromium = findChromium();
  buildWeb();
  rmSync(report, { force: true });
  const args = ['jest', '--json', `--outputFile=${report}`, '--maxWorkers=2', ...process.argv.slice(2)];
  const { status } = spawnSync('npx', args, {
    stdio: ['ignore', 'ignore', 'inherit'],
    env: { ...process.env, CHROMIUM_PATH: chromium },
  });
  const counts = readCounts();
  console.log(`${counts.passed} passed, ${counts.failed} failed`);
  return status === 0 && counts.failed === 0 ? 0 : 1;
}

/** A suite that could not even be loaded counts as one failure. */
function readCounts(): { passed: number; failed: number } {
  try {
    const { numPassedTests, numFailedTests, numRuntimeErrorTestSuites } = JSON.parse(readFileSync(report, 'utf8'));
    return { passed: numPassedTests, failed: numFailedTests + numRuntimeErrorTestSuites };
  } catch {
    return { passed: 0, failed: 1 };
  }
}

try {
  process.exitCode = main();
} catch (error) {
  console.error(error instanceof Error ? error.message : error);
  console.log('0 passed, 1 failed');
  process.exitCode = 1;
}
