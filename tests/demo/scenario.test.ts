import { cellTypes } from '@/data/demo/cellTypes';
import { generateDemo } from '@/data/demo/generateDemo';
import { createBankEventRequestSchema, createBankRequestSchema } from '@/lib/contract/banks';
import { submitCheckRequestSchema } from '@/lib/contract/checks';

const demo = generateDemo();
const checks = demo.banks.flatMap((bank) => bank.checks.map((check) => ({ bank, check })));
const pending = checks.filter(({ check }) => check.state === 'submitted');

describe('the demo scenario', () => {
  test('has the sizes it is described with', () => {
    expect(cellTypes).toHaveLength(24);
    expect(new Set(cellTypes.map(({ maker }) => maker)).size).toBe(6);
    expect(demo.owners).toHaveLength(900);
    expect(new Set(demo.banks.map(({ ownerId }) => ownerId)).size).toBe(900);
    expect(demo.banks).toHaveLength(1200);
    expect(checks.length).toBeGreaterThan(4000);
    expect(checks.length).toBeLessThan(4400);
    expect(demo.banks.every((bank) => bank.checks.length > 0)).toBe(true);
    for (const { id, banks } of cellTypes)
      expect(demo.banks.filter(({ fields }) => fields.cellTypeId === id)).toHaveLength(banks);
  });

  test('is the same for the same seed and another for another', () => {
    expect(generateDemo()).toEqual(demo);
    const other = generateDemo(7);
    expect(other.banks).toHaveLength(1200);
    expect(other.banks[3]!.id).not.toBe(demo.banks[3]!.id);
    expect(other.banks[3]!.checks[0]!.fields.reading).not.toEqual(demo.banks[3]!.checks[0]!.fields.reading);
  });

  test('passes the schemas that owners have to pass', () => {
    for (const { fields, events } of demo.banks) {
      expect(createBankRequestSchema.safeParse(fields).error).toBeUndefined();
      for (const event of events) expect(createBankEventRequestSchema.safeParse(event).error).toBeUndefined();
    }
    for (const { check } of checks) {
      const { idempotencyKey, fields } = check;
      expect(
        submitCheckRequestSchema.safeParse({ ...fields, idempotencyKey, consent: 1 }).error,
      ).toBeUndefined();
    }
  });

  test('has ids, keys and pseudonyms of its own for everything', () => {
    const areDifferent = (values: string[]) => new Set(values).size === values.length;
    expect(areDifferent(demo.banks.map(({ pseudonym }) => pseudonym))).toBe(true);
    expect(
      areDifferent([...demo.owners, ...demo.banks, ...checks.map(({ check }) => check)].map(({ id }) => id)),
    ).toBe(true);
    expect(areDifferent(checks.map(({ check }) => check.idempotencyKey))).toBe(true);
  });

  test('keeps days in order: after first use, each later than the one before, none after November 2026', () => {
    for (const { fields, checks: ofBank, events } of demo.banks) {
      const days = ofBank
        .filter(({ state }) => state !== 'turnedAway')
        .map((check) => check.fields.reading.testedOn);
      expect([...new Set(days)].sort()).toEqual(days);
      for (const day of [...days, ...events.map(({ happenedOn }) => happenedOn)]) {
        expect(day.slice(0, 7) >= fields.firstUseMonth).toBe(true);
        expect(day <= '2026-11-30').toBe(true);
      }
    }
    const instants = checks.flatMap(({ check }) => [check.submittedAt, check.decidedAt ?? check.submittedAt]);
    expect(instants.sort().at(-1)! < '2026-12-01').toBe(true);
    const firstUse = demo.banks.map(({ fields }) => fields.firstUseMonth).sort();
    expect(firstUse[0]! >= '2018-11').toBe(true);
  });

  test('has cell types too thin to publish and one of under ten banks', () => {
    const owners = (id: string) =>
      new Set(demo.banks.filter(({ fields }) => fields.cellTypeId === id).map(({ ownerId }) => ownerId)).size;
    expect(cellTypes.filter(({ id }) => owners(id) < 5).map(({ name }) => name)).toEqual([
      'Corrie C50',
      'Corrie C180',
      'Shingle 20',
    ]);
    expect(owners('skerry-p60')).toBe(7);
  });

  test('has banks bought used, banks that failed, and every kind of ordinary event', () => {
    const used = demo.banks.filter(({ fields }) => fields.bought !== 'new').length / 1200;
    expect(used).toBeGreaterThan(0.06);
    expect(used).toBeLessThan(0.14);
    const kinds = new Set(demo.banks.flatMap(({ events }) => events.map(({ kind }) => kind)));
    for (const kind of ['rebalanced', 'cellReplaced', 'cellFailed', 'swollen', 'sold', 'retired'])
      expect(kinds).toContain(kind);
  });

  test("gives the demo's first owner two banks of four to five checks", () => {
    const own = demo.banks.filter(({ ownerId }) => ownerId === demo.owners[0]!.id);
    expect(own.map((bank) => bank.checks.length)).toEqual([5, 4]);
    for (const owner of demo.owners.slice(1, 5))
      expect(demo.banks.filter(({ ownerId }) => ownerId === owner.id)).toHaveLength(1);
  });
});

describe('the queue', () => {
  test('holds fourteen submissions of fourteen owners, none of them of the accounts', () => {
    expect(pending).toHaveLength(14);
    const owners = new Set(pending.map(({ bank }) => bank.ownerId));
    expect(owners.size).toBe(14);
    for (const { id } of demo.owners.slice(0, 5)) expect(owners.has(id)).toBe(false);
  });

  test('holds each mistake and oddity once, and five clean checks of Skerry 240', () => {
    const kinds = pending.map(({ check }) => check.pending);
    expect(kinds.filter((kind) => kind !== 'clean').sort()).toEqual([
      'bankForCell',
      'cellsAdded',
      'coldAndCutShort',
      'counterBackwards',
      'duplicate',
      'realFailure',
      'riseAfterRebalance',
      'wattHours',
      'wrongRating',
    ]);
    const clean = pending.filter(({ check }) => check.pending === 'clean');
    expect(clean.map(({ bank }) => bank.fields.cellTypeId)).toEqual(Array(5).fill('skerry-240'));
  });

  test('comes in after the bank had its earlier checks decided', () => {
    for (const { bank, check } of pending)
      for (const earlier of bank.checks.filter(({ state }) => state === 'approved'))
        expect(earlier.decidedAt! < check.submittedAt).toBe(true);
  });
});
