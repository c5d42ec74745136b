import { fitComponents, type ComponentFit } from './components';
import { mixMoments, type FitComponent } from './mixture';
import type { Maximum } from './maximise';
import { at } from './parameters';
import { interactionPrior, type Prior } from './priors';
import { withExtra, type PoolTable } from './table';

export type InteractionLever = 'rate' | 'depth' | 'heat';

/** Whether clamping's effect on the cycling fade differs above a cut of another stress. */
export interface Interaction {
  lever: InteractionLever;
  /** It, fraction of the rating, or °C. */
  cut: number;
  /** Added ln of the cycling fade of a clamped bank above the cut. */
  estimate: number;
  se: number;
  /** |estimate| > 2 se. */
  isShown: boolean;
  banksAbove: { clamped: number; unclamped: number };
}

/** Preset cuts, not chosen from the data. */
export const interactionCuts: Record<InteractionLever, number> = { rate: 0.3, depth: 0.7, heat: 25 };

/** Value of each lever for a row of the table, in its own unit's order (ln or tau keep the order). */
const isAbove: Record<InteractionLever, (table: PoolTable, row: number) => boolean> = {
  rate: (table, row) => 0.2 * Math.exp(table.lnRate[row]!) > interactionCuts.rate + 1e-9,
  depth: (table, row) => 0.5 * Math.exp(table.lnDepth[row]!) > interactionCuts.depth + 1e-9,
  heat: (table, row) => table.tau[row]! > 1e-12,
};

export type InteractionResult =
  | { ok: true; interaction: Interaction; components: FitComponent[]; priors: Prior[] }
  | Extract<Maximum, { ok: false }>;

/**
 * Refit with one added term, clamped x (condition above its cut), in ln of the cycling fade (README equation 26).
 * @param from fits to start from; as many exponents are refitted as are given
 */
export function fitInteraction(
  table: PoolTable,
  lever: InteractionLever,
  from: readonly ComponentFit[],
  options: { priors: readonly Prior[]; shouldStop?: () => boolean },
): InteractionResult {
  const above = (row: number) => isAbove[lever](table, row);
  const extended = withExtra(table, (row) => (table.clamped[row]! > 0 && above(row) ? 1 : 0));
  const priors = [...options.priors, interactionPrior];
  const components: FitComponent[] = [];
  const objectives: number[] = [];
  for (const start of from) {
    const result = fitComponents(extended, {
      priors,
      exponent: start.component.exponent,
      start: { psi: [...start.evaluation.psi, 0], centres: start.centres },
      shouldStop: options.shouldStop,
    });
    if (!result.ok) return result;
    components.push(result.fits[0]!.component);
    // The exponent's prior weight is in the main fit's weight; the objectives' gains are added to it.
    objectives.push(
      Math.log(Math.max(start.component.weight, 1e-300)) +
        result.fits[0]!.evaluation.objective -
        start.evaluation.objective,
    );
  }
  const best = Math.max(...objectives);
  const raw = objectives.map((value) => Math.exp(value - best));
  const total = raw.reduce((sum, value) => sum + value, 0);
  components.forEach((component, i) => (component.weight = raw[i]! / total));
  const { mean, variance } = mixMoments(
    components.map(({ weight, psi, covariance }) => ({
      weight,
      mean: psi[at.extra]!,
      variance: covariance[at.extra * psi.length + at.extra]!,
    })),
  );
  const se = Math.sqrt(variance);
  const interaction: Interaction = {
    ...{ lever, cut: interactionCuts[lever], estimate: mean, se },
    isShown: Math.abs(mean) > 2 * se,
    banksAbove: countAbove(table, above),
  };
  return { ok: true, interaction, components, priors };
}

function countAbove(
  table: PoolTable,
  above: (row: number) => boolean,
): { clamped: number; unclamped: number } {
  const count = { clamped: 0, unclamped: 0 };
  for (let bank = 0; bank < table.banks; bank++) {
    const row = table.bankStart[bank + 1]! - 1;
    if (!above(row)) continue;
    if (table.clamped[row]! > 0) count.clamped++;
    else count.unclamped++;
  }
  return count;
}
