import { readdirSync } from 'node:fs';
import { join } from 'node:path';

import { Upload } from '@/server/db/models';
import { dailyTick, scheduleDailyTick } from '@/server/reminders/dailyTick';
import { abandonedAfterDays } from '@/server/uploads/sweepAbandoned';

import { checkInput, createBankOf, createCellType } from '../support/bankFixtures';
import { dischargeLog } from '../support/dischargeLog';
import { drawPicture } from '../support/pictures';
import { startTestServer, type TestClient, type TestServer } from '../support/testServer';

let server: TestServer;
let owner: TestClient;
let bankId: string;

beforeAll(async () => {
  server = await startTestServer();
  await createCellType();
  owner = await server.client('owner');
  bankId = await createBankOf(owner);
});
afterAll(() => server.stop());

const files = () => readdirSync(join(server.deps.config.uploadsDir, 'files'));

async function sendLog(): Promise<string> {
  const path = `/api/banks/${bankId}/logs`;
  const answer = await owner.send('post', path).attach('file', Buffer.from(dischargeLog().text), 'log.csv');
  await server.deps.jobs.settle();
  return answer.body.id;
}

async function sendPhoto(seed: number): Promise<string> {
  const picture = await drawPicture(320, 240, seed).jpeg().toBuffer();
  const path = `/api/banks/${bankId}/photos`;
  return (await owner.send('post', path).attach('file', picture, 'meter.jpg')).body.id;
}

it('removes logs and photos no check was sent in with, and their files, once they are old; the rest stays', async () => {
  const [log, lostLog] = [await sendLog(), await sendLog()];
  const [photo, lostPhoto] = [await sendPhoto(1), await sendPhoto(2)];
  const fields = checkInput({ uploadId: log, photoId: photo });
  expect((await owner.send('post', `/api/banks/${bankId}/checks`, fields)).status).toBe(201);
  // A log is one file, a photo two.
  expect(files()).toHaveLength(6);
  await Upload.update({ updatedAt: new Date('2026-12-01T12:00:00Z') }, { where: {}, silent: true });

  const pass = async (days: number) => {
    server.setNow(new Date(Date.parse('2026-12-01T12:00:00Z') + days * 86_400_000).toISOString());
    await scheduleDailyTick(server.deps);
    await dailyTick(server.deps)({});
    await server.deps.jobs.settle();
  };
  await pass(abandonedAfterDays - 1);
  expect(await Upload.count()).toBe(4);
  await pass(abandonedAfterDays + 1);
  expect((await Upload.findAll()).map(({ id }) => id).sort()).toEqual([log, photo].sort());
  expect(files()).toHaveLength(3);
  expect((await owner.get(`/api/uploads/${lostLog}`)).status).toBe(404);
  expect((await owner.get(`/api/photos/${lostPhoto}`)).status).toBe(404);
  expect((await owner.get(`/api/photos/${photo}`)).status).toBe(200);
}, 60_000);
