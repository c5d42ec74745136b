/**
 * Are the intervals honest? Simulated pools (seeded) of 300 banks, default fit: bias, RMSE and coverage of 90 %
 * intervals of every effect and life, and of new checks. Also pools with the truth off the priors, with noisy inputs,
 * and with the calendar exponent off. npm run bench:calibrate [-- scale], scale 1 = 200 + 50 + 50 + 50 pools.
 */
import { fitPool } from '../../lib/fit/pooled/fitPool';
import { lnLife } from '../../lib/fit/pooled/fade';
import { leverMoves } from '../../lib/fit/pooled/effects';
import { predictNewCheck } from '../../lib/fit/pooled/newCheck';
import { at } from '../../lib/fit/pooled/parameters';
import { scenarioNamed, type Use } from '../../lib/fit/pooled/use';
import { table } from '../fit/table';
import { createDice } from './dice';
import { drawTruth, simulatePool, truthOffPriors, type PoolTruth } from './simulatePool';

const banks = 300;
const newBanksPerPool = 40;
const scale = Number(process.argv[2] ?? 1);
const uses = ['mild', 'typical', 'hard', 'hard_clamped'].map(scenarioNamed);

interface Score {
  n: number;
  sum: number;
  squares: number;
  covered: number;
}

const setups: {
  name: string;
  pools: number;
  truth: (seed: number) => PoolTruth;
  hasNoisyInputs?: boolean;
}[] = [
  { name: 'truth around the priors', pools: 200, truth: (seed) => drawTruth(seed, 0.5) },
  {
    name: 'truth 2 prior sd off in z, bD, bC, bT, bK',
    pools: 50,
    truth: (seed) => truthOffPriors(seed, [at.z, at.bD, at.bC, at.bT, at.bK]),
  },
  {
    name: 'noisy inputs, all estimated',
    pools: 50,
    truth: (seed) => drawTruth(seed, 0.5),
    hasNoisyInputs: true,
  },
  { name: 'calendar exponent 0.5 ± 0.08', pools: 50, truth: (seed) => drawTruth(seed, 0.5, 0.08) },
];

setups.forEach((setup, s) => {
  const scores = new Map<string, Score>();
  const pools = Math.max(1, Math.round(setup.pools * scale));
  let unconverged = 0;
  const started = performance.now();
  for (let pool = 0; pool < pools; pool++) {
    const seed = 100_000 * (s + 1) + pool;
    const truth = setup.truth(seed);
    const { checks } = simulatePool({
      banks,
      seed: seed + 50_000,
      truth,
      hasNoisyInputs: setup.hasNoisyInputs,
    });
    const fit = fitPool(checks);
    if (!fit.ok) {
      unconverged++;
      continue;
    }
    for (const effect of fit.effects) {
      score(scores, `${effect.lever} (${effect.scenario})`, trueLnRatio(truth, effect), effect);
    }
    for (const use of uses) {
      const life = fit.lifetimes.find((one) => one.scenario === use.name)!;
      score(scores, `T80 ${use.name}`, trueLnLife(truth, use), {
        lifeRatio: life.years.estimate,
        ...life.years,
      });
    }
    scoreNewChecks(scores, fit, truth, seed + 70_000);
  }
  const seconds = (performance.now() - started) / 1000;
  console.log(
    `\n${setup.name}: ${pools - unconverged} of ${pools} converged, ${(seconds / pools).toFixed(2)} s each`,
  );
  console.log(
    table(
      ['quantity (ln)', 'bias', 'rmse', 'coverage of 90 %'],
      [...scores].map(([name, { n, sum, squares, covered }]) => [
        name,
        (sum / n).toFixed(3),
        Math.sqrt(squares / n).toFixed(3),
        `${((100 * covered) / n).toFixed(1)} %`,
      ]),
    ),
  );
});

function trueLnLife({ psi, exponent }: PoolTruth, use: Use): number {
  return lnLife({ psi, exponent }, use).lnYears;
}

function trueLnRatio(truth: PoolTruth, effect: { lever: string; scenario: string }): number {
  const use = scenarioNamed(effect.scenario);
  const move = (change: (end: 'from' | 'to') => Partial<Use>) =>
    trueLnLife(truth, { ...use, ...change('to') }) - trueLnLife(truth, { ...use, ...change('from') });
  switch (effect.lever) {
    case 'depth':
      return move((end) => ({ depthFraction: leverMoves.depth[end] }));
    case 'rate':
      return move((end) => ({ dischargeIt: leverMoves.rate[end] }));
    case 'heat':
      return move((end) => ({ temperatureC: leverMoves.heat[end] }));
    case 'chargeLevel':
      return move((end) => ({ socMeanFraction: leverMoves.chargeLevel[end] }));
    default:
      return move((end) => ({ isClamped: end === 'to' }));
  }
}

function score(
  scores: Map<string, Score>,
  name: string,
  truth: number,
  { lifeRatio, lower, upper }: { lifeRatio: number; lower: number; upper: number },
): void {
  const known = scores.get(name) ?? { n: 0, sum: 0, squares: 0, covered: 0 };
  const error = Math.log(lifeRatio) - truth;
  known.n++;
  known.sum += error;
  known.squares += error * error;
  if (Math.log(lower) <= truth && truth <= Math.log(upper)) known.covered++;
  scores.set(name, known);
}

/** One further check of banks the fit has never seen, of new cell types, at their first age. */
function scoreNewChecks(
  scores: Map<string, Score>,
  fit: Parameters<typeof predictNewCheck>[0],
  truth: PoolTruth,
  seed: number,
): void {
  const dice = createDice(seed);
  const fresh = simulatePool({ banks: newBanksPerPool, seed, truth, cellTypes: newBanksPerPool });
  const byBank = new Map(fresh.checks.map((check) => [check.bank, check]));
  for (const check of byBank.values()) {
    if (dice.uniform() < 0.5) continue;
    const use: Use = { ...check, efcPerYear: check.efc / check.ageYears };
    const { estimate, lower, upper } = predictNewCheck(fit, use, check.ageYears, check.relSd);
    score(scores, 'new check', Math.log(check.capacityAh / check.ratedAh), {
      lifeRatio: estimate,
      lower,
      upper,
    });
  }
}
