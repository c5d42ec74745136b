import { efcPerYearOf, fitUse, type HomeUse, type LifeFigure } from './figures';
import { labelAtYourUse, type LabelClaim } from './label';
import type { PublishedFit, Ranged } from './types';

/** A claim as the catalogue keeps it; null where the sheet is silent. */
export interface CataloguedClaim {
  cycles: number;
  endOfLifeFraction: number;
  depthFraction: number | null;
  chargeIt: number | null;
  dischargeIt: number | null;
  temperatureC: number | null;
  clamping: 'clamped' | 'none' | 'notStated';
}

/** What a claim implies at a use, in years and EFC, and how much of it is measured there. */
export interface ClaimFigure {
  label: { impliedYears: Ranged; impliedEfc: Ranged; ratio: Ranged | null } | null;
  labelAbsence: 'conditionsNotStated' | 'cannotBeMet' | null;
}

/**
 * A catalogued claim at a use, beside the life of its cell type there. A ratio is given only for a life that is the
 * cell type's own, where the pool reaches the use and measures enough.
 */
export function claimFigureAt(
  fit: PublishedFit,
  claim: CataloguedClaim,
  use: HomeUse,
  of: { cellType: string; life: Pick<LifeFigure, 'basis' | 'support' | 'outside'> },
): ClaimFigure {
  const { cycles, endOfLifeFraction, depthFraction, chargeIt, dischargeIt, temperatureC, clamping } = claim;
  if (depthFraction === null) return { label: null, labelAbsence: 'conditionsNotStated' };
  const asked: LabelClaim = {
    ...{ cycles, depthFraction, chargeIt, dischargeIt, temperatureC, endShare: endOfLifeFraction },
    isClamped: clamping === 'notStated' ? null : clamping === 'clamped',
  };
  const isOwn = of.life.basis === 'cellType';
  const answer = labelAtYourUse(fit, asked, fitUse(use), isOwn ? { cellType: of.cellType } : {});
  if (!answer.ok) {
    const isSilent = answer.reason === 'conditions not stated';
    return { label: null, labelAbsence: isSilent ? 'conditionsNotStated' : 'cannotBeMet' };
  }
  const { estimate, lower, upper } = answer.impliedYears;
  const perYear = efcPerYearOf(use);
  const isTold = isOwn && of.life.support !== 'notMeasured' && of.life.outside.length === 0;
  return {
    label: {
      impliedYears: answer.impliedYears,
      impliedEfc: { estimate: estimate * perYear, lower: lower * perYear, upper: upper * perYear },
      ratio: isTold ? answer.ratio : null,
    },
    labelAbsence: null,
  };
}
