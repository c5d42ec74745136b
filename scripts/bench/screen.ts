/**
 * Does the outlier screen find gross mistakes and leave the rest alone? 20 simulated pools (seeded) of 1000 banks with
 * 2 % of mistakes of 5 to 50 %. Bars: at least 92 % found, at most 0.1 % false at cut 4. npm run bench:screen
 */
import { fitPool } from '../../lib/fit/pooled/fitPool';
import { table } from '../fit/table';
import { drawTruth, simulatePool } from './simulatePool';

const pools = 20;
const banks = 1000;
const total = { planted: 0, found: 0, listed: 0, clean: 0, falsely: 0, falselyListed: 0 };
const shifts: number[] = [];
const rows: string[][] = [];
for (let pool = 0; pool < pools; pool++) {
  const truth = drawTruth(4000 + pool, 0.5);
  const { checks, isOutlier } = simulatePool({ banks, seed: 5000 + pool, truth, outlierShare: 0.02 });
  const options = { exponent: 0.5, isWithoutInteractions: true };
  const fit = fitPool(checks, options);
  const oracle = fitPool(
    checks.filter((_, row) => !isOutlier[row]),
    { ...options, isScreening: false },
  );
  if (!fit.ok || !oracle.ok) {
    rows.push([String(pool), 'not converged']);
    continue;
  }
  const quarantined = new Set(
    fit.screen.filter(({ action }) => action === 'quarantine').map(({ row }) => row),
  );
  const listed = new Set(fit.screen.map(({ row }) => row));
  const count = (wants: boolean, set: Set<number>) =>
    isOutlier.filter((is, row) => is === wants && set.has(row)).length;
  const planted = isOutlier.filter(Boolean).length;
  total.planted += planted;
  total.clean += isOutlier.length - planted;
  total.found += count(true, quarantined);
  total.listed += count(true, listed);
  total.falsely += count(false, quarantined);
  total.falselyListed += count(false, listed);
  const shift = Math.max(
    ...fit.effects.map((effect, i) => {
      const clean = oracle.effects[i]!;
      return Math.abs(Math.log(effect.lifeRatio / clean.lifeRatio)) / clean.seLn;
    }),
  );
  shifts.push(shift);
  rows.push([
    String(pool),
    String(planted),
    String(count(true, quarantined)),
    String(count(false, quarantined)),
    String(fit.screenRounds),
    shift.toFixed(2),
  ]);
}
console.log(table(['pool', 'planted', 'found', 'false', 'rounds', 'worst effect off oracle, se'], rows));
const percent = (part: number, whole: number) => `${((100 * part) / whole).toFixed(3)} %`;
console.log(
  `cut 4:   found ${percent(total.found, total.planted)}, false ${percent(total.falsely, total.clean)}`,
);
console.log(
  `cut 3.5: found ${percent(total.listed, total.planted)}, false ${percent(total.falselyListed, total.clean)}`,
);
console.log(
  `worst effect off the oracle: largest ${Math.max(...shifts).toFixed(2)} se of ${shifts.length} pools`,
);
