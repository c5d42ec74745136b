import { Job } from '@/server/db/models';
import { JobRunner } from '@/server/jobs/JobRunner';

import { startTestServer, type TestServer } from '../support/testServer';

let server: TestServer;
let runner: JobRunner;

beforeEach(async () => {
  server = await startTestServer();
  runner = new JobRunner(server.deps.db, server.deps.logger, server.deps.clock);
});
afterEach(async () => {
  await runner.stop();
  await server.stop();
});

const enqueue = (kind: string, dedupeKey?: string) =>
  server.deps.db.transaction((transaction) => runner.enqueue({ kind, dedupeKey }, transaction));

it('runs a burst of one key once', async () => {
  const seen: string[] = [];
  for (let count = 0; count < 5; count += 1) await enqueue('burst', 'burst');
  runner.handle('burst', async () => void seen.push('ran'));
  await runner.settle();
  expect(seen).toEqual(['ran']);
});

it('runs again what is asked for while the first run is under way', async () => {
  let runs = 0;
  runner.handle('burst', async () => {
    runs += 1;
    if (runs === 1) await enqueue('burst', 'burst');
  });
  await enqueue('burst', 'burst');
  await runner.settle();
  expect(runs).toBe(2);
});

it('lets a short kind finish while a long one is still running', async () => {
  let endLong = () => {};
  const order: string[] = [];
  runner.handle('long', async () => {
    await new Promise<void>((resolve) => (endLong = resolve));
    order.push('long');
  });
  runner.handle('short', async () => {
    order.push('short');
    endLong();
  });
  await enqueue('long');
  await enqueue('short');
  await runner.settle();
  expect(order).toEqual(['short', 'long']);
});

it('tries a failed job again later, and gives up after the fifth time with the reason kept', async () => {
  let runs = 0;
  runner.handle('broken', async () => {
    runs += 1;
    throw new Error('no such luck');
  });
  await enqueue('broken');
  for (let hour = 13; hour < 20; hour += 1) {
    await runner.settle();
    server.setNow(`2026-12-01T${hour}:00:00Z`);
  }
  expect(runs).toBe(5);
  expect(await Job.findOne({ where: { kind: 'broken' } })).toMatchObject({
    state: 'failed',
    error: 'no such luck',
  });
});

it('runs after a restart what was running when the process died', async () => {
  await Job.create({
    kind: 'cut',
    payload: { n: 1 },
    dedupeKey: null,
    state: 'running',
    runAfter: server.deps.clock(),
  });
  const seen: unknown[] = [];
  runner.handle('cut', async (payload) => void seen.push(payload));
  await runner.start();
  await runner.settle();
  expect(seen).toEqual([{ n: 1 }]);
});
