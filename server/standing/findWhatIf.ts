import type { z } from 'zod';

import type { Lever, LeverEffect } from '@/lib/contract/effects';
import { minimumOwners } from '@/lib/contract/limits';
import type { WhatIfAnswer, whatIfQuerySchema } from '@/lib/contract/standing';
import {
  contrastUses,
  type InputReliability,
  outsideOf,
  type PublishedFit,
  stretchOf,
  type Use,
} from '@/lib/fit';

import type { LoadedBank } from '../banks/queries';
import type { Deps } from '../deps';
import { AppError } from '../errors';
import { findCurrentFit } from '../fits/currentFit';
import { joinEffects, presentContrast } from '../fits/presentEffects';
import { findWorkingPool } from '../moderation/workingPool';
import { findOwnRows } from './findOwnRows';
import { ownUse } from './ownUse';

type Tried = z.output<typeof whatIfQuerySchema>;

const leverOf = {
  temperatureC: 'heat',
  depthFraction: 'depth',
  socMeanFraction: 'chargeLevel',
  dischargeIt: 'rate',
} as const satisfies Partial<Record<keyof Use, Lever>>;
const conditions = Object.keys(leverOf) as (keyof typeof leverOf)[];
/** Clamping is told in two rate classes. */
const rateCutIt = 0.3;

/**
 * What other uses would do to a whole life of the bank, by the pool's measured effects: each by itself from the bank's
 * own use, and all together.
 * @throws AppError conflict while there is nothing to start from
 */
export async function findWhatIf(deps: Deps, bank: LoadedBank, tried: Tried): Promise<WhatIfAnswer> {
  const [working, pool] = await Promise.all([findCurrentFit(deps, 'working'), findWorkingPool(deps)]);
  const { rows } = await findOwnRows(bank, pool?.setAside ?? new Set());
  const last = rows.at(-1);
  if (!last || !working || !pool || working.output.pool.evidence.owners < minimumOwners)
    throw new AppError(
      'conflict',
      'There is nothing to compare with yet: it takes an approved check and a fitted pool.',
    );
  const { model, effects } = working.output;
  const use = ownUse(last);
  const changed = conditions.filter((key) => tried[key] !== undefined && tried[key] !== use[key]);
  const to: Use = { ...use };
  for (const key of changed) to[key] = tried[key]!;
  const isClampingTried = tried.isClamped !== undefined && tried.isClamped !== use.isClamped;
  const outside = outsideOf(model.reach, {
    ...to,
    isClamped: isClampingTried ? !use.isClamped : use.isClamped,
  });
  if (outside.length > 0) return { effects: [], together: null, outside };
  const singles = changed.map((key) =>
    contrastOf(model, pool.reliability, { use, to: { ...use, [key]: to[key] }, keys: [key] }),
  );
  const clamping = isClampingTried ? [clampingEffect(effects, use)] : [];
  const all = changed.length > 0 ? [contrastOf(model, pool.reliability, { use, to, keys: changed })] : [];
  return {
    effects: [...singles, ...clamping.filter((effect) => effect !== null)],
    together: clamping.includes(null)
      ? null
      : joinEffects([...all, ...clamping.filter((effect) => effect !== null)]),
    outside: [],
  };
}

interface Change {
  use: Use;
  to: Use;
  keys: readonly (keyof typeof leverOf)[];
}

/**
 * Guessed temperatures and charge levels hide a part of their effects: the range is stretched by what they may hide, as
 * for the pool's; of several changes at once by the sum of it.
 */
function contrastOf(
  model: PublishedFit,
  reliability: InputReliability,
  { use, to, keys }: Change,
): LeverEffect {
  const [key] = keys;
  const ends = { lever: leverOf[key!], from: use[key!], to: to[key!] };
  const lnOf = (target: Use) => Math.log(contrastUses(model, { from: use, to: target }).lifeRatio);
  const hidden = keys.reduce((sum, one) => {
    const stretch = stretchOfCondition(reliability, one);
    return stretch > 0 ? sum + stretch * Math.abs(lnOf({ ...use, [one]: to[one] })) : sum;
  }, 0);
  const whole = Math.abs(lnOf(to));
  return presentContrast(ends, contrastUses(model, { from: use, to }, whole > 0 ? hidden / whole : 0));
}

function stretchOfCondition({ temperature, soc }: InputReliability, key: keyof typeof leverOf): number {
  if (key === 'temperatureC') return stretchOf(temperature);
  return key === 'socMeanFraction' ? stretchOf(soc) : 0;
}

/** The pool's effect in the bank's class of rates, turned round where the bank is clamped; null where it has none. */
function clampingEffect(
  effects: readonly LeverEffect[],
  { isClamped, dischargeIt }: Use,
): LeverEffect | null {
  const lever = dischargeIt > rateCutIt ? 'clampingHighRate' : 'clampingLowRate';
  const effect = effects.find((one) => one.lever === lever);
  if (!effect) return null;
  if (!isClamped) return effect;
  const { estimate, lower, upper } = effect.ratio;
  return {
    ...{ ...effect, from: true, to: false },
    ratio: { estimate: 1 / estimate, lower: 1 / upper, upper: 1 / lower },
  };
}
