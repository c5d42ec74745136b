/**
 * Writes the demo's discharge logs and truth.json beside this file. Run again after a change to the scenario:
 * node --import tsx data/demo/logs/writeDemoLogs.ts
 */
import { writeFileSync } from 'node:fs';
import { join } from 'node:path';

import { createDemoLogs } from './demoLogs';

const logs = createDemoLogs();
for (const { file, text } of logs) writeFileSync(join(__dirname, file), text);
const truths = Object.fromEntries(logs.map(({ file, truth }) => [file, truth]));
writeFileSync(join(__dirname, 'truth.json'), `${JSON.stringify(truths, null, 2)}\n`);
