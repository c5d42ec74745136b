import type { WhatIfLever } from '@/lib/contract/standing';
import { type PublishedFit, type Use, checkUse } from '@/lib/fit';
import type { PoolCheck } from '@/lib/fit/poolCheck';

// A slip of the counter must not ask for a use that no bank can have.
const mostEfcPerYear = 2 * 365;

/** How the bank was used up to its last check. */
export function ownUse(last: PoolCheck): Use {
  const use = checkUse(last);
  return { ...use, efcPerYear: Math.min(use.efcPerYear, mostEfcPerYear) };
}

const steps = [
  { condition: 'depthFraction', step: 0.05 },
  { condition: 'temperatureC', step: 1 },
  { condition: 'socMeanFraction', step: 0.05 },
  { condition: 'dischargeIt', step: 0.05 },
] as const satisfies Pick<WhatIfLever, 'condition' | 'step'>[];

/** What can be tried, in round steps within the middle 95 % of the pool's banks. */
export function leversOf(fit: PublishedFit, use: Use): WhatIfLever[] {
  return steps.flatMap(({ condition, step }) => {
    const reached = fit.reach.conditions.find((one) => one.condition === condition);
    if (!reached) return [];
    const round = (value: number) => Number((value * step).toFixed(3));
    const [min, max] = [
      round(Math.ceil(reached.from / step - 1e-9)),
      round(Math.floor(reached.to / step + 1e-9)),
    ];
    return min < max ? [{ condition, step, min, max, value: use[condition] }] : [];
  });
}
