import {
  type Absence,
  type CurvePoint,
  type Estimate,
  type FadeView,
  standardUse,
} from '@/lib/contract/cells';
import { type CurveFit, type CurveRefusalReason, lifeAtUse, statusAt } from '@/lib/fit';

import type { View } from './fitOutput';

/** Days of the mean Gregorian year. */
const daysPerYear = 365.2425;
/** Full cycles a year at the use every entry is stated at. */
export const standardEfcPerYear = standardUse.depthFraction * standardUse.cyclesPerDay * daysPerYear;

const absences: Record<CurveRefusalReason, Absence> = {
  tooFewOwners: 'tooFewOwners',
  protectsOthers: 'tooFewOwners',
  tooFewChecks: 'tooFewChecks',
  tooLittleSpread: 'tooFewChecks',
  noFade: 'notConverged',
  notConverged: 'notConverged',
};

/** A view of a fit as pages show it, at the standard use; undefined where the fit has none. */
export function presentView(view: View | undefined, hasFit: boolean): FadeView {
  if (!view || !hasFit) return { ...nothing, absence: hasFit ? 'tooFewOwners' : 'noFit' };
  const dots = view.dots.map(([years, efc, sohFraction]) => ({ years, efc, sohFraction }));
  const { evidence, result } = view;
  if (!result.ok) return { evidence, life: null, absence: absences[result.reason], curve: [], dots };
  return { evidence, life: presentLife(result), absence: null, curve: presentCurve(result), dots };
}

const nothing = { evidence: null, life: null, curve: [], dots: [] };

/** Capacity left at reach first; years and EFC to 80 % as far as the reach supports a figure. */
export function presentLife(curve: CurveFit): NonNullable<FadeView['life']> {
  const { years, efc, reachYears, status } = lifeAtUse(curve, standardEfcPerYear);
  const reachEfc = reachYears * standardEfcPerYear;
  const isTold = status !== 'beyond';
  return {
    status,
    years: isTold ? years : null,
    efc: isTold ? efc : null,
    leftAtReachFraction: capacityAt(curve, reachEfc),
    reachYears,
    reachEfc,
  };
}

/** The curve to three times the reach, with points at the reach and at twice it, where the line changes. */
function presentCurve(curve: CurveFit): CurvePoint[] {
  const { reachYears } = lifeAtUse(curve, standardEfcPerYear);
  const reachEfc = reachYears * standardEfcPerYear;
  const turns = [reachEfc, 2 * reachEfc, 3 * reachEfc];
  const grid = curve.points.map(({ efc }) => efc).filter((efc) => isApart(efc, turns) && efc < 3 * reachEfc);
  return [...grid, ...turns]
    .sort((a, b) => a - b)
    .map((efc) => {
      const { estimate, lower, upper } = capacityAt(curve, efc);
      const turn = turns.find((edge) => efc <= edge)!;
      const years = efc / standardEfcPerYear;
      return { efc, years, sohFraction: estimate, lower, upper, status: statusAt(turn, reachEfc) };
    });
}

const isApart = (efc: number, turns: number[]) => turns.every((turn) => Math.abs(efc - turn) > 1e-6 * turn);

/** Straight between the points of the curve; at most its last one. */
function capacityAt({ points }: CurveFit, efc: number): Estimate {
  const next = points.findIndex((point) => point.efc >= efc);
  const upperPoint = points[next === -1 ? points.length - 1 : next]!;
  const lowerPoint = points[Math.max(next - 1, 0)]!;
  const span = upperPoint.efc - lowerPoint.efc;
  const share = span > 0 && next > 0 ? (efc - lowerPoint.efc) / span : 1;
  const between = (a: number, b: number) => a + share * (b - a);
  return {
    estimate: between(lowerPoint.capacityFraction, upperPoint.capacityFraction),
    lower: between(lowerPoint.lower, upperPoint.lower),
    upper: between(lowerPoint.upper, upperPoint.upper),
  };
}
