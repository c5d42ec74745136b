import type { PoolCheck } from '@/lib/fit/poolCheck';
import { planStep } from '@/server/pool/planStep';
import type { PublicPoolMember } from '@/server/pool/poolRow';
import { type BankIdentity, coarsestLevel, namedLevel } from '@/server/publicView/identity';
import { protections } from '@/server/publicView/protections';

function member(
  owner: string,
  cellType = 'a',
  changes: Partial<PoolCheck> & { checkId?: string; identity?: Partial<BankIdentity>; level?: number } = {},
): PublicPoolMember {
  const { checkId = `${owner}-${cellType}`, identity, level = namedLevel, ...row } = changes;
  return {
    checkId,
    level,
    identity: {
      cellType,
      commissionedYear: 2020,
      climateBand: 'mild',
      layoutClass: '16s single',
      clamping: 'none',
      ...identity,
    },
    row: {
      bank: `bank-${owner}-${cellType}`,
      owner,
      cellType,
      isClamped: false,
      depthFraction: 0.5,
      dischargeIt: 0.2,
      temperatureC: 25,
      socMeanFraction: 0.5,
      ageYears: 3,
      efc: 600,
      ratedAh: 100,
      capacityAh: 95,
      relSd: 0.01,
      ...row,
    },
  };
}

const members = (count: number, cellType = 'a', from = 1) =>
  Array.from({ length: count }, (_, i) => member(`o${from + i}`, cellType));

describe('planStep', () => {
  it('moves nothing when nothing changed', () => {
    expect(planStep(members(8), members(8))).toBeNull();
  });

  it('holds back the changes of four owners and lets those of five go', () => {
    expect(planStep(members(4), [])).toBeNull();
    expect(planStep(members(5), [])).toMatchObject({ owners: 5, remove: [] });
    expect(planStep(members(5), [])?.put).toHaveLength(5);
  });

  it('counts owners, not checks', () => {
    const many = Array.from({ length: 9 }, (_, i) => member('o1', 'a', { checkId: `c${i}` }));
    expect(planStep([...many, ...members(3, 'a', 2)], [])).toBeNull();
  });

  it('counts what leaves apart from what comes, as anyone sees which is which', () => {
    const before = members(12);
    expect(planStep(before.slice(4), before)).toBeNull();
    const plan = planStep(before.slice(5), before);
    expect(plan?.remove).toHaveLength(5);
    expect(planStep([...before.slice(2), ...members(3, 'a', 20)], before)).toBeNull();
  });

  it('takes out the rest of a class that would be left too thin', () => {
    const before = members(8);
    expect(planStep(before.slice(5), before)?.remove).toHaveLength(8);
  });

  it('counts checks added to banks that are public like banks that come', () => {
    const before = members(12);
    const more = (count: number) =>
      before
        .slice(0, count)
        .map((known) => ({ ...known, checkId: `${known.checkId}-2`, row: { ...known.row, ageYears: 4 } }));
    expect(planStep([...before, ...more(4)], before)).toBeNull();
    expect(planStep([...before, ...more(5)], before)?.owners).toBe(5);
    expect(planStep([...before, ...more(3), ...members(2, 'a', 30)], before)?.owners).toBe(5);
  });

  it('counts a row whose values changed, and writes it anew', () => {
    const before = members(5);
    const after = before.map((known) => ({ ...known, row: { ...known.row, depthFraction: 0.6 } }));
    expect(planStep(after.slice(0, 4).concat(before.slice(4)), before)).toBeNull();
    expect(planStep(after, before)?.put[0]?.row.depthFraction).toBe(0.6);
  });

  it('does not let one published cell type move by fewer than five owners on the back of another', () => {
    const before = [...members(6, 'a'), ...members(6, 'b')];
    const after = [...before, ...members(5, 'a', 30), ...members(2, 'b', 40)];
    const plan = planStep(after, before);
    expect(plan?.put.map(({ row }) => row.cellType)).toEqual(['a', 'a', 'a', 'a', 'a']);
  });

  it('lets cell types of too few owners go together, unnamed', () => {
    const plan = planStep([...members(3, 'a'), ...members(2, 'b', 10)], []);
    expect(plan?.owners).toBe(5);
    expect(plan?.put.map(({ level }) => level)).toEqual(Array(5).fill(coarsestLevel));
  });

  it('names a cell type once enough of its owners can be told of', () => {
    const unnamed = [...members(10, 'a'), ...members(5, 'b', 20)].map((known) => ({ ...known, level: 6 }));
    const plan = planStep(unnamed, unnamed);
    expect(plan?.put.map(({ level }) => level)).toEqual(Array(15).fill(namedLevel));
    // Were four of another cell type to stay behind, they would be known by that.
    const withFew = [...unnamed, ...members(4, 'c', 30).map((known) => ({ ...known, level: 6 }))];
    const stepped = planStep(withFew, withFew);
    expect(stepped?.put.every(({ row }) => row.cellType !== 'c')).toBe(true);
    expect(stepped?.put).toHaveLength(10);
  });

  it('lets no owner be most of a class', () => {
    const big = Array.from({ length: 9 }, (_, i) => member('o1', 'a', { checkId: `c${i}`, ageYears: i + 1 }));
    expect(planStep([...big, ...members(5, 'a', 2)], [])).toBeNull();
    expect(planStep([...big, ...members(9, 'a', 2)], [], { ...protections })?.owners).toBe(10);
  });

  it('counts an owner of two such cell types once', () => {
    expect(planStep([...members(4, 'a'), member('o1', 'b')], [])).toBeNull();
  });
});
