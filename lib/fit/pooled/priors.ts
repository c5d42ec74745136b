import { parameterNames, type ParameterName } from './parameters';

/** Normal prior of one parameter. */
export interface Prior {
  name: ParameterName;
  mean: number;
  sd: number;
  /** Where the centre comes from; widths are judgement, meant to span published cells. */
  source: string;
}

/**
 * Default priors, one per parameter in psi's order. In the centred form of this model, Naumann 2018 and 2020
 * give A 0.0425 at half charge, aT 17.1 kJ/mol, B 0.0267 at 500 full cycles, z 0.5, and over depths of
 * 0.5-0.9 and rates of 0.1-0.8 about bD 0.17 and bC 0.17; Wang 2011 gives z 0.55 and about 31 kJ/mol.
 */
export const defaultPriors: readonly Prior[] = [
  { name: 'c0', mean: 0.02, sd: 0.02, source: 'judgement: new cells come 0-4 % above their rating' },
  {
    name: 'lnA',
    mean: Math.log(0.03),
    sd: 0.5,
    source: 'Naumann et al. 2018 (0.0425); centre set lower, judgement',
  },
  { name: 'aT', mean: 25, sd: 12, source: 'between Naumann 2018 (17 kJ/mol) and Wang 2011 (31 kJ/mol)' },
  {
    name: 'aS',
    mean: 0.8,
    sd: 0.6,
    source: 'slope of Naumann 2018 over charge levels of 0.2-0.9; judgement',
  },
  { name: 'lnB', mean: Math.log(0.025), sd: 0.6, source: 'Naumann et al. 2020 (0.0267)' },
  { name: 'z', mean: 0.55, sd: 0.15, source: 'Wang et al. 2011 (0.55), Naumann 2020 (0.5)' },
  {
    name: 'bD',
    mean: 0.4,
    sd: 0.3,
    source: 'above Naumann 2020 (0.17), towards the trade’s depth rule; judgement',
  },
  { name: 'bC', mean: 0.2, sd: 0.2, source: 'Naumann 2020 (0.17 over 0.1-0.8 It)' },
  { name: 'bT', mean: 20, sd: 15, source: 'between no dependence (Naumann 2020) and Wang 2011; judgement' },
  { name: 'bK', mean: 0, sd: 0.3, source: 'centred on zero: no benefit of clamping is assumed' },
  { name: 'ln_s', mean: Math.log(0.012), sd: 0.5, source: 'judgement: repeatability of a careful check' },
  {
    name: 'ln_sc',
    mean: Math.log(0.015),
    sd: 0.5,
    source: 'judgement: spread of new cells about their rating',
  },
  { name: 'ln_su', mean: Math.log(0.25), sd: 0.5, source: 'judgement: spread of banks of one cell type' },
  { name: 'ln_sm', mean: Math.log(0.2), sd: 0.5, source: 'judgement: spread of cell types' },
];

/** Prior of the one added term of an interaction refit. */
export const interactionPrior: Prior = {
  name: 'extra',
  mean: 0,
  sd: 0.3,
  source: 'centred on zero: no interaction is assumed',
};

/** Calendar exponents tried, with their prior weights: 0.5 in Naumann 2018, 0.8 in Stroe et al. 2016. */
export const exponentPrior: readonly { exponent: number; weight: number }[] = [
  { exponent: 0.38, weight: 0.12 },
  { exponent: 0.44, weight: 0.22 },
  { exponent: 0.5, weight: 0.32 },
  { exponent: 0.56, weight: 0.22 },
  { exponent: 0.62, weight: 0.12 },
];

/**
 * Replace single default priors by name.
 * @param changes per parameter name a mean, a sd or both
 * @throws RangeError on an unknown name, a non-finite mean or a sd that is not positive
 */
export function priorsWith(
  changes: Record<string, { mean?: number; sd?: number; source?: string }>,
): Prior[] {
  for (const name of Object.keys(changes)) {
    if (!(parameterNames as readonly string[]).includes(name)) {
      throw new RangeError(`priorsWith requires parameter names, got "${name}"`);
    }
  }
  return defaultPriors.map((prior) => {
    const change = changes[prior.name];
    if (!change) return { ...prior };
    const merged = { ...prior, source: 'given by the caller', ...change };
    if (!Number.isFinite(merged.mean) || !(merged.sd > 0) || !Number.isFinite(merged.sd)) {
      throw new RangeError(`priorsWith requires a finite mean and a positive sd for "${prior.name}"`);
    }
    return merged;
  });
}
