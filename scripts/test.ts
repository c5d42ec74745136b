import { spawnSync } from 'node:child_process';
import { mkdirSync, readFileSync, rmSync } from 'node:fs';

import { buildWeb } from './buildWeb';
import { findChromium } from './findChromium';

interface Counts {
  passed: number;
  failed: number;
}

const reports = '.jest';

/** The browser's tests come last and by themselves: they wait for pages, which heavy neighbours would slow down. */
const rounds = [['unit', 'server', 'ui'], ['browser']];

/** `npm test`: build what the browser tests drive, run every test, end with the counts on a line of their own. */
async function main(): Promise<number> {
  const chromium = findChromium();
  await buildWeb();
  mkdirSync(reports, { recursive: true });
  const total: Counts = { passed: 0, failed: 0 };
  for (const projects of rounds) {
    const { passed, failed } = runRound(projects, chromium);
    total.passed += passed;
    total.failed += failed;
  }
  console.log(`${total.passed} passed, ${total.failed} failed`);
  return total.failed === 0 ? 0 : 1;
}

/** Runs one round of jest, which tells what failed as it goes. */
function runRound(projects: string[], chromium: string): Counts {
  const report = `${reports}/${projects.join('-')}.json`;
  rmSync(report, { force: true });
  const options = ['--json', `--outputFile=${report}`, '--maxWorkers=2', '--passWithNoTests'];
  const args = ['jest', ...options, ...process.argv.slice(2), '--selectProjects', ...projects];
  const { status } = spawnSync('npx', args, {
    // Jest writes for people to stderr; its stdout is the report once more.
    stdio: ['ignore', 'ignore', 'inherit'],
    env: { ...process.env, CHROMIUM_PATH: chromium },
  });
  const counts = readCounts(report);
  // A round that failed without a failed test, such as one that was killed, is one failure.
  return status === 0 || counts.failed > 0 ? counts : { ...counts, failed: 1 };
}

/** A suite that could not even be loaded counts as one failure. */
function readCounts(report: string): Counts {
  try {
    const { numPassedTests, numFailedTests, numRuntimeErrorTestSuites } = JSON.parse(
      readFileSync(report, 'utf8'),
    );
    return { passed: numPassedTests, failed: numFailedTests + numRuntimeErrorTestSuites };
  } catch {
    return { passed: 0, failed: 1 };
  }
}

main().then(
  (code) => (process.exitCode = code),
  (error: unknown) => {
    console.error(error instanceof Error ? error.message : error);
    console.log('0 passed, 1 failed');
    process.exitCode = 1;
  },
);
