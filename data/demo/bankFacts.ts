import type { BankFields } from '@/lib/contract/banks';
import { addMonths } from '@/lib/units';

import { cellTypeOf, type DemoCellType } from './cellTypes';
import type { PlannedBank } from './people';
import { type Draws, toStep } from './random';

/** Places around the Thrannet, the demo's estuary; none is on any map. */
const places = [
  'Orrisand',
  'Lunnerwick',
  'Hethermouth',
  'Skarrow Quay',
  'Wendlemere',
  'Ottershelf',
  'Vaskerby',
  'Mallowfleet',
  'Quernstrand',
  'Pellowick',
  'Thrannet Bar',
  'Saltholm Reach',
];
const kinds = [
  'House bank',
  'Shed',
  'Workshop',
  'Barn',
  'Garage',
  'Boathouse',
  'Annexe',
  'Cellar',
  'Greenhouse',
];

/** First month and last month of the demo's histories. */
const lastMonth = '2026-11';
const longestMonths = 96;

/** Draws what the owner says of a bank; a plan's own figures come first. */
export function drawBankFields(draws: Draws, cellTypeId: string, plan: PlannedBank | null): BankFields {
  const cellType = cellTypeOf(cellTypeId);
  const place = draws.weighted({ indoors: 0.34, shed: 0.26, garage: 0.27, vehicle: 0.08, boat: 0.05 });
  const layout = drawLayout(draws, cellType);
  const firstUseMonth = drawFirstUse(draws);
  const clamping = drawClamping(draws, cellType, plan?.isClamped);
  const limits = drawLimits(draws);
  const hasPrice = draws.chance(0.4);
  const bought = draws.weighted({ new: 0.9, used: 0.07, unknown: 0.03 });
  const month = plan?.firstUseMonth ?? firstUseMonth;
  const madeMonth = addMonths(month, -draws.int(2, 9));
  return {
    name: plan?.name ?? `${draws.pick(kinds)}, ${draws.pick(places)}`,
    cellTypeId,
    parallel: plan?.parallel ?? layout.parallel,
    series: plan?.series ?? layout.series,
    firstUseMonth: month,
    madeMonth: draws.chance(0.55) && bought === 'new' ? madeMonth : null,
    bought: plan ? 'new' : bought,
    startCapacityAh: null,
    ...clamping,
    spacingMm: clamping.clamping === 'none' && draws.chance(0.4) ? draws.int(1, 8) : null,
    place,
    climateBand: draws.weighted({ cold: 0.09, cool: 0.24, mild: 0.32, warm: 0.21, hot: 0.14 }),
    ...limits,
    priceMinor: hasPrice ? Math.round((cellType.priceMinor * draws.uniform(0.85, 1.4)) / 10) * 10 : null,
    priceCurrency: hasPrice ? 'EUR' : null,
    priceMonth: hasPrice ? addMonths(month, -1) : null,
    sources: {
      ...(clamping.clampForceN === null ? {} : { clampForceN: 'estimated' as const }),
      ...(clamping.clampTorqueNm === null ? {} : { clampTorqueNm: 'metered' as const }),
      ...{ chargeLimitV: 'readOff', dischargeLimitV: 'readOff' },
    },
  };
}

function drawFirstUse(draws: Draws): string {
  const months = Math.round(longestMonths - 84 * draws.uniform(0, 1) ** 2);
  return addMonths(lastMonth, -months);
}

function drawLayout(draws: Draws, { ratedAh }: DemoCellType): { parallel: number; series: number } {
  const series = Number(draws.weighted({ '16': 0.68, '8': 0.22, '4': 0.1 }));
  const isLarge = ratedAh >= 200;
  if (ratedAh < 70) return { series, parallel: draws.int(2, 8) };
  return {
    series,
    parallel: Number(
      isLarge
        ? draws.weighted({ '1': 0.62, '2': 0.28, '3': 0.07, '4': 0.03 })
        : draws.weighted({ '1': 0.35, '2': 0.4, '3': 0.15, '4': 0.1 }),
    ),
  };
}

function drawClamping(
  draws: Draws,
  { faceAreaMm2 }: DemoCellType,
  isClamped: boolean | undefined,
): Pick<BankFields, 'clamping' | 'clampForceN' | 'clampTorqueNm'> {
  const drawn = draws.weighted({ none: 0.52, rigid: 0.33, sprung: 0.15 });
  const heldHow = drawn === 'none' ? 'rigid' : drawn;
  const clamping = isClamped === undefined ? drawn : isClamped ? heldHow : 'none';
  const pressureKPa = draws.uniform(30, 110);
  const knows = draws.weighted({ force: 0.35, torque: 0.25, nothing: 0.4 });
  const torqueNm = toStep(draws.uniform(1.5, 6), 0.5);
  const force = faceAreaMm2 === null ? null : toStep((faceAreaMm2 * pressureKPa) / 1000, 50);
  return {
    clamping,
    clampForceN: clamping !== 'none' && knows === 'force' ? force : null,
    clampTorqueNm: clamping !== 'none' && knows === 'torque' ? torqueNm : null,
  };
}

function drawLimits(draws: Draws) {
  const chargeLimitV = draws.pick([3.45, 3.5, 3.5, 3.55, 3.6]);
  const dischargeLimitV = draws.pick([2.7, 2.8, 2.8, 2.9, 3.0]);
  return { chargeLimitV, dischargeLimitV, bmsHighTripV: 3.65, bmsLowTripV: 2.5 };
}
