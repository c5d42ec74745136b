/**
 * Writes the demo's discharge logs and truth.json into data/demo/logs. Run again after a change to the scenario:
 * node --import tsx scripts/writeDemoLogs.ts
 */
import { writeFileSync } from 'node:fs';
import { join } from 'node:path';

import { createDemoLogs } from '@/data/demo/logs/demoLogs';

const folder = join(__dirname, '../data/demo/logs');
const logs = createDemoLogs();
for (const { file, text } of logs) writeFileSync(join(folder, file), text);
const truths = Object.fromEntries(logs.map(({ file, truth }) => [file, truth]));
writeFileSync(join(folder, 'truth.json'), `${JSON.stringify(truths, null, 2)}\n`);
