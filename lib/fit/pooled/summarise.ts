import type { PoolCheck } from '../poolCheck';
import { studentTQuantile } from '../distributions';
import { fadeAtReference } from './atReference';
import { covariateBalance } from './balance';
import { heaviestOf, type ComponentFit } from './components';
import { mixMoments, mixParameters } from './mixture';
import { derive, multiply } from './derived';
import { effectsOf } from './effects';
import { bankInfluences } from './influence';
import { interactionCuts } from './interactions';
import { lifeAt } from './life';
import { matchedContrast } from './matched';
import { at, parameterNames } from './parameters';
import { poolReach, reachOf } from './reach';
import { inputReliability } from './reliability';
import { describeLimits } from './statements';
import { countsOf } from './stratified';
import { defaultScenarios, scenarioNamed } from './use';
import type { ClampingClass, FitPoolOptions, ParameterRow, PooledFit, ScreenRow } from './fitTypes';
import type { InteractionRefits } from './clampingByRate';
import type { Prior } from './priors';
import type { ScreenedFit } from './screenedFit';
import type { Exclusion } from './validate';
import type { CellTypeRow, PublishedFit } from './types';

const extraDegreesOfFreedom = 4;

/** The estimates of a pool, before they are summarised. */
export interface PoolEstimates {
  screened: ScreenedFit;
  fits: ComponentFit[];
  refits: InteractionRefits;
  priors: readonly Prior[];
  excluded: Exclusion[];
}

/** Turn the estimates of a pool into the fit that is stored and published. */
export function summarise(
  checks: readonly PoolCheck[],
  estimates: PoolEstimates,
  options: FitPoolOptions,
): PooledFit {
  const { screened, fits, refits, priors, excluded } = estimates;
  const { table } = screened;
  const used = [...table.inputRow]
    .filter((_, row) => table.inverseWeight[row]! > 0)
    .sort((a, b) => a - b)
    .map((row) => checks[row]!);
  const published: PublishedFit = {
    components: fits.map(({ component }) => component),
    priors: priors.map((prior) => ({ ...prior })),
    cellTypes: cellTypeRows(table.cellTypeKeys, fits, used),
    tQuantile: studentTQuantile(0.95, table.cellTypes + extraDegreesOfFreedom),
    reach: poolReach(used),
  };
  const { psi, covariance } = mixParameters(published.components);
  const reliability = inputReliability(used);
  const weights = published.components.map(({ exponent, weight }) => ({ exponent, weight }));
  return {
    ...{ ok: true, converged: true },
    iterations: screened.firstIterations,
    totalIterations: screened.iterations + fits.reduce((sum, { iterations }) => sum + iterations, 0),
    data: {
      ...{ rows: checks.length, used: used.length },
      ...countsOf(used),
      cellTypes: new Set(used.map((check) => check.cellType)).size,
      sha256: options.sha256 ?? null,
    },
    exponent:
      options.exponent === undefined
        ? { mode: 'mixed', weights }
        : { mode: 'fixed', value: options.exponent },
    objective: heaviestOf(fits).evaluation.objective,
    parameters: parameterRows(published, psi, covariance),
    covariance,
    ...published,
    atReference: fadeAtReference(published),
    lifetimes: (options.scenarios ?? defaultScenarios).map((use) => ({
      ...{ scenario: use.name, use },
      ...lifeAt(published, use, { cellType: options.cellType }),
    })),
    effects: [
      ...effectsOf(published, scenarioNamed('typical'), reliability),
      ...effectsOf(published, scenarioNamed('hard'), reliability),
      ...refits.effects,
    ],
    interactions: refits.interactions,
    clampingClasses: clampingClasses(used),
    screen: screenRows(checks, estimates),
    screenRounds: screened.rounds,
    excluded,
    influence: bankInfluences(table, heaviestOf(fits), priors),
    balance: covariateBalance(used),
    matched: matchedContrast(used, published),
    reliability,
    statements: [
      ...describeLimits(used, excluded),
      ...(screened.isSettled ? [] : ['The screen did not settle: its last findings are used.']),
    ],
  };
}

function parameterRows(fit: PublishedFit, psi: number[], covariance: number[][]): ParameterRow[] {
  return parameterNames.map((name, i) => ({
    name,
    estimate: psi[i]!,
    se: Math.sqrt(covariance[i]![i]!),
    priorMean: fit.priors[i]!.mean,
    priorSd: fit.priors[i]!.sd,
    priorShare: derive(fit, { kind: 'average' }, (component) => ({
      value: component.psi[i]!,
      gradient: psi.map((_, j) => (j === i ? 1 : 0)),
    })).priorShare,
  }));
}

/** Effect of each cell type mixed over exponents, with what is unknown of psi in its se. */
function cellTypeRows(
  keys: string[],
  fits: readonly ComponentFit[],
  used: readonly PoolCheck[],
): CellTypeRow[] {
  const byType = new Map<string, PoolCheck[]>(keys.map((key) => [key, []]));
  for (const check of used) byType.get(check.cellType)?.push(check);
  return keys.map((cellType, k) => {
    const { mean, variance } = mixMoments(
      fits.map(({ component }) => {
        const { m, variance: given, slope } = component.cellTypes[k]!;
        const moved = multiply(component.covariance, slope);
        const viaPsi = slope.reduce((sum, value, i) => sum + value * moved[i]!, 0);
        return { weight: component.weight, mean: m, variance: given + viaPsi };
      }),
    );
    const sm2 = fits.reduce(
      (sum, { component }) => sum + component.weight * Math.exp(2 * component.psi[at.lnSm]!),
      0,
    );
    const checks = byType.get(cellType)!;
    return {
      ...{ cellType, m: mean, se: Math.sqrt(variance) },
      ...countsOf(checks),
      checks: checks.length,
      ownShare: Math.max(0, 1 - variance / sm2),
      reach: reachOf(checks),
    };
  });
}

function clampingClasses(used: readonly PoolCheck[]): ClampingClass[] {
  const cutIt = interactionCuts.rate;
  return (['below', 'above'] as const).map((rateClass) => {
    const inside = used.filter((check) => check.dischargeIt > cutIt === (rateClass === 'above'));
    return {
      ...{ rateClass, cutIt },
      clamped: countsOf(inside.filter((check) => check.isClamped)),
      unclamped: countsOf(inside.filter((check) => !check.isClamped)),
    };
  });
}

function screenRows(checks: readonly PoolCheck[], { screened }: PoolEstimates): ScreenRow[] {
  return screened.findings
    .map(({ row, t, action }) => {
      const input = screened.table.inputRow[row]!;
      return { row: input, bank: checks[input]!.bank, t, action };
    })
    .sort((a, b) => a.row - b.row);
}
