import { cellListSchema, cellPageSchema } from '@/lib/contract/cells';
import { Check, QuotedClaim } from '@/server/db/models';
import { requestRefit } from '@/server/fits/requestRefit';

import { addCellType, addOwnerWithChecks } from '../support/poolFixture';
import { startTestServer, type TestClient, type TestServer } from '../support/testServer';

jest.setTimeout(30_000);

let server: TestServer;
let visitor: TestClient;
beforeEach(async () => {
  server = await startTestServer();
  visitor = await server.client();
  await addCellType();
});
afterEach(() => server.stop());

let minutes = 0;

async function refit() {
  minutes += 1;
  server.setNow(new Date(Date.UTC(2026, 11, 1, 12, minutes)).toISOString());
  await server.deps.db.transaction((transaction) => requestRefit(server.deps, transaction));
  await server.deps.jobs.settle();
}

/** Counts below twenty are told as ranges. */
const few = { from: 5, to: 9 };
const teens = { from: 10, to: 19 };

async function addOwners(from: number, to: number, cellTypeId?: string, temperatureMeanC = 25) {
  const owners = [];
  for (let seed = from; seed <= to; seed += 1)
    owners.push(await addOwnerWithChecks(seed, { cellTypeId, conditions: { temperatureMeanC } }));
  return owners;
}

const list = async () => cellListSchema.parse((await visitor.get('/api/cells').expect(200)).body);
const page = async (query = '', id = 'skerry-100') =>
  cellPageSchema.parse((await visitor.get(`/api/cells/${id}${query}`).expect(200)).body);

describe('GET /api/cells', () => {
  it('lists cell types before anything is published, without figures', async () => {
    const { cells, pool, use } = await list();
    expect(cells).toHaveLength(1);
    expect(cells[0]).toMatchObject({ evidence: null, life: null, absence: 'noFit' });
    expect(pool).toEqual({ evidence: null, reachYears: null, fittedAt: null, waiting: 'none' });
    expect(use).toMatchObject({ depthFraction: 0.6, dischargeIt: 0.1, cyclesPerDay: 1 });
  });

  it('states a life at the standard use: years are EFC over 0.6 x 365.2425', async () => {
    await addOwners(1, 12);
    await refit();
    const life = (await list()).cells[0]!.life!;
    expect(life).toMatchObject({ basis: 'cellType', outside: [] });
    expect(life.years.estimate).toBeCloseTo(life.efc.estimate / 219.1455, 9);
    expect(life.reachYears).toBeCloseTo(life.reachEfc / 219.1455, 9);
    // The truth of the fixture: 0.2 = 0.06 (n/500)^0.8, n = 500 (0.2/0.06)^1.25 = 2252 EFC; its range must hold it.
    expect(life.efc.lower).toBeLessThan(2252);
    expect(life.efc.upper).toBeGreaterThan(2252);
    // Banks differ more than their typical one is unsure.
    expect(life.rangeOfBanks!.lower).toBeLessThan(life.years.estimate);
    expect(life.rangeOfBanksEfc!.upper).toBeCloseTo(life.rangeOfBanks!.upper * 219.1455, 6);
    for (const share of [life.priorShareFraction!, life.ownShareFraction!]) {
      expect(share).toBeGreaterThanOrEqual(0);
      expect(share).toBeLessThanOrEqual(1);
    }
    // At reach n = reachEfc: 1 - 0.06 (n/500)^0.8 within 2 points.
    const left = life.leftAtReachFraction;
    expect(Math.abs(left.estimate - (1 - 0.06 * (life.reachEfc / 500) ** 0.8))).toBeLessThan(0.02);
    expect(left.lower).toBeLessThanOrEqual(left.estimate);
    expect(left.upper).toBeGreaterThanOrEqual(left.estimate);
  });

  it('gives the figure of the pool, with its wider range, below ten banks or five owners', async () => {
    await addCellType({ id: 'few-100' });
    await addCellType({ id: 'none-100' });
    await addOwners(1, 12);
    await addOwners(21, 27, 'few-100');
    await refit();
    const { cells } = await list();
    const lifeOf = (id: string) => cells.find(({ cellType }) => cellType.id === id)!;
    const thin = lifeOf('few-100');
    expect(thin).toMatchObject({ absence: null, evidence: { banks: few }, life: { basis: 'pool' } });
    expect(thin.life!.ownShareFraction).toBeNull();
    // The same figure as of a cell type nobody has: nothing of its own is in it.
    expect(lifeOf('none-100')).toMatchObject({ absence: 'tooFewOwners', evidence: null, life: thin.life });
    const spread = ({ years }: NonNullable<typeof thin.life>) => years.upper / years.lower;
    expect(spread(thin.life!)).toBeGreaterThan(spread(lifeOf('skerry-100').life!));
  });

  it('names the condition that the pool does not reach, with the nearest value it does', async () => {
    await addOwners(1, 12, undefined, 22);
    await refit();
    const [cell] = (await list()).cells;
    expect(cell!.life!.outside).toEqual([
      { condition: 'temperatureC', value: 25, nearest: expect.closeTo(22, 6) },
    ]);
  });

  it('leaves out cell types that are not listed yet', async () => {
    await addCellType({ id: 'proposed-50', status: 'proposed' });
    expect((await list()).cells.map(({ cellType }) => cellType.id)).toEqual(['skerry-100']);
  });

  it('says nothing of a cell type with fewer than five owners, not even how many', async () => {
    await addCellType({ id: 'thin-100' });
    await addOwners(1, 12);
    await addOwners(20, 23, 'thin-100');
    await refit();
    const thin = (await list()).cells.find(({ cellType }) => cellType.id === 'thin-100');
    expect(thin).toMatchObject({ evidence: null, life: { basis: 'pool' }, absence: 'tooFewOwners' });
    expect((await page('', 'thin-100')).view).toMatchObject({ evidence: null, dots: [] });
  });
});

describe('the public pool', () => {
  it('stays as it is with four owners waiting, and moves with the fifth', async () => {
    await addOwners(1, 8);
    await refit();
    const before = await page();
    expect(before.pool.waiting).toBe('none');

    await addOwners(11, 14);
    await refit();
    const waiting = await page();
    expect(waiting.pool.waiting).toBe('fewerThanFiveOwners');
    expect((await list()).pool.waiting).toBe('fewerThanFiveOwners');
    expect(waiting.view).toEqual(before.view);

    await addOwners(15, 15);
    const runAfter = new Date('2026-12-01T13:00:00Z');
    await server.deps.db.transaction((transaction) =>
      server.deps.jobs.enqueue({ kind: 'refit', runAfter }, transaction),
    );
    expect((await page()).pool.waiting).toBe('due');
    await refit();
    const after = await page();
    expect(after.pool).toMatchObject({
      waiting: 'none',
      evidence: { owners: teens, banks: teens, checks: 52 },
    });
    expect(after.view.evidence).toEqual({ owners: teens, banks: teens, checks: 52 });
    expect(after.view.life).not.toEqual(before.view.life);
  });

  it('tells of waiting only at the cell types concerned', async () => {
    await addCellType({ id: 'other-100' });
    await addOwners(1, 6);
    await addOwners(21, 26, 'other-100');
    await refit();
    await addOwners(31, 32, 'other-100');
    await refit();
    expect((await page('', 'other-100')).pool.waiting).toBe('fewerThanFiveOwners');
    expect((await page()).pool.waiting).toBe('none');
  });

  it('counts recalled checks as waiting', async () => {
    const [first] = await addOwners(1, 6);
    await refit();
    await Check.update({ state: 'recalled' }, { where: { bankId: first!.bank.id } });
    expect((await page()).pool.waiting).toBe('fewerThanFiveOwners');
  });
});

describe('GET /api/cells/:cellId', () => {
  it('draws the curve to three times the reach, with its statuses in order', async () => {
    await addOwners(1, 8);
    await refit();
    const { view } = await page();
    const statuses = view.curve.map(({ status }) => status);
    expect([...new Set(statuses)]).toEqual(['measured', 'projected', 'extrapolated']);
    const reach = view.life!.reachEfc;
    // Hours after the start nothing is lost: what is left is the start capacity, near the rating.
    expect(view.curve[0]!.years).toBeLessThan(0.01);
    expect(Math.abs(view.curve[0]!.sohFraction - 1)).toBeLessThan(0.03);
    expect(view.curve.at(-1)?.efc).toBeCloseTo(3 * reach, 6);
    expect(view.curve.filter(({ status }) => status === 'measured').at(-1)?.efc).toBeCloseTo(reach, 6);
    expect(view.curve.filter(({ status }) => status === 'projected').at(-1)?.efc).toBeCloseTo(2 * reach, 6);
    for (const { lower, sohFraction, upper } of view.curve) {
      expect(lower).toBeLessThanOrEqual(sohFraction + 1e-12);
      expect(upper).toBeGreaterThanOrEqual(sohFraction - 1e-12);
    }
  });

  it('rounds its dots and gives no key of bank, owner or check', async () => {
    const owners = await addOwners(1, 6);
    await refit();
    const answer = await visitor.get('/api/cells/skerry-100').expect(200);
    const { view } = cellPageSchema.parse(answer.body);
    expect(view.dots).toHaveLength(24);
    for (const { years, efc, sohFraction } of view.dots) {
      expect(years * 10).toBeCloseTo(Math.round(years * 10), 9);
      expect(efc % 10).toBe(0);
      expect(sohFraction * 1000).toBeCloseTo(Math.round(sohFraction * 1000), 9);
    }
    for (const { ownerId, bank, checks } of owners)
      for (const key of [ownerId, bank.id, bank.pseudonym, checks[0]!.id])
        expect(answer.text).not.toContain(key);
  });

  it('shows one band at a time, and greys out those without enough owners', async () => {
    await addOwners(1, 8);
    await refit();
    const { bands, band, view } = await page('?band=depth:middle');
    expect(band).toBe('depth:middle');
    expect(view.evidence?.owners).toEqual(few);
    const enough = bands.filter(({ hasEnoughOwners }) => hasEnoughOwners).map(({ key }) => key);
    expect(enough).toEqual(['depth:middle', 'rate:slow', 'temperature:middle', 'clamping:none']);
    expect((await page('?band=depth:deep')).view).toMatchObject({
      evidence: null,
      absence: 'tooFewOwners',
      dots: [],
    });
  });

  const claim = {
    cellTypeId: 'skerry-100',
    endOfLifeFraction: 0.8,
    chargeIt: 0.5,
    dischargeIt: 0.5,
    temperatureC: 25,
    clamping: 'none' as const,
    clampForceN: null,
    whereItStands: 'Data sheet, page 2',
  };

  it('gives quoted claims with their full cycles, none where the depth is not stated', async () => {
    await QuotedClaim.create({ ...claim, cycles: 4000, depthFraction: 0.8 });
    await QuotedClaim.create({ ...claim, cycles: 6000, depthFraction: null });
    const { claims } = await page();
    expect(claims.map(({ cycles, efc, labelAbsence }) => [cycles, efc, labelAbsence])).toEqual([
      [6000, null, 'noFit'],
      [4000, 3200, 'noFit'],
    ]);
  });

  it('says what a claim implies at the use, and its ratio only for a life of the cell type itself', async () => {
    await addCellType({ id: 'few-100' });
    await QuotedClaim.create({ ...claim, cycles: 4000, depthFraction: 0.8 });
    await QuotedClaim.create({ ...claim, cycles: 5000, depthFraction: 0.8, clamping: 'notStated' });
    await QuotedClaim.create({ ...claim, cycles: 6000, depthFraction: null });
    await QuotedClaim.create({ ...claim, cycles: 4000, depthFraction: 0.8, cellTypeId: 'few-100' });
    await addOwners(1, 12);
    await addOwners(21, 27, 'few-100');
    await refit();
    const { claims, view } = await page();
    expect(claims.map(({ labelAbsence }) => labelAbsence)).toEqual([
      'conditionsNotStated',
      'conditionsNotStated',
      null,
    ]);
    const { impliedYears, impliedEfc, ratio } = claims[2]!.label!;
    expect(impliedEfc.estimate).toBeCloseTo(impliedYears.estimate * 219.1455, 6);
    // Means of logarithms over the exponents: the ratio of the two lives.
    expect(ratio!.estimate).toBeCloseTo(view.life!.years.estimate / impliedYears.estimate, 6);
    expect(ratio!.lower).toBeLessThan(ratio!.estimate);
    expect((await page('', 'few-100')).claims[0]!.label).toMatchObject({ ratio: null });
  });

  it('says what moves a life, and nothing of clamping where nobody clamps', async () => {
    await addOwners(1, 12);
    await refit();
    const { effects } = await page();
    expect(effects.map(({ lever }) => lever)).toEqual(['heat', 'depth', 'chargeLevel', 'rate']);
    // Nobody in this pool lives otherwise: what is said of heat comes from published studies alone.
    expect(effects[0]).toMatchObject({ verdict: 'notMeasured', from: 30, to: 20 });
    expect(effects[0]!.priorShareFraction).toBeGreaterThan(0.5);
  });

  it('answers an unknown cell type with 404, an unknown band with 422 and the ones there are', async () => {
    const missing = await visitor.get('/api/cells/nobody-1').expect(404);
    expect(missing.body.error.message).toMatch(/no cell type/);
    await visitor.get('/api/cells/__proto__').expect(404);
    const unknown = await visitor.get('/api/cells/skerry-100?band=depth:abyss').expect(422);
    expect(unknown.body.error.fields.band).toMatch(/depth:deep/);
    const broken = await visitor.get('/api/cells/skerry-100?band=%3Cscript%3E').expect(422);
    expect(broken.body.error.fields.band).toBeDefined();
    await visitor.get('/api/cells/skerry-100?band=depth:deep&band=rate:fast').expect(422);
  });

  it('answers signed-in people like visitors', async () => {
    for (const role of ['owner', 'moderator', 'steward'] as const) {
      const client = await server.client(role);
      expect((await client.get('/api/cells')).body).toEqual((await visitor.get('/api/cells')).body);
    }
  });
});
