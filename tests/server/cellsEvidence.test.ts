import { publishedFitOf } from '@/components/chosenUse/publishedModel';
import { cellListSchema, cellPageSchema, standardUse } from '@/lib/contract/cells';
import { claimFigureAt, figureAt } from '@/lib/fit/pooled/published';
import { Bank, QuotedClaim } from '@/server/db/models';
import { requestRefit } from '@/server/fits/requestRefit';

import { addBank, addCellType, addCheck, addOwner, addOwnerWithChecks } from '../support/poolFixture';
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

async function addOwners(from: number, to: number, cellTypeId?: string) {
  const owners = [];
  for (let seed = from; seed <= to; seed += 1)
    owners.push(await addOwnerWithChecks(seed, { cellTypeId, conditions: { temperatureMeanC: 25 } }));
  return owners;
}

const list = async () => cellListSchema.parse((await visitor.get('/api/cells').expect(200)).body);
const page = async (id = 'skerry-100') =>
  cellPageSchema.parse((await visitor.get(`/api/cells/${id}`).expect(200)).body);

describe('the published model', () => {
  it('gives whoever has it the life, curve and label that the server tells', async () => {
    await QuotedClaim.create({
      ...{ cellTypeId: 'skerry-100', cycles: 4000, endOfLifeFraction: 0.8, depthFraction: 0.8 },
      ...{ chargeIt: 0.5, dischargeIt: 0.5, temperatureC: 25, clamping: 'none', clampForceN: null },
      whereItStands: 'Data sheet, page 2',
    });
    await addOwners(1, 12);
    await refit();
    const { model, view, claims } = await page();
    const fit = publishedFitOf(model!);
    const { life, curve } = figureAt(fit, standardUse, 'skerry-100');
    // Parameters travel with nine digits; ranges take differences of products of them.
    for (const key of ['estimate', 'lower', 'upper'] as const)
      expect(life.years[key] / view.life!.years[key]).toBeCloseTo(1, 5);
    expect(life.rangeOfBanks.upper / view.life!.rangeOfBanks!.upper).toBeCloseTo(1, 5);
    expect(life.priorShareFraction).toBeCloseTo(view.life!.priorShareFraction!, 5);
    expect(curve).toHaveLength(view.curve.length);
    curve.forEach((point, i) => expect(point.lower).toBeCloseTo(view.curve[i]!.lower, 5));
    const { label } = claimFigureAt(fit, claims[0]!, standardUse, { cellType: 'skerry-100', life });
    expect(label!.ratio!.lower / claims[0]!.label!.ratio!.lower).toBeCloseTo(1, 5);
  });

  it('holds no effect of a cell type that is told by the pool’s figure', async () => {
    await addCellType({ id: 'few-100' });
    await addOwners(1, 12);
    await addOwners(21, 27, 'few-100');
    await refit();
    const { model } = await list();
    expect(model!.cellTypes.map(({ id }) => id)).toEqual(['skerry-100']);
    expect(model!.components.map(({ cellTypes }) => cellTypes.length)).toEqual([1, 1, 1, 1, 1]);
    const few = await page('few-100');
    expect(few.related.map(({ id }) => id)).toEqual(['skerry-100']);
    expect(few.model!.cellTypes.map(({ id }) => id)).toEqual(['skerry-100']);
    const { life } = figureAt(publishedFitOf(few.model!), standardUse, null);
    expect(life.years.upper / few.view.life!.years.upper).toBeCloseTo(1, 5);
  });

  it('is not there before the first fit', async () => {
    expect((await list()).model).toBeNull();
    expect(await page()).toMatchObject({ model: null, survival: null, price: null });
  });
});

describe('what owners paid', () => {
  it('is told from five owners on, as a median of owners to two digits', async () => {
    const owners = await addOwners(1, 6);
    const pay = (places: number[], prices: number[]) =>
      Promise.all(
        places.map((place, i) =>
          Bank.update(
            { priceMinor: prices[i]!, priceCurrency: 'EUR' },
            { where: { id: owners[place]!.bank.id } },
          ),
        ),
      );
    await pay([0, 1, 2, 3], [5000, 6000, 7100, 9000]);
    await refit();
    expect((await page()).price).toBeNull();
    expect((await list()).cells[0]!.price).toBeNull();
    await pay([4], [7149]);
    await addOwners(31, 36);
    await refit();
    // Of 5000, 6000, 7100, 7149 and 9000 the middle one.
    expect((await page()).price).toEqual({ currency: 'EUR', perCellMinor: 7100 });
    expect((await list()).cells[0]!.price).toEqual({ currency: 'EUR', perCellMinor: 7100 });
  });

  it('gives an owner of many banks one voice', async () => {
    const owners = await addOwners(1, 6);
    for (const [i, { ownerId, bank }] of owners.entries()) {
      await bank.update({ priceMinor: 5000 + 1000 * i, priceCurrency: 'EUR' });
      if (i < 5) continue;
      for (let more = 0; more < 6; more += 1) {
        const other = await addBank({ ownerId });
        await other.update({ priceMinor: 90_000, priceCurrency: 'EUR' });
        await addCheck({ bankId: other.id, years: 1, efc: 150, sohFraction: 0.97 });
      }
    }
    await refit();
    // 5000 to 9000 and one of 90,000: between 7000 and 8000, whatever the last owner's banks number.
    expect((await page()).price!.perCellMinor).toBe(7500);
  });
});

describe('the raw readings summed up', () => {
  it('has medians by age and by full cycles, with the middle 80 %', async () => {
    await addOwners(1, 8);
    await refit();
    const { bins } = await page();
    // Yearly checks of eight banks at ages 1 to 4.
    expect(bins.years.map(({ from }) => from)).toEqual([1, 2, 3, 4]);
    for (const { median, lower, upper } of [...bins.years, ...bins.efc]) {
      expect(lower).toBeLessThanOrEqual(median);
      expect(upper).toBeGreaterThanOrEqual(median);
    }
    const medians = bins.years.map(({ median }) => median);
    expect(medians).toEqual([...medians].sort((a, b) => b - a));
  });

  it('leaves out what fewer than five owners stand behind, and a second bin that would give it away', async () => {
    await addOwners(1, 8);
    for (let seed = 11; seed <= 14; seed += 1) {
      const ownerId = (await addOwner()).id;
      const bank = await addBank({ ownerId });
      await addCheck({ bankId: bank.id, years: 6, efc: 900, sohFraction: 0.9 });
    }
    await refit();
    expect((await page()).bins.years.map(({ from }) => from)).toEqual([2, 3, 4]);
  });
});

describe('the share of banks above 80 %', () => {
  async function addBanks(count: number, shares: number[]) {
    for (let i = 0; i < count; i += 1) {
      const bank = await addBank({ ownerId: (await addOwner()).id });
      for (const [at, sohFraction] of shares.entries())
        await addCheck({ bankId: bank.id, years: at + 1, efc: 200 * (at + 1), sohFraction });
    }
  }

  it('falls where banks cross, between their checks, and ends with five owners', async () => {
    await addBanks(6, [0.97, 0.94, 0.92, 0.9]);
    await addBanks(6, [0.92, 0.86, 0.78, 0.75]);
    await refit();
    const { survival, poolSurvival } = await page();
    const shareAt = (years: number) => survival!.points.find((point) => point.years === years)!;
    expect(shareAt(2)).toMatchObject({ lowestFraction: 1, highestFraction: 1 });
    // Half of the banks cross between the checks of years 2 and 3.
    expect(shareAt(3)).toMatchObject({ lowestFraction: 0.5, highestFraction: 0.5 });
    expect(survival!.points.map(({ years }) => years)).toEqual([1, 2, 3, 4]);
    // Wilson's interval of 6 in 12 at 90 %: 0.5 ± 1.6449 / (1 + 2.7055/12) √(0.25/12 + 2.7055/576) = 0.5 ± 0.2145.
    expect(shareAt(3).lowerFraction).toBeCloseTo(0.286, 3);
    expect(shareAt(3).upperFraction).toBeCloseTo(0.714, 3);
    expect(survival!.hasFewCrossings).toBe(false);
    expect(shareAt(4).smoothFraction).toBeLessThan(0.6);
    expect(poolSurvival!.points).toHaveLength(4);
  });

  it('draws no smooth curve from fewer than five crossings, nor calls a share of all certain', async () => {
    await addBanks(9, [0.97, 0.94, 0.92]);
    await addBanks(1, [0.97, 0.85, 0.79]);
    await refit();
    const { survival } = await page();
    expect(survival!.hasFewCrossings).toBe(true);
    expect(survival!.points.every(({ smoothFraction }) => smoothFraction === null)).toBe(true);
    expect(survival!.points[0]).toMatchObject({ lowestFraction: 1, upperFraction: 1 });
    expect(survival!.points[0]!.lowerFraction).toBeLessThan(0.9);
  });

  it('is not told of a cell type of fewer than five owners', async () => {
    await addCellType({ id: 'thin-100' });
    await addOwners(1, 12);
    await addOwners(21, 24, 'thin-100');
    await refit();
    expect(await page('thin-100')).toMatchObject({
      survival: null,
      bins: { years: [], efc: [] },
      price: null,
    });
  });
});
