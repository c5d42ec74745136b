import { useDeferredValue, useMemo } from 'react';

import type { PublishedFit } from '@/lib/fit/pooled/published';
import { planBank, type PlanResult } from '@/lib/plan';

import { averageCell, planSchema, type PlanChoices, type PlanText } from './planForm';

export interface ReadyPlan {
  choices: PlanChoices;
  /** Undefined for the pool's average. */
  cellType: string | undefined;
  plan: PlanResult;
  /** The cell type chosen has no figure of its own: the average stands in. */
  isStandIn: boolean;
}

/** Computes a plan from what is typed; null while something can't be read. */
export function usePlan(fit: PublishedFit, text: PlanText): ReadyPlan | null {
  // Typing comes first; the figures follow a moment later.
  const read = useDeferredValue(text);
  return useMemo(() => {
    const parsed = planSchema.safeParse(read);
    if (!parsed.success) return null;
    const choices = parsed.data;
    const isKnown = fit.cellTypes.some(({ cellType }) => cellType === choices.cell);
    const cellType = isKnown ? choices.cell : undefined;
    const plan = planBank(fit, choices.input, { cellType });
    return { choices, cellType, plan, isStandIn: choices.cell !== averageCell && !isKnown };
  }, [fit, read]);
}
