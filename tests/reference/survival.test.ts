import {
  kaplanMeier,
  survivalQuantile,
  turnbull,
  turnbullSurvival,
  weibull,
  weibullQuantile,
  weibullSurvival,
} from '@/lib/fit';
import type { WeibullFit } from '@/lib/fit/survival/weibull';
import { readReferenceJson } from '../support/reference';

interface WeibullReference {
  mu: number;
  sigma: number;
  logLik: number;
  vcov_mu_logsigma: number[][];
  quantile_p: number[];
  quantile_t: number[];
  quantile_ci95_log_lower: number[];
  quantile_ci95_log_upper: number[];
  shape: number;
  scale: number;
}

interface RightCensored {
  time: number[];
  status: number[];
  km_at_event_times: Record<
    't' | 'n_risk' | 'n_event' | 'S' | 'std_err_S' | 'ci_loglog_lower' | 'ci_loglog_upper',
    (number | null)[]
  >;
  quantiles_loglog: Record<'p' | 't' | 'lower' | 'upper', (number | null)[]>;
  weibull: WeibullReference;
}

interface IntervalCensored {
  left: number[];
  right: (number | null)[];
  npmle: {
    interval_left: number[];
    interval_right: (number | null)[];
    mass: number[];
    support: number[];
    logLik: number;
  };
  weibull: WeibullReference;
}

// Source: R 4.2.2, survival 3.5-3 (survfit, survreg), and an EM of its own for the intervals; survival.json.
const reference = readReferenceJson<
  Record<'sixMP' | 'control' | 'lung' | 'ovarian', RightCensored> &
    Record<'cosmesis_RT' | 'cosmesis_RCT', IntervalCensored>
>('survival.json');

const near = (found: number | null | undefined, expected: number, tolerance: number) => {
  expect(found).not.toBeNull();
  expect(Math.abs((found as number) - expected)).toBeLessThan(tolerance * Math.max(Math.abs(expected), 1e-3));
};

const subjectsOf = ({ time, status }: RightCensored) =>
  time.map((t, i) => ({ time: t, isEvent: status[i] === 1 }));

function expectWeibull(fit: WeibullFit, expected: WeibullReference): void {
  // Relative; R's own search stops at about 1e-8 of the parameters.
  near(fit.mu, expected.mu, 1e-7);
  near(fit.sigma, expected.sigma, 1e-7);
  near(fit.shape, expected.shape, 1e-7);
  near(fit.scale, expected.scale, 1e-7);
  near(fit.logLikelihood, expected.logLik, 1e-10);
  fit.covariance.forEach((row, a) =>
    row.forEach((value, b) => near(value, expected.vcov_mu_logsigma[a]?.[b] as number, 1e-5)),
  );
  expected.quantile_p.forEach((p, i) => {
    const quantile = weibullQuantile(fit, p, 0.95);
    near(quantile.estimate, expected.quantile_t[i] as number, 1e-6);
    near(quantile.lower, expected.quantile_ci95_log_lower[i] as number, 1e-6);
    near(quantile.upper, expected.quantile_ci95_log_upper[i] as number, 1e-6);
    near(weibullSurvival(fit, quantile.estimate), 1 - p, 1e-12);
  });
}

describe.each(['sixMP', 'control', 'lung', 'ovarian'] as const)(
  'right-censored times against R: %s',
  (name) => {
    const expected = reference[name];
    const steps = kaplanMeier(subjectsOf(expected), 0.95);

    it('gives the product-limit curve with its errors and log(-log) intervals', () => {
      const table = expected.km_at_event_times;
      expect(steps.map((step) => step.time)).toEqual(table.t);
      expect(steps.map((step) => step.atRisk)).toEqual(table.n_risk);
      expect(steps.map((step) => step.events)).toEqual(table.n_event);
      steps.forEach((step, i) => {
        near(step.survival, table.S[i] as number, 1e-12);
        const [se, lower, upper] = [table.std_err_S[i], table.ci_loglog_lower[i], table.ci_loglog_upper[i]];
        if (typeof se === 'number') near(step.standardError, se, 1e-10);
        if (typeof lower === 'number') near(step.lower, lower, 1e-10);
        else expect(step.lower).toBeNull();
        if (typeof upper === 'number') near(step.upper, upper, 1e-10);
      });
    });

    it('gives the quantiles and their intervals', () => {
      const { p, t, lower, upper } = expected.quantiles_loglog;
      p.forEach((fraction, i) => {
        expect(survivalQuantile(steps, fraction as number)).toBe(t[i]);
        expect(survivalQuantile(steps, fraction as number, (step) => step.lower)).toBe(lower[i]);
        expect(survivalQuantile(steps, fraction as number, (step) => step.upper)).toBe(upper[i]);
      });
    });

    it('gives the Weibull curve with exact events', () => {
      const fit = weibull(
        expected.time.map((time, i) => ({ left: time, right: expected.status[i] === 1 ? time : Infinity })),
      );
      if (!fit.ok) throw new Error(fit.reason);
      expectWeibull(fit, expected.weibull);
    });
  },
);

describe.each(['cosmesis_RT', 'cosmesis_RCT'] as const)('interval-censored times against R: %s', (name) => {
  const expected = reference[name];
  const observations = expected.left.map((left, i) => ({ left, right: expected.right[i] ?? Infinity }));

  it('gives the masses of the nonparametric estimate on the same intervals', () => {
    const fit = turnbull(observations);
    if (!fit.ok) throw new Error(fit.reason);
    const { npmle } = expected;
    const support = npmle.support.map((number) => number - 1);
    expect(fit.intervals.map(({ left }) => left)).toEqual(support.map((s) => npmle.interval_left[s]));
    expect(fit.intervals.map(({ right }) => right)).toEqual(
      support.map((s) => npmle.interval_right[s] ?? Infinity),
    );
    // Rounds stop at changes of 1e-10, a little before the fixed point.
    fit.intervals.forEach(({ mass }, i) => near(mass, npmle.mass[support[i] as number] as number, 1e-7));
    near(fit.logLikelihood, npmle.logLik, 1e-10);
    expect(fit.kuhnTucker).toBeLessThan(1 + 1e-8);
    const [first] = fit.intervals;
    if (!first) throw new Error('no mass');
    expect(turnbullSurvival(fit, first.left).upper).toBe(1);
    expect(turnbullSurvival(fit, (first.left + first.right) / 2)).toEqual({
      lower: 1 - first.mass,
      upper: 1,
    });
  });

  it('gives the Weibull curve', () => {
    const fit = weibull(observations);
    if (!fit.ok) throw new Error(fit.reason);
    expectWeibull(fit, expected.weibull);
  });
});
