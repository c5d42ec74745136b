import type { PoolCheck } from '@/lib/fit/poolCheck';
import { evaluate } from '@/lib/fit/pooled/evaluate';
import { hermiteRule } from '@/lib/fit/pooled/hermite';
import { lnKept } from '@/lib/fit/pooled/fade';
import { at, parameterNames } from '@/lib/fit/pooled/parameters';
import { defaultPriors, interactionPrior } from '@/lib/fit/pooled/priors';
import { arrangePool, withExtra, type PoolTable } from '@/lib/fit/pooled/table';
import { createWorkspace, freshCentres } from '@/lib/fit/pooled/workspace';
import { drawTruth, simulatePool } from '@/scripts/bench/simulatePool';

const centre = defaultPriors.map(({ mean }) => mean);

/** Evaluate often enough at one psi that the centres have settled. */
function settled(table: PoolTable, psi: number[], priors = defaultPriors) {
  const centres = freshCentres(table, 0.2, 0.25);
  const work = createWorkspace(table, 0.5, centres);
  let result = evaluate(work, Float64Array.from(psi), priors);
  for (let round = 0; round < 8; round++) {
    for (let k = 0; k < table.cellTypes; k++) {
      centres.cellTypeModes[k]! += result.cellTypeScore[k]! / result.cellTypeInformation[k]!;
      centres.cellTypeScales[k] = 1 / Math.sqrt(result.cellTypeInformation[k]!);
    }
    result = evaluate(work, Float64Array.from(psi), priors);
  }
  return result;
}

function smallPool(banks: number, cellTypes: number, seed = 3): PoolCheck[] {
  return simulatePool({ banks, seed, cellTypes, truth: drawTruth(1, 0) }).checks;
}

/** ln p(y | psi) of a one-type pool by brute force: trapezoid sums over m, and over c and u of each bank. */
function bruteForce(table: PoolTable, psi: number[], gross: (row: number) => number): number {
  const sd = (place: number) => Math.exp(psi[place]!);
  const grid = (width: number, points: number) =>
    Array.from({ length: points }, (_, i) => -width + (2 * width * i) / (points - 1));
  const lnNormal = (x: number, scale: number) =>
    -0.5 * (x / scale) ** 2 - Math.log(scale) - 0.5 * Math.log(2 * Math.PI);
  const paces = grid(6 * sd(at.lnSu), 61);
  const starts = grid(6 * sd(at.lnSc), 61);
  const effects = grid(6 * sd(at.lnSm), 41);
  const spacing = (values: number[]) => Math.log(values[1]! - values[0]!);
  const overEffects = effects.map((m) => {
    let total = lnNormal(m, sd(at.lnSm)) + spacing(effects);
    for (let bank = 0; bank < table.banks; bank++) {
      const terms: number[] = [];
      for (const u of paces) {
        const kept: number[] = [];
        for (let j = table.bankStart[bank]!; j < table.bankStart[bank + 1]!; j++) {
          kept.push(lnKept(Math.exp(m + u) * gross(j)));
        }
        for (const c of starts) {
          let ln = lnNormal(u, sd(at.lnSu)) + lnNormal(c, sd(at.lnSc));
          kept.forEach((value, i) => {
            const j = table.bankStart[bank]! + i;
            ln += lnNormal(table.y[j]! - psi[at.c0]! - c - value, sd(at.lnS) * Math.sqrt(table.weight[j]!));
          });
          terms.push(ln);
        }
      }
      total += logSum(terms) + spacing(paces) + spacing(starts);
    }
    return total;
  });
  return logSum(overEffects);
}

function logSum(values: number[]): number {
  const top = values.reduce((a, b) => Math.max(a, b), -Infinity);
  return top + Math.log(values.reduce((sum, value) => sum + Math.exp(value - top), 0));
}

function grossOf(table: PoolTable, psi: number[]): (row: number) => number {
  return (j) =>
    Math.exp(psi[1]! + psi[2]! * table.tau[j]! + psi[3]! * table.soc[j]! + 0.5 * table.lnYears[j]!) +
    Math.exp(
      psi[4]! +
        psi[5]! * table.lnEfc[j]! +
        psi[6]! * table.lnDepth[j]! +
        psi[7]! * table.lnRate[j]! +
        psi[8]! * table.tau[j]! +
        psi[9]! * table.clamped[j]!,
    );
}

describe('hermiteRule', () => {
  it.each([1, 3, 9, 21, 40])(
    'integrates even moments of the normal density to degree 2n - 1 (n = %i)',
    (count) => {
      const { nodes, logWeights } = hermiteRule(count);
      // E x^(2k) = 1 x 3 x 5 x ... x (2k - 1): a closed form.
      for (let k = 0, moment = 1; 2 * k <= Math.min(2 * count - 1, 24); k++, moment *= 2 * k - 1) {
        const sum = [...nodes].reduce(
          (total, x, i) => total + Math.exp(logWeights[i]! - (x * x) / 2) * x ** (2 * k),
          0,
        );
        expect(sum / Math.sqrt(2 * Math.PI) / moment).toBeCloseTo(1, 9);
      }
    },
  );

  it('refuses a number of nodes that makes no rule', () => {
    expect(() => hermiteRule(0)).toThrow(RangeError);
    expect(() => hermiteRule(2.5)).toThrow(RangeError);
  });
});

describe('evaluate', () => {
  it('has the marginal likelihood of a small pool as brute-force integration does', () => {
    const table = arrangePool(smallPool(3, 1));
    const psi = centre.slice();
    const expected = bruteForce(table, psi, grossOf(table, psi));
    // 9 x 3 nodes against dense trapezoid sums: what is left is the 3 nodes' error over m.
    expect(settled(table, psi).logLikelihood).toBeCloseTo(expected, 2);
  });

  it('leaves a check out as if it were not there', () => {
    const checks = smallPool(6, 2);
    const whole = arrangePool(checks);
    const out = checks.findIndex((check, i) =>
      checks.some((other, j) => j !== i && other.bank === check.bank),
    );
    const masked = { ...whole, inverseWeight: whole.inverseWeight.slice() };
    masked.inverseWeight[whole.inputRow.indexOf(out)] = 0;
    const without = arrangePool(checks.filter((_, i) => i !== out));
    const [a, b] = [settled(masked, centre), settled(without, centre)];
    expect(a.objective).toBeCloseTo(b.objective, 8);
    a.gradient.forEach((value, i) => expect(value).toBeCloseTo(b.gradient[i]!, 6));
    a.information.forEach((value, i) => expect(value / b.information[i]!).toBeCloseTo(1, 6));
  });

  it('has a gradient and an information that are the derivatives of its objective', () => {
    const checks = smallPool(60, 4, 5);
    const table = withExtra(arrangePool(checks), (row) => (row % 3 === 0 ? 1 : 0));
    const priors = [...defaultPriors, interactionPrior];
    const psi = [...centre, 0.1].map((value, i) => value + (i % 2 ? 0.05 : -0.05) * priors[i]!.sd);
    const here = settled(table, psi, priors);
    const scale = (i: number) => 1 / Math.sqrt(here.information[i * priors.length + i]!);
    [...parameterNames, 'extra'].forEach((_, i) => {
      // Central differences over a tenth of a standard error; agreement in units of the standard error.
      const step = 0.1 * scale(i);
      const moved = (sign: number) =>
        settled(
          table,
          psi.map((value, j) => (j === i ? value + sign * step : value)),
          priors,
        );
      const [up, down] = [moved(1), moved(-1)];
      const slope = (up.objective - down.objective) / (2 * step);
      expect(Math.abs(slope - here.gradient[i]!) * scale(i)).toBeLessThan(0.01);
      for (let j = 0; j < priors.length; j++) {
        const curvature = -(up.gradient[j]! - down.gradient[j]!) / (2 * step);
        const off = (curvature - here.information[i * priors.length + j]!) * scale(i) * scale(j);
        expect(Math.abs(off)).toBeLessThan(0.02);
      }
    });
  });
});
