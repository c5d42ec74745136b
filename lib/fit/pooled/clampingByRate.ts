import type { ComponentFit } from './components';
import { heaviestOf } from './components';
import { contrastUses, type Effect } from './effects';
import { fitInteraction, type Interaction, type InteractionLever } from './interactions';
import type { Maximum } from './maximise';
import type { Prior } from './priors';
import type { PoolTable } from './table';
import { scenarioNamed } from './use';

/** What the refits with one added term give. */
export interface InteractionRefits {
  interactions: Interaction[];
  /** Clamping below and above 0.3 It: the figures that are published. */
  effects: Effect[];
}

const levers: readonly InteractionLever[] = ['rate', 'depth', 'heat'];

/**
 * Does clamping's effect depend on another stress? One refit per preset cut. The one for rate is made at every
 * exponent, since clamping is published by rate class from it; the others at the exponent that weighs most.
 */
export function refitInteractions(
  table: PoolTable,
  fits: readonly ComponentFit[],
  options: { priors: readonly Prior[]; shouldStop?: () => boolean },
): InteractionRefits | Extract<Maximum, { ok: false }> {
  const refits: InteractionRefits = { interactions: [], effects: [] };
  for (const lever of levers) {
    const result = fitInteraction(table, lever, lever === 'rate' ? fits : [heaviestOf(fits)], options);
    if (!result.ok) return result;
    refits.interactions.push(result.interaction);
    if (lever === 'rate') refits.effects = clampingByRate(result);
  }
  return refits;
}

/** Life ratio of clamping at a home rate and at a high one. */
function clampingByRate(fit: Pick<Parameters<typeof contrastUses>[0], 'components' | 'priors'>): Effect[] {
  const classes = [
    { lever: 'clampingLowRate', scenario: scenarioNamed('typical'), added: 0 },
    { lever: 'clampingHighRate', scenario: scenarioNamed('hard'), added: 1 },
  ] as const;
  return classes.map(({ lever, scenario, added }) => ({
    ...{ lever, scenario: scenario.name, from: false, to: true },
    ...contrastUses(fit, {
      from: { ...scenario, isClamped: false },
      to: { ...scenario, isClamped: true },
      ...{ addedFrom: 0, addedTo: added },
    }),
  }));
}
