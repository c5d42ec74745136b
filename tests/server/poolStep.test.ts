import type { PoolCheck } from '@/lib/fit/poolCheck';
import { planStep } from '@/server/pool/planStep';
import type { PoolMember } from '@/server/pool/poolRow';

function member(
  owner: string,
  cellType = 'a',
  changes: Partial<PoolCheck> & { checkId?: string } = {},
): PoolMember {
  const { checkId = `${owner}-${cellType}`, ...row } = changes;
  return {
    checkId,
    row: {
      bank: `bank-${owner}`,
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

  it('counts what leaves like what comes', () => {
    const before = members(12);
    expect(planStep(before.slice(4), before)).toBeNull();
    const plan = planStep(before.slice(5), before);
    expect(plan?.remove).toHaveLength(5);
    expect(planStep([...before.slice(2), ...members(3, 'a', 20)], before)?.owners).toBe(5);
  });

  it('counts a row whose values changed, and writes it anew', () => {
    const before = members(5);
    const after = before.map(({ checkId, row }) => ({ checkId, row: { ...row, depthFraction: 0.6 } }));
    expect(planStep(after.slice(0, 4).concat(before.slice(4)), before)).toBeNull();
    expect(planStep(after, before)?.put[0]?.row.depthFraction).toBe(0.6);
  });

  it('does not let one published cell type move by fewer than five owners on the back of another', () => {
    const before = [...members(6, 'a'), ...members(6, 'b')];
    const after = [...before, ...members(5, 'a', 30), ...members(2, 'b', 40)];
    const plan = planStep(after, before);
    expect(plan?.put.map(({ row }) => row.cellType)).toEqual(['a', 'a', 'a', 'a', 'a']);
  });

  it('lets cell types of which nothing is published go together', () => {
    const plan = planStep([...members(3, 'a'), ...members(2, 'b', 10)], []);
    expect(plan?.owners).toBe(5);
  });

  it('counts an owner of two such cell types once', () => {
    expect(planStep([...members(4, 'a'), member('o1', 'b')], [])).toBeNull();
  });
});
