import type { LifeOptions, PublishedFit, Ranged } from '@/lib/fit/pooled/published';

import { planBank } from './planBank';
import type { PlanInput } from './planTypes';

export interface SizePoint {
  ratedWh: number;
  costMinorPerKwh: Ranged;
  years: Ranged;
  firstDepthFraction: number;
}

/** Sizes tried, as multiples of the smallest bank that gives the night its energy when new. */
const multiples = [1, 1.1, 1.2, 1.35, 1.5, 1.7, 1.9, 2.2, 2.5, 3, 3.6, 4.3];

/**
 * Cost per kWh delivered over bank size, all else equal: cells are priced per Wh as in the plan, other parts stay. A small
 * bank is cycled deep and ends early, a large one costs more and ends by the calendar.
 * @returns the sizes from small to large; the cheapest is the smallest estimate among them
 */
export function sizeCurve(
  fit: PublishedFit,
  input: PlanInput,
  options: Pick<LifeOptions, 'cellType'> = {},
): SizePoint[] {
  const cellsMinorPerWh = input.cellsMinor / input.ratedWh;
  const smallestWh = input.nightWh / Math.sqrt(input.roundTripFraction) / input.usableFraction;
  return multiples.map((multiple) => {
    const ratedWh = smallestWh * multiple;
    const plan = planBank(fit, { ...input, ratedWh, cellsMinor: cellsMinorPerWh * ratedWh }, options);
    return {
      ratedWh,
      costMinorPerKwh: plan.costMinorPerKwh,
      years: plan.years,
      firstDepthFraction: plan.first.depthFraction,
    };
  });
}
