import { randomUUID } from 'node:crypto';

import { consent } from '@/lib/contract/consent';
import type { EarlierReport } from '@/lib/contract/earlierChecks';
import { submissionEffectSchema, submissionSchema } from '@/lib/contract/moderation';
import type { LogResult } from '@/lib/contract/uploads';
import { fitPool, lifeAt } from '@/lib/fit';
import { Check, Finding, Upload } from '@/server/db/models';
import { requestRefit } from '@/server/fits/requestRefit';
import { approvedRows } from '@/server/pool/approvedRows';

import { earlierFile, type RowChange } from '../support/earlierFile';
import { bankInput, checkInput, createBankOf, createCellType } from '../support/bankFixtures';
import { addBank, addCellType, addCheck, addOwner, addOwnerWithChecks } from '../support/poolFixture';
import { startTestServer, type TestClient, type TestServer } from '../support/testServer';
import { screenContext } from './screenContext';
import { addSubmission } from './support';

jest.setTimeout(60_000);

let server: TestServer;
let moderator: TestClient;
beforeEach(async () => {
  server = await startTestServer();
  moderator = await server.client('moderator');
});
afterEach(() => server.stop());

/** The standard use: 60 % deep, once a day, at 0.1 It and 25 °C, half full on average, not clamped. */
const use = {
  ...{ depthFraction: 0.6, dischargeIt: 0.1, temperatureC: 25, socMeanFraction: 0.5, isClamped: false },
  efcPerYear: 0.6 * 365.2425,
};
const findingOf = (checkId: string, rule: string) => Finding.findOne({ where: { checkId, rule } });
const severityOf = async (checkId: string, rule: string) => (await findingOf(checkId, rule))?.severity;

async function submit(client: TestClient, bankId: string, overrides: Parameters<typeof checkInput>[0] = {}) {
  const answer = await client.send('post', `/api/banks/${bankId}/checks`, checkInput(overrides));
  if (answer.status !== 201) throw new Error(JSON.stringify(answer.body));
  return answer.body.id as string;
}

/** Looks at a file of earlier checks and sends it whole, as the page does. */
async function sendEarlier(client: TestClient, bankId: string, rows: RowChange[]) {
  const post = (path: string, fields: Record<string, string>) => {
    const request = client.send('post', path);
    for (const [name, value] of Object.entries(fields)) request.field(name, value);
    return request.attach('file', Buffer.from(earlierFile(rows)), 'checks.csv');
  };
  const { digest } = (await post('/api/earlier-checks/preview', { bankId })).body as EarlierReport;
  const fields = { bankId, digest, choice: 'allOrNothing', consent: String(consent.version) };
  const report = (await post('/api/earlier-checks', fields)).body as EarlierReport;
  return report.rows;
}

async function refit() {
  await server.deps.db.transaction((transaction) => requestRefit(server.deps, transaction));
  await server.deps.jobs.settle();
}

describe('the pool', () => {
  beforeEach(async () => {
    await addCellType();
    for (let seed = 1; seed <= 12; seed += 1) await addOwnerWithChecks(seed);
  });

  it('is held against open checks after each refit, and against approved ones that lie far out', async () => {
    const [fine, low] = [
      await addSubmission({ years: 3, sohFraction: 0.95 }),
      await addSubmission({ years: 3, sohFraction: 0.7 }),
    ];
    const far = await addOwnerWithChecks(40);
    const last = far.checks.at(-1)!;
    await last.update({
      sohFraction: 0.7,
      computed: { ...last.computed, sohFraction: 0.7, capacityRefAh: 70 },
    });
    expect(await Finding.count({ where: { rule: 'poolResidual' } })).toBe(0);
    await refit();
    expect(await severityOf(fine.id, 'poolResidual')).toBe(0);
    expect(await severityOf(low.id, 'poolResidual')).toBe(2);
    expect((await low.reload()).severity).toBe(2);
    expect(await severityOf(last.id, 'poolResidual')).toBe(2);
    expect((await last.reload()).severity).toBe(2);
    // Approved checks that fit get no row of their own.
    expect(await Finding.count({ where: { rule: 'poolResidual' } })).toBe(3);
    expect((await findingOf(last.id, 'poolResidual'))?.evidence.otherChecks).toBe(3);
    // Put right, the finding goes with the next refit.
    await last.update({
      sohFraction: 0.94,
      computed: { ...last.computed, sohFraction: 0.94, capacityRefAh: 94 },
    });
    await refit();
    expect(await findingOf(last.id, 'poolResidual')).toBeNull();
    expect((await last.reload()).severity).toBe(0);
  });

  it('never lists a real failure', async () => {
    const check = await addSubmission({ state: 'approved', years: 3, sohFraction: 0.55 });
    await check.update({ isRealFailure: true });
    await refit();
    expect(await findingOf(check.id, 'poolResidual')).toBeNull();
    expect((await check.reload()).state).toBe('approved');
  });

  it('is held against a check at its submission, once there is a working fit', async () => {
    await createCellType();
    await refit();
    const owner = await server.client('owner');
    const good = await submit(owner, await createBankOf(owner));
    expect(await severityOf(good, 'poolResidual')).toBe(0);
    const reading = { capacityAh: 190, energyWh: 190 * 51.2, durationS: 12_214 };
    const bad = await submit(owner, await createBankOf(owner), { reading });
    expect(await severityOf(bad, 'poolResidual')).toBe(2);
    const used = await submit(owner, await createBankOf(owner, { bought: 'used' }));
    expect(await findingOf(used, 'poolResidual')).toBeNull();
  });

  it('shows where such banks lie, what the check would move, and its neighbours', async () => {
    const { bank } = await addOwnerWithChecks(41, { checks: 2 });
    const check = await addCheck({
      bankId: bank.id,
      years: 3,
      efc: 540,
      sohFraction: 0.925,
      state: 'submitted',
    });
    await refit();
    const answer = await moderator.get(`/api/screening/${check.id}`);
    const { expected } = submissionSchema.parse(answer.body);
    expect(expected).toHaveLength(12);
    for (const { inner, outer } of expected) {
      expect(outer[0]).toBeLessThan(inner[0]);
      expect(inner[0]).toBeLessThan(inner[1]);
      expect(inner[1]).toBeLessThan(outer[1]);
    }
    expect(expected.at(-1)!.years).toBeCloseTo(3.5, 6);
    const medians = expected.map(({ inner }) => (inner[0] + inner[1]) / 2);
    expect(medians.at(-1)!).toBeLessThan(medians[0]!);

    const effect = submissionEffectSchema.parse(
      (await moderator.get(`/api/screening/${check.id}/effect`).expect(200)).body,
    );
    expect(effect).toMatchObject({ absence: null, isSetAside: false });
    // Thirteen banks of one cell type; the bank is among them through its earlier checks.
    expect(effect.without).toMatchObject({ basis: 'cellType', banks: 13, checks: 50 });
    expect(effect.with).toMatchObject({ basis: 'cellType', banks: 13, checks: 51 });
    // The same by fits of the pool as it is, and as it is once the check is approved.
    const lifeNow = async () => {
      const rows = await server.deps.db.transaction((transaction) => approvedRows(transaction));
      const fit = fitPool(rows, { isWithoutInteractions: true });
      if (!fit.ok) throw new Error(fit.reason);
      return lifeAt(fit, use, { cellType: 'skerry-100' }).years.estimate;
    };
    const [without, with_] = [effect.without!.years.estimate, effect.with!.years.estimate];
    expect(without / (await lifeNow())).toBeCloseTo(1, 4);
    await check.update({ state: 'approved' });
    expect(with_ / (await lifeNow())).toBeCloseTo(1, 4);
    expect(with_ / without).not.toBeCloseTo(1, 3);
    expect(effect.neighbours).toHaveLength(8);
    expect(Math.abs(effect.neighbours[0]!.ageYears - 3)).toBeLessThanOrEqual(1);
    for (const secret of [bank.id, bank.ownerId, bank.name])
      expect(JSON.stringify(effect)).not.toContain(secret);
  });

  it('says when the fit itself would set the check aside, so that it moves nothing', async () => {
    const { bank } = await addOwnerWithChecks(41, { checks: 2 });
    const check = await addCheck({
      bankId: bank.id,
      years: 3,
      efc: 540,
      sohFraction: 0.8,
      state: 'submitted',
    });
    await refit();
    const effect = submissionEffectSchema.parse(
      (await moderator.get(`/api/screening/${check.id}/effect`)).body,
    );
    expect(effect.isSetAside).toBe(true);
    expect(effect.with!.years.estimate).toBeCloseTo(effect.without!.years.estimate, 3);
  });

  it('tells no effect of a used bank, nor of what is not there', async () => {
    const used = await addSubmission({ bought: 'used' });
    const answer = await moderator.get(`/api/screening/${used.id}/effect`).expect(200);
    expect(answer.body).toMatchObject({ absence: 'notOfThePool', without: null, neighbours: [] });
    await moderator.get(`/api/screening/${randomUUID()}/effect`).expect(404);
    const draft = await addSubmission({ state: 'draft' });
    await moderator.get(`/api/screening/${draft.id}/effect`).expect(404);
  });
});

describe('logs', () => {
  const points = 400;
  /** A discharge of a single bank, with the noise of its day. */
  function logOf({ noise = 0, room = 22, scale = 1 }): LogResult {
    const time = Array.from({ length: points }, (_, i) => i * 40);
    const jitter = (i: number, seed: number) => 0.0004 * Math.sin((i + 1) * (12.9898 + seed + noise));
    return {
      ...screenContext({ log: {} }).log!,
      ...{ durationS: 15_960, windowStartS: 0, windowEndS: 15_960, capacityAh: 264 },
      series: {
        timeS: time,
        voltageV: time.map((t, i) => (52.4 - t / 16_000 + jitter(i, 0)) * (1 + jitter(i, 1))),
        currentA: time.map((_t, i) => 56 * scale * (1 + 5 * jitter(i, 2))),
        temperatureC: time.map((t) => room + t / 8000),
      },
    };
  }
  async function submitWithLog(result: LogResult) {
    const owner = await server.client('owner');
    const bankId = await createBankOf(owner);
    const upload = await Upload.create({
      ...{ ownerId: owner.userId!, bankId, kind: 'log', filename: 'log.csv', storageKey: randomUUID() },
      ...{ sha256: randomUUID().replaceAll('-', '').padEnd(64, '0'), bytes: 9, state: 'ready', result },
    });
    return submit(owner, bankId, { uploadId: upload.id });
  }
  beforeEach(() => createCellType());

  it('of a curve that another account sent before are doubtful, scaled ones too', async () => {
    const first = await submitWithLog(logOf({}));
    expect(await findingOf(first, 'sameCurve')).toBeNull();
    expect(await severityOf(await submitWithLog(logOf({ scale: 1.07 })), 'sameCurve')).toBe(2);
  });

  it('of another day are not', async () => {
    await submitWithLog(logOf({}));
    expect(await severityOf(await submitWithLog(logOf({ noise: 3, room: 23 })), 'sameCurve')).toBe(0);
  });
});

describe('photos', () => {
  async function submitWithPhoto(sha256: string, perceptualHash: string) {
    const owner = await server.client('owner');
    const bankId = await createBankOf(owner);
    const photo = await Upload.create({
      ...{ ownerId: owner.userId!, bankId, kind: 'photo', filename: 'photo.webp', storageKey: randomUUID() },
      ...{ thumbKey: randomUUID(), width: 40, height: 30, bytes: 9, state: 'ready' },
      ...{ sha256: sha256.repeat(64), perceptualHash },
    });
    return submit(owner, bankId, { photoId: photo.id });
  }
  beforeEach(() => createCellType());

  it('of the same content, or that look the same, are found behind another account’s check', async () => {
    const first = await submitWithPhoto('a', 'f0f0f0f0f0f0f0f0');
    expect(await severityOf(first, 'samePhoto')).toBe(0);
    expect(await severityOf(await submitWithPhoto('a', '0123456789abcdef'), 'samePhoto')).toBe(2);
    // One bit, four bits, and nothing in common with those before.
    expect(await severityOf(await submitWithPhoto('b', 'f0f0f0f0f0f0f0f1'), 'samePhoto')).toBe(2);
    expect(await severityOf(await submitWithPhoto('c', 'f0f0f0f0f0f00ff0'), 'samePhoto')).toBe(0);
    expect(await severityOf(await submitWithPhoto('d', 'f0f0f0f0f0f0f00f'), 'samePhoto')).toBe(0);
    expect(await severityOf(await submitWithPhoto('e', 'f0f0f0f0f0f0ff00'), 'samePhoto')).toBe(0);
    expect(await severityOf(await submitWithPhoto('f', 'f0f0f0f0f0f0f07f'), 'samePhoto')).toBe(1);
  });
});

describe('accounts', () => {
  beforeEach(() => createCellType());

  it('that send many checks within the hour are worth a look, and an hour later no more', async () => {
    const owner = await server.client('owner');
    const bankId = await createBankOf(owner, { firstUseMonth: '2010-01' });
    const send = (day: number, capacityAh: number) =>
      submit(owner, bankId, {
        reading: {
          testedOn: `2012-03-${String(day).padStart(2, '0')}`,
          capacityAh,
          energyWh: capacityAh * 51.2,
        },
      });
    let last = '';
    for (let day = 1; day <= 13; day += 1) last = await send(day, 264 + day / 10);
    expect(await severityOf(last, 'burst')).toBe(1);
    expect((await findingOf(last, 'burst'))?.evidence).toEqual({ submittedInHour: 13 });
    server.setNow('2026-12-01T13:00:01Z');
    expect(await severityOf(await send(14, 265.4), 'burst')).toBe(0);
  });

  it('that send many checks in one file send once', async () => {
    const owner = await server.client('owner');
    const bankId = await createBankOf(owner, { firstUseMonth: '2010-01' });
    const rows = Array.from({ length: 14 }, (_, year) => ({
      tested_on: `${2011 + year}-03-01`,
      counter_efc: String(100 + 50 * year),
    }));
    const sent = await sendEarlier(owner, bankId, rows);
    expect(sent.filter(({ outcome }) => outcome === 'good')).toHaveLength(rows.length);
    for (const { checkId } of sent)
      expect((await findingOf(checkId!, 'burst'))?.evidence).toEqual({ submittedInHour: 1 });
    const reading = { testedOn: '2026-03-01' };
    const typed = await submit(owner, bankId, { reading, conditions: { counterValue: 800 } });
    expect((await findingOf(typed, 'burst'))?.evidence).toEqual({ submittedInHour: 2 });
    const moderator = await server.client('moderator');
    const isFromFile = async (id: string) => (await moderator.get(`/api/screening/${id}`)).body.isFromFile;
    expect(await isFromFile(sent[0]!.checkId!)).toBe(true);
    expect(await isFromFile(typed)).toBe(false);
  });

  it('whose banks are alike in everything within days are worth a look, weeks apart not', async () => {
    const limits = { chargeLimitV: 3.55, dischargeLimitV: 2.6, bmsHighTripV: 3.65, bmsLowTripV: 2.5 };
    const [one, two] = [await server.client('owner'), await server.client('owner')];
    const first = await submit(one, await createBankOf(one, limits));
    expect(await severityOf(first, 'alikeAccounts')).toBe(0);
    // The same owner's second bank is no other account.
    expect(await severityOf(await submit(one, await createBankOf(one, limits)), 'alikeAccounts')).toBe(0);
    expect(await severityOf(await submit(two, await createBankOf(two, limits)), 'alikeAccounts')).toBe(1);
    const other = await submit(two, await createBankOf(two, { ...limits, chargeLimitV: 3.5 }));
    expect(await severityOf(other, 'alikeAccounts')).toBe(0);
    server.setNow('2026-12-04T12:00:01Z');
    const three = await server.client('owner');
    expect(await severityOf(await submit(three, await createBankOf(three, limits)), 'alikeAccounts')).toBe(0);
  });
});

it('moderators read no address, number or place that an owner typed', async () => {
  await createCellType();
  const owner = await server.client('owner');
  const answer = await owner.send('post', '/api/banks', bankInput({ name: 'Anna’s boathouse' }));
  const bankId = answer.body.id as string;
  const event = { happenedOn: '2025-05-04', kind: 'rebalanced', note: 'Ask bob@example.org about it.' };
  await owner.send('post', `/api/banks/${bankId}/events`, event).expect(201);
  const checkId = await submit(owner, bankId, {
    note: 'Call +44 20 7946 0958 or come to 12 Harbour View Road.',
    reading: { instrument: 'Meter of anna@example.org' },
  });
  const { text, body } = await moderator.get(`/api/screening/${checkId}`).expect(200);
  for (const secret of ['anna@', 'bob@', '7946', 'Harbour', 'boathouse', bankId, owner.userId!, owner.email!])
    expect(text).not.toContain(secret);
  expect(body.fields.note).toBe('Call [phone number hidden] or come to [street address hidden].');
  expect(await severityOf(checkId, 'personalText')).toBe(1);
  expect((await Check.findByPk(checkId))?.note).toMatch(/7946/);
});

it('knows of every response that moderators get: none names an owner', async () => {
  await addCellType();
  const owner = await addOwner();
  const bank = await addBank({ ownerId: owner.id });
  const check = await addCheck({ bankId: bank.id, years: 6, efc: 900, sohFraction: 0.9, state: 'submitted' });
  const post = (path: string, body?: object) => moderator.send('post', `/api/screening/${path}`, body);
  const answers = [
    await moderator.get('/api/screening'),
    await moderator.get(`/api/screening/${check.id}`),
    await moderator.get(`/api/screening/${check.id}/effect`),
    await post(`${check.id}/claim`),
    await post(`${check.id}/release`),
    await post('approve-clean', { checks: [{ checkId: check.id, version: 1 }] }),
    await post(`${check.id}/decision`, { action: 'recall', version: 2, reason: 'x' }),
  ];
  for (const { status, text } of answers) {
    expect(status).toBe(200);
    for (const secret of [owner.id, owner.email, bank.id, bank.name]) expect(text).not.toContain(secret);
  }
});
