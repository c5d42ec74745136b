import { readFileSync, statSync } from 'node:fs';
import { join } from 'node:path';

import iconv from 'iconv-lite';

import { createDemoLogs } from '@/data/demo/logs/demoLogs';
import { createLogReader, decodeSniff, integrateLog, recogniseColumns } from '@/lib/measure';

const folder = join(__dirname, '../../data/demo/logs');
const logs = createDemoLogs();
const truths = JSON.parse(readFileSync(join(folder, 'truth.json'), 'utf8')) as Record<string, unknown>;

const readAsUploaded = (file: string) => {
  const bytes = readFileSync(join(folder, file));
  const sniffed = decodeSniff(bytes);
  if (!sniffed.ok) throw new Error(sniffed.message);
  const text = iconv.decode(bytes, sniffed.encoding);
  const recognised = recogniseColumns(text);
  if (!recognised.ok) throw new Error(recognised.message);
  const reader = createLogReader({ mapping: recognised.mapping });
  reader.push(text);
  const samples = reader.finish();
  if (!samples.ok) throw new Error(samples.message);
  const result = integrateLog(samples);
  if (!result.ok) throw new Error(result.message);
  return { recognised, result };
};

describe('the demo logs', () => {
  test('there are three, as the generator writes them, and the truth beside them is theirs', () => {
    expect(logs).toHaveLength(3);
    expect(Object.keys(truths)).toEqual(logs.map(({ file }) => file));
    for (const { file, text, truth } of logs) {
      expect(readFileSync(join(folder, file), 'utf8')).toBe(text);
      expect(truths[file]).toEqual(truth);
      expect(statSync(join(folder, file)).size).toBeLessThan(300_000);
    }
  });

  test.each(logs.map(({ file, truth }) => ({ file, truth })))(
    '$file is recognised without a question and integrates to its truth',
    ({ file, truth }) => {
      const { recognised, result } = readAsUploaded(file);
      expect(recognised.questions).toEqual([]);
      // Truth: the simulation's own sum over every second. Tolerance: the load ends between two samples, so up to
      // half an interval (30 s) of 4 to 6 hours can be missed, 0.2 %; the noise of the samples averages out.
      expect(Math.abs(result.capacityAh / truth.capacityAh - 1)).toBeLessThan(0.002);
      expect(Math.abs(result.energyWh! / truth.energyWh - 1)).toBeLessThan(0.002);
      expect(Math.abs(result.durationS - truth.durationS)).toBeLessThanOrEqual(120);
      // Sensors are written to 0.1 °C (0.1 °F) with 0.05 °C of noise.
      expect(Math.abs(result.startTemperatureC! - truth.startTemperatureC)).toBeLessThan(0.3);
      expect(Math.abs(result.endTemperatureC! - truth.endTemperatureC)).toBeLessThan(0.3);
      // In the knee a cell falls by 0.07 V between two samples a minute apart.
      expect(Math.abs(result.lowestCellAtEndV! - truth.lowestCellAtEndV)).toBeLessThan(0.08);
    },
  );

  test('the pause of the second and the gap of the third are found and said', () => {
    const paused = readAsUploaded('workshop-2026-11-15.csv').result;
    expect(paused.legs).toBe(2);
    const gapped = readAsUploaded('barn-2026-11-14.csv').result;
    // 240 s without rows, of about 15,300 s under a steady load.
    expect(gapped.gapChargeFraction).toBeGreaterThan(0.013);
    expect(gapped.gapChargeFraction).toBeLessThan(0.019);
  });
});
