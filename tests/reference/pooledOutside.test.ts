import { fadePoint, lnLife } from '@/lib/fit/pooled/fade';
import { fitPool } from '@/lib/fit/pooled/fitPool';
import { fadeAt } from '@/lib/fit/pooled/life';
import { hermiteRule } from '@/lib/fit/pooled/hermite';
import { at } from '@/lib/fit/pooled/parameters';
import { defaultPriors } from '@/lib/fit/pooled/priors';
import { scenarioNamed } from '@/lib/fit/pooled/use';
import type { PoolCheck } from '@/lib/fit/poolCheck';
import { naumannCalendarLoss, naumannCycleLoss } from '@/lib/fit/published/naumann';
import { createDice } from '@/scripts/bench/dice';
import { drawUse } from '@/scripts/bench/simulatePool';
import { readReferenceJson } from '../support/reference';

const typical = scenarioNamed('typical');

describe('the priors alone against the trade’s rules', () => {
  // Common practice, no source: 1,500 cycles at 1 It and full depth, 2,000 at half the rate, 3,000 at 80 %, 4,800 at 60 %.
  const psi = defaultPriors.map(({ mean }, i) => (i === at.lnA ? -60 : mean));
  const efcToEnd = (depthFraction: number, dischargeIt: number) =>
    Math.exp(lnLife({ psi, exponent: 0.5 }, { ...typical, depthFraction, dischargeIt }).lnYears) *
    typical.efcPerYear;

  it('gives 1.44 times the full cycles at 60 % depth, within 15 %', () => {
    const rule = (4800 * 0.6) / 2000;
    expect(Math.abs(efcToEnd(0.6, 0.5) / efcToEnd(1, 0.5) / rule - 1)).toBeLessThan(0.15);
  });

  it('gives 4/3 of the full cycles at half the rate, within 15 %', () => {
    expect(Math.abs(efcToEnd(1, 0.5) / efcToEnd(1, 1) / (2000 / 1500) - 1)).toBeLessThan(0.15);
  });
});

describe('the priors in the terms of published studies', () => {
  // Naumann et al. 2018, 2020, by their equations: what the sources beside the default priors claim.
  it('has Naumann’s A and B within one prior sd of the centres', () => {
    const within = (place: number, value: number) =>
      Math.abs(value - defaultPriors[place]!.mean) / defaultPriors[place]!.sd;
    const calendar = naumannCalendarLoss({ temperatureC: 25, socFraction: 0.5, years: 1 });
    const cycling = naumannCycleLoss(0.2, 0.5, 500);
    expect(calendar).toBeCloseTo(0.0425, 3);
    expect(cycling).toBeCloseTo(0.0267, 3);
    expect(within(at.lnA, Math.log(calendar))).toBeLessThan(1);
    expect(within(at.lnB, Math.log(cycling))).toBeLessThan(1);
  });
});

describe('a pool made from Naumann’s equations', () => {
  // Not our model: a cubic in charge level, a depth term of its own, no heat in cycling. Losses at 25 °C must come back.
  const dice = createDice(2020);
  const checks: PoolCheck[] = [];
  // Evenly spread and centred, so that the published curve is that of the average cell type.
  const cellTypes = Array.from({ length: 8 }, (_, k) => 0.07 * (k - 3.5));
  for (let bank = 0; bank < 250; bank++) {
    const use = drawUse(dice);
    const cellType = bank % cellTypes.length;
    const pace = Math.exp(cellTypes[cellType]! + 0.2 * dice.normal());
    const start = 0.015 * dice.normal();
    for (let years = 0.7 + 0.6 * dice.uniform(), n = 0; n < 1 + (bank % 7); n++, years++) {
      const loss =
        naumannCalendarLoss({ temperatureC: use.temperatureC, socFraction: use.socMeanFraction, years }) +
        naumannCycleLoss(use.dischargeIt, use.depthFraction, use.efcPerYear * years);
      const share = (1 - pace * loss) * Math.exp(start + 0.012 * dice.normal());
      checks.push({
        ...{ bank: `B${bank}`, owner: `O${bank}`, cellType: `T${cellType}`, ratedAh: 280, relSd: 0.012 },
        ...{ isClamped: use.isClamped, depthFraction: use.depthFraction, dischargeIt: use.dischargeIt },
        ...{ temperatureC: use.temperatureC, socMeanFraction: use.socMeanFraction },
        ...{ ageYears: years, efc: use.efcPerYear * years, capacityAh: 280 * share },
      });
    }
  }
  const fit = fitPool(checks);
  if (!fit.ok) throw new Error(fit.reason);

  it.each([
    [0.5, 0.2, 0.5, 120, 3],
    [0.5, 0.2, 0.5, 120, 6],
    [0.7, 0.2, 0.6, 180, 5],
    [0.8, 0.3, 0.6, 200, 6],
    [0.4, 0.15, 0.5, 100, 6],
  ])(
    'depth %d, %d It, charge level %d, %d full cycles a year, %d years',
    (depth, rate, soc, efcPerYear, years) => {
      const use = {
        ...{ depthFraction: depth, dischargeIt: rate, socMeanFraction: soc, efcPerYear },
        ...{ temperatureC: 25, isClamped: false },
      };
      const published =
        naumannCalendarLoss({ temperatureC: 25, socFraction: soc, years }) +
        naumannCycleLoss(rate, depth, efcPerYear * years);
      const { lower, upper } = fadeAt(fit, use, years);
      expect(published).toBeGreaterThan(lower);
      expect(published).toBeLessThan(upper);
      expect(upper / lower).toBeLessThan(1.6);
    },
  );

  it('shows no effect of clamping where there is none', () => {
    for (const effect of fit.effects.filter(({ lever }) => lever.startsWith('clamping'))) {
      expect(['could be none', 'too small to matter']).toContain(effect.verdict);
    }
  });

  it('has a life in which calendar and cycles both count', () => {
    const share = fadePoint({ psi: fit.components[2]!.psi, exponent: 0.5 }, typical, 8).calendarShare;
    expect(share).toBeGreaterThan(0.4);
    expect(share).toBeLessThan(0.95);
  });
});

describe('the quadrature against an exact marginal likelihood', () => {
  // The engine can't express a linear random slope or intercept model (its mean is c0 + ln(1 - q)), so it is not put to
  // sleepstudy; its quadrature is put to Orange, whose random asymptote makes the marginal likelihood exact.
  interface Orange {
    data: { Tree: string[]; age: number[]; circumference: number[] };
    exact_ML: {
      fixed: { Asym: number; xmid: number; scal: number };
      tau: number;
      sigma: number;
      logLik: number;
    };
  }
  const { Orange: orange } = readReferenceJson<{ Orange: Orange }>('mixed_models.json');

  it('integrates the trees’ asymptotes to the exact log-likelihood, 9 nodes at the mode', () => {
    const { fixed, tau, sigma, logLik } = orange.exact_ML;
    const rule = hermiteRule(9);
    let total = 0;
    for (const tree of new Set(orange.data.Tree)) {
      const rows = [...orange.data.Tree.keys()].filter((i) => orange.data.Tree[i] === tree);
      const shape = (i: number) => 1 / (1 + Math.exp((fixed.xmid - orange.data.age[i]!) / fixed.scal));
      const lnJoint = (b: number) =>
        rows.reduce(
          (sum, i) =>
            sum -
            0.5 * ((orange.data.circumference[i]! - (fixed.Asym + b) * shape(i)) / sigma) ** 2 -
            Math.log(sigma * Math.sqrt(2 * Math.PI)),
          -0.5 * (b / tau) ** 2 - Math.log(tau * Math.sqrt(2 * Math.PI)),
        );
      const precision = rows.reduce((sum, i) => sum + (shape(i) / sigma) ** 2, 1 / tau ** 2);
      const mode =
        rows.reduce(
          (sum, i) => sum + ((orange.data.circumference[i]! - fixed.Asym * shape(i)) * shape(i)) / sigma ** 2,
          0,
        ) / precision;
      const scale = 1 / Math.sqrt(precision);
      // Off the mode by a tenth of the scale and 10 % too wide, as a warm start's centres are.
      const [centre, width] = [mode + 0.1 * scale, 1.1 * scale];
      const terms = [...rule.nodes].map((x, k) => rule.logWeights[k]! + lnJoint(centre + width * x));
      const top = Math.max(...terms);
      total += top + Math.log(terms.reduce((sum, term) => sum + Math.exp(term - top), 0)) + Math.log(width);
    }
    expect(total).toBeCloseTo(logLik, 5);
  });
});
