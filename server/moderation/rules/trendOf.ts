import { daysBetween, formatDate, formatPercent } from '@/lib/units';

import type { ScreenContext, ScreenPrevious } from '../screenTypes';
import { comparableBefore, ratioRelSd } from './history';
import { likelySlip } from './scale';

/** k = 2: 95 % coverage, JCGM 100:2008, 6.2.1. */
const coverageFactor = 2;

export interface Trend {
  before: ScreenPrevious;
  /** Relative change since the earlier check, -0.05 = 5 % down. */
  changeFraction: number;
  /** Half width at 95 % of that change. */
  expandedFraction: number;
  years: number;
  /** "96.1 % on 2 Nov 2025, 94.0 % now, known to 2.4 %" */
  figures: string;
}

/** This check against the one before; null without one, or where the figure has a slip of scale to mend first. */
export function trendOf(context: ScreenContext): Trend | null {
  const before = comparableBefore(context);
  if (!before || likelySlip(context)) return null;
  const now = context.computed.sohFraction;
  const then = before.computed.sohFraction;
  const expandedFraction = coverageFactor * ratioRelSd(context, before);
  return {
    before,
    changeFraction: now / then - 1,
    expandedFraction,
    years: daysBetween(before.testedOn, context.fields.reading.testedOn) / 365.2425,
    figures: `${formatPercent(then, 1)} on ${formatDate(before.testedOn)}, ${formatPercent(now, 1)} now; the change is known to ±${formatPercent(expandedFraction, 1)}`,
  };
}
