// Uploads a log of a million rows to a server in this process and times its reading, asking the API for something else
// all the while: npm run bench:upload [rows]. Bars: under 10 s of CPU, under 300 MB beside what the process held before,
// other answers within 100 ms.
import { randomUUID } from 'node:crypto';
import { createWriteStream, mkdtempSync, openAsBlob, rmSync, statSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { Readable } from 'node:stream';
import { pipeline } from 'node:stream/promises';

import type { Upload } from '../../lib/contract/uploads';
import { readConfig } from '../../server/config';
import { Bank, CellType, User } from '../../server/db/models';
import { accessCookie, signAccessToken } from '../../server/http/actor';
import { start } from '../../server/start';

const rows = Number(process.argv[2] ?? 1_000_000);
const ratedAh = 280;
const mb = (bytes: number) => `${(bytes / 1e6).toFixed(0)} MB`;

/** A discharge at about 0.2 It over the whole log, with a little idle time at both ends. */
function* logPieces(): Generator<string> {
  yield 'time;voltage (V);current (A);temperature (°C);lowest cell (V);highest cell (V)\n';
  const startMs = Date.UTC(2026, 10, 2, 6);
  const stepMs = (4.8 * 3_600_000) / rows;
  for (let from = 0; from < rows; from += 1000) {
    let piece = '';
    for (let row = from; row < Math.min(rows, from + 1000); row += 1) {
      const share = row / rows;
      const amps = share < 0.005 || share > 0.995 ? 0 : -56 - Math.sin(row / 50);
      const stamp = new Date(startMs + row * stepMs).toISOString().slice(0, 23);
      const cellV = 3.34 - 0.5 * share ** 6;
      const values = [16 * cellV, amps, 21 + 4 * share, cellV - 0.01, cellV + 0.01];
      piece += `${stamp};${values.map((value) => value.toFixed(3)).join(';')}\n`;
    }
    yield piece;
  }
}

async function prepareOwner() {
  const owner = await User.create({ email: 'bench@example.org', passwordHash: 'none', role: 'owner' });
  const cellType = {
    maker: 'Bench',
    name: 'Bench',
    format: 'prismatic',
    nominalV: 3.2,
    status: 'listed',
  } as const;
  await CellType.create({ ...cellType, id: 'bench-280', ratedAh });
  const unknown = { madeMonth: null, startCapacityAh: null, spacingMm: null, place: null, climateBand: null };
  const unclamped = { clamping: 'none', clampForceN: null, clampTorqueNm: null } as const;
  const limits = { chargeLimitV: null, dischargeLimitV: null, bmsHighTripV: null, bmsLowTripV: null };
  const price = { priceMinor: null, priceCurrency: null, priceMonth: null };
  const layout = { cellTypeId: 'bench-280', parallel: 1, series: 16, firstUseMonth: '2023-03' };
  const bank = await Bank.create({
    ...{ ...unknown, ...unclamped, ...limits, ...price, ...layout },
    name: 'Bench',
    ownerId: owner.id,
    pseudonym: 'CDFGH',
    bought: 'new',
    sources: {},
  });
  return { ownerId: owner.id, bankId: bank.id };
}

/** Asks for the list of banks over and over; returns how long each answer took. */
async function askMeanwhile(url: string, headers: Record<string, string>, isOver: () => boolean) {
  const answersMs: number[] = [];
  while (!isOver()) {
    const began = performance.now();
    const answer = await fetch(`${url}/api/banks`, { headers });
    await answer.json();
    answersMs.push(performance.now() - began);
    await new Promise((resolve) => setTimeout(resolve, 20));
  }
  return answersMs.sort((one, other) => one - other);
}

function describe(name: string, answersMs: number[]) {
  const at = (share: number) => (answersMs[Math.floor(share * (answersMs.length - 1))] ?? NaN).toFixed(0);
  console.log(
    `${name}: ${answersMs.length} other answers, median ${at(0.5)} ms, 99 % ${at(0.99)} ms, longest ${at(1)} ms`,
  );
}

async function main() {
  const dataDir = mkdtempSync(join(tmpdir(), 'ebbline-bench-'));
  const file = join(dataDir, 'log.csv');
  await pipeline(Readable.from(logPieces()), createWriteStream(file));
  console.log(`log: ${rows} rows, ${mb(statSync(file).size)}`);
  const settings = { EBBLINE_DATA_DIR: dataDir, PORT: '0', HOST: '127.0.0.1', EBBLINE_RATE_LIMITS: 'off' };
  const config = readConfig({ ...process.env, ...settings, EBBLINE_LOG_LEVEL: 'warn' });
  const { url, stop } = await start(config);
  const { ownerId, bankId } = await prepareOwner();
  const token = signAccessToken(config, { role: 'owner', userId: ownerId, familyId: randomUUID() });
  const session = await fetch(`${url}/api/account/session`, {
    headers: { cookie: `${accessCookie}=${token}` },
  });
  const { csrfToken } = (await session.json()) as { csrfToken: string };
  const cookies = session.headers.getSetCookie().map((cookie) => cookie.split(';')[0]);
  const headers = { cookie: [`${accessCookie}=${token}`, ...cookies].join('; '), 'x-csrf-token': csrfToken };

  let isSent = false;
  const duringUpload = askMeanwhile(url, headers, () => isSent);
  const form = new FormData();
  form.append('file', await openAsBlob(file), 'log.csv');
  const sendingBegan = performance.now();
  const answer = await fetch(`${url}/api/banks/${bankId}/logs`, { method: 'POST', headers, body: form });
  let upload = (await answer.json()) as Upload;
  isSent = true;
  console.log(
    `sent and acknowledged (${answer.status}) in ${((performance.now() - sendingBegan) / 1000).toFixed(1)} s`,
  );
  describe('while sending', await duringUpload);

  const rssBefore = process.memoryUsage().rss;
  const cpuBefore = process.cpuUsage();
  const began = performance.now();
  let rssMost = rssBefore;
  const watch = setInterval(() => (rssMost = Math.max(rssMost, process.memoryUsage().rss)), 20);
  const meanwhile = askMeanwhile(
    url,
    headers,
    () => upload.state !== 'received' && upload.state !== 'working',
  );
  const progress: number[] = [];
  while (upload.state === 'received' || upload.state === 'working') {
    await new Promise((resolve) => setTimeout(resolve, 100));
    upload = (await (await fetch(`${url}/api/uploads/${upload.id}`, { headers })).json()) as Upload;
    progress.push(upload.progressFraction);
  }
  clearInterval(watch);
  const cpu = process.cpuUsage(cpuBefore);
  console.log(
    `read: ${upload.state}, ${upload.result?.rowsRead} rows, ${upload.result?.capacityAh.toFixed(2)} Ah, ` +
      `${((performance.now() - began) / 1000).toFixed(1)} s, CPU ${((cpu.user + cpu.system) / 1e6).toFixed(1)} s ` +
      `(this program's requests included), memory +${mb(rssMost - rssBefore)}`,
  );
  console.log(`progress seen: ${[...new Set(progress.map((fraction) => fraction.toFixed(2)))].join(' ')}`);
  describe('while reading', await meanwhile);
  if (upload.problem) console.log(upload.problem);
  await stop();
  rmSync(dataDir, { recursive: true, force: true });
}

main().catch((error: unknown) => {
  console.error(error);
  process.exitCode = 1;
});
