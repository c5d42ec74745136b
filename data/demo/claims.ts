import type { DemoCellType } from './cellTypes';
import { rootOf, scenarios, trueFade, truth, type TrueUse, trueYearsTo80 } from './truth';

export type ClaimTemplate = 'held' | 'free' | 'shallow' | 'fast' | 'to70' | 'headline';

/** A quoted claim as it is stored; null where the sheet does not say. */
export interface DemoClaim {
  cycles: number;
  endOfLifeFraction: number;
  depthFraction: number | null;
  chargeIt: number | null;
  dischargeIt: number | null;
  temperatureC: number | null;
  clamping: 'clamped' | 'none' | 'notStated';
  clampForceN: number | null;
  whereItStands: string;
}

type Conditions = Omit<DemoClaim, 'cycles'>;

/** Pressure label tests hold cells at in the demo, kPa. */
const labelPressureKPa = 85;
const hoursPerYear = 8765.82;
/** Cycles of a headline without conditions. */
const headlineCycles = 6000;

const tested = (changes: Partial<Conditions> & Pick<Conditions, 'whereItStands'>): Conditions => ({
  endOfLifeFraction: 0.8,
  depthFraction: 1,
  chargeIt: 0.5,
  dischargeIt: 0.5,
  temperatureC: 25,
  clamping: 'none',
  clampForceN: null,
  ...changes,
});

const templates: Record<ClaimTemplate, Conditions> = {
  held: tested({ clamping: 'clamped', whereItStands: 'data sheet, cycle life, held in a fixture' }),
  free: tested({ whereItStands: 'data sheet, cycle life, free-standing' }),
  shallow: tested({
    ...{ depthFraction: 0.8, clamping: 'notStated' },
    whereItStands: 'data sheet, cycle life at 80 % depth',
  }),
  fast: tested({
    ...{ chargeIt: 1, dischargeIt: 1, clamping: 'clamped' },
    whereItStands: 'data sheet, cycle life at 1 It',
  }),
  to70: tested({
    ...{ endOfLifeFraction: 0.7, clamping: 'clamped' },
    whereItStands: 'data sheet, end of life at 70 %',
  }),
  headline: {
    endOfLifeFraction: 0.8,
    ...{ depthFraction: null, chargeIt: null, dischargeIt: null, temperatureC: null },
    ...{ clamping: 'notStated', clampForceN: null },
    whereItStands: "maker's product page, headline",
  },
};

/**
 * The claims of a cell type. The number of cycles is worked back from the truth, so that the life the claim implies
 * at the standard use is the cell type's true life there divided by its labelRatio; then rounded as makers do.
 */
export function claimsOf(cellType: DemoCellType): DemoClaim[] {
  return cellType.claims.map((template) => {
    const conditions = templates[template];
    const isHeld = conditions.clamping === 'clamped' && cellType.faceAreaMm2 !== null;
    return {
      ...conditions,
      clampForceN: isHeld ? Math.round((cellType.faceAreaMm2! * labelPressureKPa) / 1e5) * 100 : null,
      cycles: conditions.depthFraction === null ? headlineCycles : roundedCycles(cellType, conditions),
    };
  });
}

function roundedCycles(cellType: DemoCellType, conditions: Conditions): number {
  const cycles = claimedCycles(
    conditions,
    trueYearsTo80(scenarios.standard, cellType.effect) / cellType.labelRatio,
  );
  return Math.round(cycles / 100) * 100;
}

/** The cycles a claim must state for its label to imply a life (years to 80 % at the standard use). */
function claimedCycles(conditions: Conditions, impliedYears: number): number {
  const { standard } = scenarios;
  const lost = (share: number) => 1 - share / Math.exp(truth.c0);
  const kappa = lost(0.8) / trueFade(standard, impliedYears, standard.efcPerYear * impliedYears);
  const missing = (cycles: number) =>
    kappa * claimedFade(conditions, cycles) - lost(conditions.endOfLifeFraction);
  return rootOf(missing, 10, 100_000);
}

/** Fade of the truth's average cell type in a label test; the test lasts as long as its own currents make it. */
export function claimedFade(conditions: Omit<DemoClaim, 'cycles' | 'whereItStands'>, cycles: number): number {
  const { depthFraction, chargeIt, dischargeIt, temperatureC } = conditions;
  if (depthFraction === null || chargeIt === null || dischargeIt === null || temperatureC === null)
    throw new RangeError('claimedFade requires a claim with conditions');
  const lived: TrueUse = {
    ...{ depthFraction, dischargeIt, temperatureC, socMeanFraction: 0.5 },
    isClamped: conditions.clamping === 'clamped',
  };
  const years = (cycles * (depthFraction / chargeIt + depthFraction / dischargeIt)) / hoursPerYear;
  return trueFade(lived, years, cycles * depthFraction);
}
