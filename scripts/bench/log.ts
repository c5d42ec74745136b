// Times the integration of a log of a million rows (about 40 MB) and the memory it takes, as the server's worker does
// it: node --expose-gc --import tsx scripts/bench/log.ts [rows]. Bar: under 10 s of CPU and 300 MB beside the text.
import { createLogReader, integrateLog, recogniseColumns } from '../../lib/measure';

const rows = Number(process.argv[2] ?? 1_000_000);
const pieceRows = 1000;
const start = Date.UTC(2026, 10, 2, 6);

/** A piece of the log as text: a line a second, 53.20 V falling, about 56 A. */
function piece(from: number): string {
  const lines: string[] = [];
  for (let row = from; row < Math.min(rows, from + pieceRows); row += 1) {
    const stamp = new Date(start + row * 20).toISOString();
    const share = row / rows;
    const current = row < 100 || row > rows - 100 ? 0 : 56 + Math.sin(row / 50);
    const values = [54.4 - 9 * share, current, 20 + 5 * share].map((value) => value.toFixed(3));
    lines.push([stamp, ...values].join(','));
  }
  return `${lines.join('\n')}\n`;
}

const head = 'time,voltage (V),current (A),temperature (°C)\n';
const recognised = recogniseColumns(head + piece(0));
if (!recognised.ok) throw new Error(recognised.message);

globalThis.gc?.();
const before = process.memoryUsage();
const reader = createLogReader({ mapping: recognised.mapping });
let bytes = head.length;
let most = 0;
let reading = 0;
reader.push(head);
for (let from = 0; from < rows; from += pieceRows) {
  const text = piece(from);
  bytes += text.length;
  const began = process.cpuUsage();
  const failure = reader.push(text);
  const spent = process.cpuUsage(began);
  if (failure) throw new Error(failure.message);
  reading += spent.user + spent.system;
  if (from % 50_000 === 0) most = Math.max(most, process.memoryUsage().rss);
}
const began = process.cpuUsage();
const samples = reader.finish();
const result = samples.ok ? integrateLog(samples) : samples;
const spent = process.cpuUsage(began);
most = Math.max(most, process.memoryUsage().rss);
if (!result.ok) throw new Error(result.message);
const megabytes = (value: number) => (value / 1e6).toFixed(0);
console.log(`${rows} rows, ${megabytes(bytes)} MB of text: ${result.capacityAh.toFixed(3)} Ah`);
console.log(
  `reading ${(reading / 1e6).toFixed(2)} s CPU, integrating ${((spent.user + spent.system) / 1e6).toFixed(2)} s CPU`,
);
console.log(`memory ${megabytes(most - before.rss)} MB above the start (resident, at most)`);
