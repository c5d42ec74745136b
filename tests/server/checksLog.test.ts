import { Check, TrailEntry, Upload } from '@/server/db/models';

import { checkInput, createBankOf, createCellType } from '../support/bankFixtures';
import { dischargeLog } from '../support/dischargeLog';
import { startTestServer, type TestClient, type TestServer } from '../support/testServer';

let server: TestServer;
let owner: TestClient;
let bankId: string;

beforeAll(async () => {
  server = await startTestServer();
  await createCellType();
  owner = await server.client('owner');
});

beforeEach(async () => {
  bankId = await createBankOf(owner);
});

afterAll(() => server.stop());

async function uploadLog(client = owner, bank = bankId): Promise<Upload> {
  const path = `/api/banks/${bank}/logs`;
  const { body } = await client
    .send('post', path)
    .attach('file', Buffer.from(dischargeLog().text), 'log.csv');
  await server.deps.jobs.settle();
  return (await Upload.findByPk(body.id as string))!;
}

/** A check whose reading is the log's, rounded as a form would. */
function checkOf({ id, result }: Upload, reading: Parameters<typeof checkInput>[0] = {}) {
  const { capacityAh, energyWh, meanCurrentA, durationS } = result!;
  return checkInput({
    uploadId: id,
    ...reading,
    reading: {
      capacityAh: Number(capacityAh.toFixed(1)),
      energyWh: Number(energyWh!.toFixed(0)),
      meanCurrentA: Number(meanCurrentA.toFixed(1)),
      durationS: Math.round(durationS),
      ...reading.reading,
    },
  });
}

const submit = (request: object, client = owner, bank = bankId) =>
  client.send('post', `/api/banks/${bank}/checks`, request);

it('takes readings that agree with the log for metered, whatever was said', async () => {
  const upload = await uploadLog();
  const { status, body } = await submit(checkOf(upload, { sources: { capacityAh: 'estimated' } }));
  expect(status).toBe(201);
  expect(body.uploadId).toBe(upload.id);
  expect(body.sources).toMatchObject({ capacityAh: 'metered', energyWh: 'metered', meanCurrentA: 'metered' });
  const entry = await TrailEntry.findOne({ where: { subjectId: body.id } });
  expect(entry?.details.edited).toEqual([]);
});

it('does not take a reading that differs from the log for metered, and notes both figures', async () => {
  const upload = await uploadLog();
  const request = checkOf(upload, { sources: { capacityAh: 'metered' }, reading: { capacityAh: 280 } });
  const { body } = await submit(request);
  expect(body.sources).toMatchObject({ capacityAh: 'readOff', energyWh: 'metered' });
  const entry = await TrailEntry.findOne({ where: { subjectId: body.id } });
  expect(entry?.details.edited).toEqual([
    { field: 'capacityAh', logged: upload.result!.capacityAh, entered: 280 },
  ]);
});

it('leaves an estimate that differs from the log an estimate', async () => {
  const upload = await uploadLog();
  const request = checkOf(upload, { sources: { energyWh: 'estimated' }, reading: { energyWh: 12000 } });
  expect((await submit(request)).body.sources.energyWh).toBe('estimated');
});

it('takes the mean temperature over the discharge from the log, not from its ends', async () => {
  const upload = await uploadLog();
  const result = { ...upload.result!, meanTemperatureC: 20 };
  await Upload.update({ result }, { where: { id: upload.id } });
  const { body } = await submit(checkOf(upload));
  expect(body.computed.meanTemperatureC).toBe(20);
  // Calculation 2 below 25 °C, at 0.2 It or close to it: 1 / (1 - 0.004 x 5), and (I / 0.2)^0.01.
  const atReference = (body.reading.capacityAh / 0.98) * (body.computed.meanIt / 0.2) ** 0.01;
  expect(body.computed.capacityRefAh).toBeCloseTo(atReference, 9);
});

it('refuses a log of another bank, of another owner, or that is not read', async () => {
  const elsewhere = await uploadLog(owner, await createBankOf(owner));
  const other = await server.client('owner');
  const others = await uploadLog(other, await createBankOf(other));
  const unread = await uploadLog();
  await Upload.update({ state: 'working' }, { where: { id: unread.id } });
  for (const upload of [elsewhere, others, unread]) {
    const { status, body } = await submit(checkOf(upload));
    expect(status).toBe(422);
    expect(body.error.fields).toHaveProperty('uploadId');
  }
  expect(await Check.count({ where: { bankId } })).toBe(0);
});

it('finds a log that stands behind a check elsewhere, without telling whose', async () => {
  const other = await server.client('owner');
  const otherBank = await createBankOf(other);
  const first = await submit(checkOf(await uploadLog(other, otherBank)), other, otherBank);
  const second = await submit(checkOf(await uploadLog()));
  const worst = await Check.findByPk(second.body.id as string);
  expect(worst!.severity).toBeGreaterThanOrEqual(2);
  expect(JSON.stringify(second.body)).not.toContain(first.body.id);
  expect(JSON.stringify(second.body)).not.toContain(otherBank);
});

it('refuses to read a log anew that a check stands on, until the check is withdrawn', async () => {
  const upload = await uploadLog();
  const { body } = await submit(checkOf(upload));
  const { mapping } = upload.recognised!;
  const remap = () => owner.send('put', `/api/uploads/${upload.id}/mapping`, { mapping });
  expect((await remap()).body.error.code).toBe('conflict');
  await owner.send('post', `/api/checks/${body.id}/withdraw`, { version: 1 });
  expect((await remap()).status).toBe(200);
});
