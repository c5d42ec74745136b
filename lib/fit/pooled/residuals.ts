import type { PoolCheck } from '../poolCheck';
import { createPredictor } from './leaveOneOut';
import { at } from './parameters';
import { eachBank } from './screen';
import { arrangePool } from './table';
import type { PublishedFit } from './types';

/** One check against what its bank's other checks and the fit lead to expect. */
export interface Residual {
  /** Place in the caller's list. */
  row: number;
  bank: string;
  /** Capacity / rating, seen and predicted. */
  seen: number;
  predicted: number;
  /** ln seen - ln predicted. */
  lnResidual: number;
  /** Residual over its predictive sd; nearly standard normal when the model holds. */
  t: number;
}

/**
 * Leave-one-out residuals of a pool under a fit (README section 8d), for pictures against each condition and time.
 * Computed at the exponent that weighs most. Checks of cell types the fit does not know get the average.
 */
export function looResiduals(checks: readonly PoolCheck[], fit: PublishedFit): Residual[] {
  const component = fit.components.reduce((best, part) => (part.weight > best.weight ? part : best));
  const table = arrangePool(checks);
  const unknown = { m: 0, variance: Math.exp(2 * component.psi[at.lnSm]!) };
  const effects = table.cellTypeKeys.map((key) => {
    const effect = component.cellTypes[fit.cellTypes.findIndex((row) => row.cellType === key)];
    return effect ? { m: effect.m, variance: effect.variance } : unknown;
  });
  const predictor = createPredictor(table, {
    psi: Float64Array.from(component.psi),
    exponent: component.exponent,
    effects,
  });
  const residuals: Residual[] = [];
  eachBank(table, (first, end, cellType) => {
    for (let row = first; row < end; row++) {
      const { mean, t } = predictor.predict(row, first, end, cellType, () => true);
      const input = table.inputRow[row]!;
      const seen = Math.exp(table.y[row]!);
      const lnResidual = table.y[row]! - mean;
      residuals.push({
        row: input,
        bank: checks[input]!.bank,
        seen,
        predicted: Math.exp(mean),
        lnResidual,
        t,
      });
    }
  });
  return residuals.sort((a, b) => a.row - b.row);
}
