import { standingSchema, whatIfAnswerSchema } from '@/lib/contract/standing';
import { BankEvent, Check, PublicMember } from '@/server/db/models';
import { requestRefit } from '@/server/fits/requestRefit';
import { toldCount } from '@/server/standing/contribution';

import { addBank, addCellType, addCheck, addOwnerWithChecks } from '../support/poolFixture';
import { startTestServer, type TestClient, type TestServer } from '../support/testServer';

// A refit starts a worker thread of its own.
jest.setTimeout(120_000);

let server: TestServer;
let owner: TestClient;
let other: TestClient;
let visitor: TestClient;

beforeAll(async () => {
  server = await startTestServer();
  await addCellType();
  await addCellType({ id: 'rare-100' });
  for (let seed = 1; seed <= 14; seed += 1) await addOwnerWithChecks(seed);
  await server.deps.db.transaction((transaction) => requestRefit(server.deps, transaction));
  await server.deps.jobs.settle();
  owner = await server.client('owner');
  other = await server.client('owner');
  visitor = await server.client();
});
afterAll(() => server.stop());

const ofOwner = (options: Parameters<typeof addOwnerWithChecks>[1] = {}) =>
  addOwnerWithChecks(30, { ownerId: owner.userId!, ...options });
const standing = async (bankId: string) => {
  const { status, body } = await owner.get(`/api/banks/${bankId}/standing`);
  expect(status).toBe(200);
  return standingSchema.parse(body);
};
const whatIf = (bankId: string, query: string, client = owner) =>
  client.get(`/api/banks/${bankId}/what-if?${query}`);

describe('GET /api/banks/:bankId/standing', () => {
  it('places a bank of four checks on the bands of its cell type, with a forecast', async () => {
    const { bank, checks } = await ofOwner();
    const answer = await standing(bank.id);
    expect(answer).toMatchObject({ state: 'ready', basis: 'cellType', checksUsed: 4, notes: [] });
    expect(answer.use).toMatchObject({ depthFraction: 0.6, dischargeIt: 0.1, isClamped: false });
    for (const { quantiles } of answer.bands) expect([...quantiles].sort((a, b) => a - b)).toEqual(quantiles);
    const { fasterFraction } = answer.pace!;
    expect(fasterFraction.lower).toBeLessThan(fasterFraction.estimate);
    expect(fasterFraction.upper).toBeGreaterThan(fasterFraction.estimate);
    const { years, inYear } = answer.forecast!;
    expect(years.estimate).toBeGreaterThan(checks.length);
    // First use in June 2020: the middle of that month and so many years.
    expect(inYear.estimate).toBe(Math.floor(2020 + 5.5 / 12 + years.estimate));
  });

  it('says faster of a bank that fades faster than the rest', async () => {
    const bank = await addBank({ ownerId: owner.userId! });
    for (const years of [1, 2, 3, 4, 5])
      await addCheck({ bankId: bank.id, years, efc: 200 * years, sohFraction: 1 - 0.055 * years ** 0.8 });
    const quick = await standing(bank.id);
    expect(quick.pace!.fasterFraction.upper).toBeLessThan(0.4);
    expect(quick.pace!.ratio.lower).toBeGreaterThan(1);
    const { bank: usual } = await ofOwner();
    expect(quick.forecast!.years.estimate).toBeLessThan((await standing(usual.id)).forecast!.years.estimate);
  });

  it('has little to say after one check: a wide range', async () => {
    const bank = await addBank({ ownerId: owner.userId! });
    await addCheck({ bankId: bank.id, years: 1, efc: 200, sohFraction: 0.97 });
    const { pace, checksUsed } = await standing(bank.id);
    expect(checksUsed).toBe(1);
    expect(pace!.fasterFraction.upper - pace!.fasterFraction.lower).toBeGreaterThan(0.6);
  });

  it('has nothing to place without an approved check', async () => {
    const bank = await addBank({ ownerId: owner.userId! });
    await addCheck({ bankId: bank.id, years: 1, efc: 200, sohFraction: 0.97, state: 'submitted' });
    expect(await standing(bank.id)).toMatchObject({
      state: 'noCheck',
      pace: null,
      forecast: null,
      bands: [],
    });
  });

  it('compares a cell type of too few banks with all of them, and says so', async () => {
    const { bank } = await ofOwner({ cellTypeId: 'rare-100' });
    const answer = await standing(bank.id);
    expect(answer).toMatchObject({ state: 'ready', basis: 'pool' });
    expect(answer.contribution.cellType).toBeNull();
  });

  it('names the condition that the pool does not reach, with the nearest it does', async () => {
    const { bank } = await ofOwner({ conditions: { temperatureMeanC: 45 } });
    const answer = await standing(bank.id);
    expect(answer).toMatchObject({ state: 'outside', bands: [], forecast: null });
    expect(answer.outside[0]).toMatchObject({ condition: 'temperatureC', nearest: expect.closeTo(22, 3) });
  });

  it('says that a bank bought used is left out of pooled lives, and compares it all the same', async () => {
    const { bank } = await ofOwner({ bought: 'used' });
    expect(await standing(bank.id)).toMatchObject({ state: 'ready', notes: ['boughtUsed'] });
  });

  it('notes a clamping that changed more than once', async () => {
    const { bank } = await ofOwner();
    for (const happenedOn of ['2021-02-01', '2022-02-01'])
      await BankEvent.create({ bankId: bank.id, happenedOn, kind: 'clampingChanged', note: '' });
    expect((await standing(bank.id)).notes).toEqual(['clampingUnclear']);
  });

  it("counts what was published of the bank's own checks, and of the cell type only what is public", async () => {
    const known = await Check.findOne({
      where: { state: 'approved' },
      include: ['bank'],
      rejectOnEmpty: true,
    });
    expect(await PublicMember.count()).toBe(56);
    await known.bank!.update({ ownerId: owner.userId! });
    const { contribution } = await standing(known.bankId);
    expect(contribution).toEqual({
      ...{ approved: 4, published: 4 },
      cellType: { checks: { from: 56, to: 56 }, banks: { from: 10, to: 19 } },
    });
  });

  it('is hidden from others, and asks for a sign-in', async () => {
    const { bank } = await ofOwner();
    expect((await other.get(`/api/banks/${bank.id}/standing`)).status).toBe(404);
    expect((await visitor.get(`/api/banks/${bank.id}/standing`)).status).toBe(401);
    expect((await owner.get('/api/banks/6f9619ff-8b86-4011-b42d-00c04fc964ff/standing')).status).toBe(404);
  });
});

describe('GET /api/banks/:bankId/what-if', () => {
  let bankId: string;
  beforeAll(async () => (bankId = (await ofOwner()).bank.id));

  const varied = async (query: string) => {
    const { status, body } = await whatIf(bankId, query);
    expect(status).toBe(200);
    return whatIfAnswerSchema.parse(body);
  };

  it('answers nothing for no change', async () => {
    expect(await varied('')).toEqual({ effects: [], together: null, outside: [] });
    expect((await varied('depthFraction=0.6')).effects).toEqual([]);
  });

  it('says where the pool does not reach, with no figure', async () => {
    const answer = await varied('temperatureC=40');
    expect(answer).toMatchObject({ effects: [], together: null });
    expect(answer.outside.map(({ condition }) => condition)).toEqual(['temperatureC']);
  });

  it('gives no figure for clamping where nobody clamps', async () => {
    expect((await varied('isClamped=true')).outside).toMatchObject([{ condition: 'isClamped' }]);
  });

  it('refuses values without physical sense', async () => {
    const { status, body } = await whatIf(bankId, 'depthFraction=4');
    expect(status).toBe(422);
    expect(body.error.fields).toHaveProperty('depthFraction');
  });

  it('tells of a conflict while there is nothing to start from', async () => {
    const bank = await addBank({ ownerId: owner.userId! });
    expect((await whatIf(bank.id, 'temperatureC=20')).status).toBe(409);
  });

  it('is hidden from others', async () => {
    expect((await whatIf(bankId, '', other)).status).toBe(404);
    expect((await whatIf(bankId, '', visitor)).status).toBe(401);
  });
});

describe('toldCount', () => {
  it.each([
    [5, 5, 9],
    [9, 5, 9],
    [10, 10, 19],
    [19, 10, 19],
    [20, 20, 20],
    [142, 142, 142],
  ])('%i is told as %i to %i', (count, from, to) => {
    expect(toldCount(count)).toEqual({ from, to });
  });
});
