import { type CurvePoint, type Estimate, type Life, standardUse } from '@/lib/contract/cells';
import { type CurveFit, efcPerYearOf, lifeAtUse, statusAt } from '@/lib/fit';

const standardEfcPerYear = efcPerYearOf(standardUse);

/** A band's single curve as a life at the standard number of full cycles a year. */
export function presentBandLife(curve: CurveFit): Life {
  const { years, efc, reachYears, status } = lifeAtUse(curve, standardEfcPerYear);
  const reachEfc = reachYears * standardEfcPerYear;
  return {
    ...{ status, years, efc, reachYears, reachEfc },
    ...{ rangeOfBanks: null, rangeOfBanksEfc: null, priorShareFraction: null, ownShareFraction: null },
    leftAtReachFraction: capacityAt(curve, reachEfc),
    basis: 'band',
    support: 'shown',
    outside: [],
  };
}

/** The curve to three times the reach, with points at the reach and at twice it, where the line changes. */
export function presentBandCurve(curve: CurveFit): CurvePoint[] {
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
