import { uniformFloat64 } from 'pure-rand/distribution/uniformFloat64';
import { xoroshiro128plus } from 'pure-rand/generator/xoroshiro128plus';

import type { ApprovedMember } from '@/server/pool/poolRow';
import type { BankIdentity } from '@/server/publicView/identity';

/** The approved checks at three times: a start, some banks and checks more, some less. */
export type PoolHistory = ApprovedMember[][];

type Draw = () => number;

const cellTypes = ['ayre-100', 'brae-200', 'corrie-280'];
const climates = ['cold', 'mild', 'hot'] as const;
const layouts = ['4s single', '16s single', '16s parallel'] as const;
const clampings = ['none', 'rigid', 'sprung'] as const;

/**
 * A pool with what an attack looks for planted in it: cell types, layouts, climates and bands of one to four owners,
 * owners of many banks, and changes of a single owner between the times.
 */
export function randomPool(seed: number): PoolHistory {
  const random = xoroshiro128plus(seed * 7919 + 1);
  const draw: Draw = () => uniformFloat64(random);
  for (let skipped = 0; skipped < 20; skipped += 1) draw();
  const owners = 40 + Math.floor(draw() * 40);
  const start: ApprovedMember[] = [];
  for (let owner = 0; owner < owners; owner += 1) {
    // Every eighth owner has three banks of one cell type, the first one a dozen.
    const banks = owner === 0 ? 12 : owner % 8 === 1 ? 3 : 1;
    const cellType = owner === 0 || banks === 3 ? cellTypes[0]! : cellTypes[Math.floor(draw() ** 2 * 3)]!;
    for (let bank = 0; bank < banks; bank += 1)
      start.push(...bankOf(`owner-${owner}`, `bank-${owner}-${bank}`, cellType, draw));
  }
  // Small groups: a cell type of two owners, and four who alone use their banks deep.
  for (let owner = 0; owner < 2; owner += 1)
    start.push(...bankOf(`rare-${owner}`, `rare-bank-${owner}`, 'wrack-50', draw));
  for (let owner = 0; owner < 4; owner += 1)
    start.push(...bankOf(`deep-${owner}`, `deep-bank-${owner}`, 'brae-200', draw, 0.9));
  // An owner whose many banks are most of a cell type.
  for (let bank = 0; bank < 30; bank += 1)
    start.push(...bankOf('big', `big-bank-${bank}`, 'dulse-320', draw, 0.5, 4));
  for (let owner = 0; owner < 6; owner += 1)
    start.push(...bankOf(`small-${owner}`, `small-bank-${owner}`, 'dulse-320', draw, 0.5, 1));
  const more = Array.from({ length: 2 + Math.floor(draw() * 8) }, (_, i) =>
    bankOf(`late-${i}`, `late-bank-${i}`, cellTypes[Math.floor(draw() * 3)]!, draw),
  ).flat();
  const again = start.filter(() => draw() < 0.05).map((member) => nextCheck(member, draw));
  const later = [...start, ...more, ...again];
  const gone = new Set(later.filter(() => draw() < 0.03).map(({ row }) => row.owner));
  return [start, later, later.filter(({ row }) => !gone.has(row.owner))];
}

function bankOf(
  owner: string,
  bank: string,
  cellType: string,
  draw: Draw,
  depth = 0.2 + 0.3 * draw(),
  count = 1 + Math.floor(draw() * 4),
): ApprovedMember[] {
  const pick = <T>(values: readonly T[]) => values[Math.floor(draw() * values.length)]!;
  const identity: BankIdentity = {
    cellType,
    commissionedYear: 2017 + Math.floor(draw() * 6),
    climateBand: pick(climates),
    layoutClass: pick(layouts),
    clamping: pick(clampings),
  };
  const heat = 15 + 18 * draw();
  const rate = 0.05 + 0.35 * draw();
  const perYear = 120 + 160 * draw();
  return Array.from({ length: count }, (_, i) => {
    const ageYears = i + 0.7 + 0.5 * draw();
    const efc = perYear * ageYears;
    return {
      checkId: `${bank}-${i}`,
      identity,
      row: {
        ...{ bank, owner, cellType, isClamped: identity.clamping !== 'none', depthFraction: depth },
        ...{ dischargeIt: rate, temperatureC: heat, socMeanFraction: 0.4 + 0.2 * draw(), ageYears, efc },
        ...{ ratedAh: 100, capacityAh: 102 - 6 * (efc / 500) ** 0.7 + draw(), relSd: 0.006 + 0.01 * draw() },
      },
    };
  });
}

const nextCheck = (member: ApprovedMember, draw: Draw): ApprovedMember => ({
  ...member,
  checkId: `${member.checkId}-again`,
  row: {
    ...member.row,
    ageYears: member.row.ageYears + 1 + 0.1 * draw(),
    efc: member.row.efc + 180,
    capacityAh: member.row.capacityAh - 1,
  },
});
